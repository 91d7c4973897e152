import { describe, expect, it } from 'vitest'
import { reachability, turnedOver } from '../../../shared/walls/reachability.ts'
import { reachAt } from '../../../shared/walls/wall.ts'
import { DEGREE, facets, seeded } from '../../support/plates.ts'

const chain = (...pairs: readonly (readonly [number, number])[]) => facets(...pairs).facets

describe('what a straight jet can cut', () => {
  it.each([
    ['a root face below', chain([17, 30], [20, 0])],
    ['a root face above', chain([3, 0], [20, -30])],
    ['a double bevel', chain([8, 35], [12, 0], [20, -35])],
    ['one wall told in two', chain([8, 20], [20, 20])],
  ])('%s', (_, wall) => {
    expect(reachability(wall)).toEqual({ kind: 'reachable' })
  })

  it('says which facet of a waist, how far the jet would go in, and that turning over does not help', () => {
    // Both facets prolonged run 10·(tan 30° + tan 20°) into the other's metal.
    expect(reachability(chain([10, -30], [20, 20]))).toEqual({
      kind: 'blocked',
      facet: 1,
      intoPart: expect.closeTo(10 * (Math.tan(30 * DEGREE) + Math.tan(20 * DEGREE)), 12),
      turnedOverDoes: false,
      partDepth: { fromTop: [0], fromBottom: [1] },
    })
  })

  it('finds facets that no cut from one side reaches', () => {
    // A pocket in the edge: its floor is clear of neither lip.
    expect(reachability(chain([5, -40], [12, 0], [20, 40]))).toMatchObject({
      facet: 1,
      partDepth: null,
    })
    // A lip at the top only: the bevel at the bottom passes it on either side.
    expect(reachability(chain([5, -40], [12, 10], [20, -20]))).toMatchObject({
      facet: 1,
      partDepth: { fromTop: [0, 2], fromBottom: [1] },
    })
  })
})

/** Every answer again by looking at many depths: the line of each facet against the wall. */
describe('against dense looking', () => {
  const STEPS = 400
  /** The bends lie on looked-at depths, so nothing is missed between them. */
  const ROUNDING = 1e-9

  it('agrees on 500 random chains', () => {
    const random = seeded(20261201)
    let blocked = 0
    for (let n = 0; n < 500; n++) {
      const thickness = 40
      const count = 2 + Math.floor(3 * random())
      const ends = [...new Set(Array.from({ length: count - 1 }, () => 1 + Math.floor(random() * 38)))]
      const wall = chain(
        ...[...ends.sort((a, b) => a - b), thickness].map(
          (depth) => [depth, Math.round(140 * random() - 70)] as const,
        ),
      )
      const entries = wall.map((facet, i) => {
        const head = wall[i - 1]?.depth ?? 0
        const at = (depth: number) => reachAt({ facets: wall }, depth)
        let [above, below] = [0, 0]
        for (let k = 0; k <= STEPS; k++) {
          const depth = (thickness * k) / STEPS
          const line = at(head) + (depth - head) * Math.tan(facet.tilt)
          const into = at(depth) - line
          if (depth < head) above = Math.max(above, into)
          if (depth > facet.depth) below = Math.max(below, into)
        }
        return { above, below }
      })
      const clear = entries.every(({ above, below }) => above < ROUNDING && below < ROUNDING)
      const answer = reachability(wall)
      expect(answer.kind === 'reachable').toBe(clear)
      // The mirror rule: the same jet from the other face fares no better.
      expect(reachability(turnedOver(wall)).kind).toBe(answer.kind)
      if (answer.kind === 'reachable') continue
      blocked++
      const deepest = Math.max(...entries.flatMap(({ above, below }) => [above, below]))
      expect(answer.intoPart).toBeCloseTo(deepest, 6)
      const each = entries.every(({ above, below }) => above < ROUNDING || below < ROUNDING)
      expect(answer.partDepth !== null).toBe(each)
      for (const i of answer.partDepth?.fromTop ?? []) expect(entries[i]!.above).toBeLessThan(ROUNDING)
      for (const i of answer.partDepth?.fromBottom ?? []) expect(entries[i]!.below).toBeLessThan(ROUNDING)
    }
    expect(blocked).toBeGreaterThan(200)
    expect(blocked).toBeLessThan(480)
  })

  it('turns a wall over and back', () => {
    const wall = chain([5, 40], [12, 10], [20, -20])
    expect(turnedOver(wall)).toEqual(chain([8, 20], [15, -10], [20, -40]))
    expect(turnedOver(turnedOver(wall))).toEqual(wall)
  })
})
