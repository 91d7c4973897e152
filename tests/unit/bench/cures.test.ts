import { describe, expect, it } from 'vitest'
import { withCures } from '../../../src/features/bench/model/cures.ts'
import { breachesIn } from '../../../src/features/bench/model/notes.ts'
import { facetsOf } from '../../../src/features/bench/model/walls.ts'
import { content } from './fixtures.ts'

describe('applying cures', () => {
  it('sets the facet named on every edge named, and nothing else', () => {
    const edges = [
      { loop: 0, edge: 0 },
      { loop: 0, edge: 2 },
    ]
    const cured = withCures(content, [{ message: '', set: { edges, facet: 0, tilt: 10 } }])
    expect(facetsOf(cured, edges[0]!)).toEqual([
      { depth: 19, tilt: 10 },
      { depth: 25, tilt: 0 },
    ])
    expect(facetsOf(cured, edges[1]!)).toEqual([{ depth: 25, tilt: 10 }])
    expect(cured.jet).toBe(content.jet)
  })

  it('sets the stand-off', () => {
    expect(withCures(content, [{ message: '', standoff: 5.5 }]).jet).toEqual({
      ...content.jet,
      standoff: 5.5,
    })
  })

  it('takes advice without a number as no change', () => {
    expect(withCures(content, [{ message: 'Turn the plate over.' }])).toBe(content)
  })
})

it('collects what passes a limit, and only that', () => {
  const found = breachesIn([
    { code: 'edge-over-working-limit', severity: 'warning', loop: 0, edge: 2, message: '' },
    { code: 'corner-over-mechanical-limit', severity: 'stop', loop: 1, vertex: 0, message: '' },
    { code: 'concave-fillet', severity: 'note', loop: 0, vertex: 3, message: '' },
  ])
  expect([...found]).toEqual(['0-2', 'h1.C1'])
})
