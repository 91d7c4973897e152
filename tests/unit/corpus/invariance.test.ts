import { describe, expect, test } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import { figuresOf, worstDrift } from '../../corpus/drift.ts'
import { corpus } from '../../corpus/parts.ts'
import { recorded } from '../../corpus/recorded.ts'

/**
 * Every part of the corpus, drawn in other ways: each answer may change only as it must. `recorded` holds what
 * was found when the part came in, and how far the answers drift; the bounds may only be tightened.
 */

/** Ten evaluations, some of parts on which the search for bites works hard. */
const TIMEOUT = 60_000

test('the corpus is not empty, and every part of it is recorded', () => {
  expect(corpus.length).toBeGreaterThanOrEqual(15)
  expect(Object.keys(recorded).sort()).toEqual(corpus.map(({ name }) => name).sort())
})

describe.each(corpus)('$name: $why', ({ name, request }) => {
  const drawn = evaluate(request)
  const known = recorded[name]!

  test('answers what was recorded', () => {
    expect(figuresOf(drawn)).toEqual({
      volume: known.volume === null ? null : expect.closeTo(known.volume, 3),
      event: known.event && { kind: known.event.kind, depth: expect.closeTo(known.event.depth, 8) },
      neededTilt: expect.closeTo(known.neededTilt, 8),
      passes: known.passes && { count: known.passes.count, length: expect.closeTo(known.passes.length, 4) },
      wayOut: known.wayOut,
      findings: known.findings,
    })
  })

  test('changes only as it must', { timeout: TIMEOUT }, () => {
    const { walls, passes } = worstDrift(request)
    expect(walls).toBeLessThanOrEqual(known.drift.walls)
    expect(passes).toBeLessThanOrEqual(known.drift.passes)
  })
})
