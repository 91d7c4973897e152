import { describe, expect, it } from 'vitest'
import type { Head } from '../../../shared/api/heads.ts'
import { headOf, requestOf, sameContent, wholeContent } from '../../../src/features/bench/model/content.ts'
import { content, setupOf } from './fixtures.ts'

const stored = setupOf(content, 7).revision.content

const head: Head = {
  id: content.headId,
  name: 'North gantry',
  kind: 'turning',
  mechanicalLimit: 60,
  workingLimit: 50,
  workingLimitSet: null,
  jet: content.jet,
  version: 2,
}

describe('the content on the bench', () => {
  it('is the same when it would be saved as the same text', () => {
    expect(sameContent(content, structuredClone(content))).toBe(true)
    const changed = structuredClone(content)
    changed.walls[0]!.facets[0]!.tilt += 1e-12
    expect(sameContent(content, changed)).toBe(false)
  })

  it('goes by the head’s record of today, not by the copy of the last save', () => {
    expect(headOf(stored.head, [head], content.headId).workingLimit).toBe(50)
    expect(headOf(stored.head, [], content.headId).workingLimit).toBe(55)
  })

  it('asks with the stored profile and the limits of the head', () => {
    const request = requestOf(stored, { ...content, datum: 'bottom' }, headOf(stored.head, [head], head.id))
    expect(request).toMatchObject({ datum: 'bottom', head: { workingLimit: 50 }, loops: stored.loops })
  })

  it('keeps part and profile when the whole content is put together', () => {
    const whole = wholeContent(stored, { ...content, note: 'mine' }, stored.head)
    expect(whole).toEqual({ ...stored, note: 'mine' })
  })
})
