import { describe, expect, it } from 'vitest'
import { pathFaults } from '../../../shared/passes/check.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import type { Passes } from '../../../shared/passes/types.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'
import { circle, DEGREE, facets, plate, rectangle, regular, reversed } from '../../support/plates.ts'

const JET = { kerf: 1, taper: 0 }
const FREE = { tilt: null }

function codes({ problems }: Passes): string[] {
  return problems.map(({ code, at }) => `${code} ${at}`)
}

function edges({ path }: Passes): number[] {
  return [...new Set(path.edge)].filter((g) => g >= 0).sort((a, b) => a - b)
}

/** A plate whose upper side has something between (60, 50) and (40, 50). */
function withHollow(between: readonly Vertex[], tilt: number) {
  const body = plate(
    10,
    [[{ x: 0, y: 0 }, { x: 100, y: 0 }, { x: 100, y: 50 }, ...between, { x: 0, y: 50 }]],
    () => facets([10, tilt]),
  )
  const passes = passesOf(body, JET, FREE)
  expect(pathFaults(body, JET, passes, 1e-9)).toEqual([])
  return passes
}

describe('hollows finer than the jet', () => {
  it('passes over a notch narrower than the kerf', () => {
    const notch = [
      { x: 50.4, y: 50 },
      { x: 50.4, y: 45 },
      { x: 49.6, y: 45 },
      { x: 49.6, y: 50 },
    ]
    const passes = withHollow(notch, 0)
    expect(edges(passes)).toEqual([0, 1, 2, 6, 7])
    expect(passes.problems.map(({ code, at, value }) => [code, at, value?.toFixed(6)])).toContainEqual([
      'detail-finer-than-jet',
      4,
      '5.000000',
    ])
    expect(passes.firstStation[4]).toBe(-1)
    // The jet stays on the side's axis all along: nothing dips into the notch.
    const { x, y } = passes.path
    for (const [i, own] of x.entries())
      if (own > 45 && own < 55 && y[i]! > 25) expect(y[i]).toBeCloseTo(50.5, 12)
  })

  it('goes into a notch that is wide enough', () => {
    const notch = [
      { x: 53, y: 50 },
      { x: 53, y: 45 },
      { x: 47, y: 45 },
      { x: 47, y: 50 },
    ]
    expect(edges(withHollow(notch, 0))).toEqual([0, 1, 2, 3, 4, 5, 6, 7])
    // Walls that lean into the waste close it below: 2·(3 − 0.52) is less than 2·10·tan 15°.
    const tilted = withHollow(notch, 15)
    expect(edges(tilted)).toEqual([0, 1, 2, 6, 7])
  })

  it('cuts a small fillet, drawn as an arc or as chords, with its own radius', () => {
    // A step down of 10 with an inner corner of radius 0.3 at (50, 40).
    const step = (inner: readonly Vertex[]) => {
      const body = plate(
        10,
        [[{ x: 0, y: 0 }, { x: 100, y: 0 }, { x: 100, y: 50 }, { x: 50, y: 50 }, ...inner, { x: 0, y: 40 }]],
        () => facets([10, 0]),
      )
      const passes = passesOf(body, JET, FREE)
      expect(pathFaults(body, JET, passes, 1e-9)).toEqual([])
      return passes
    }
    const arc = step([
      { x: 50, y: 40.3, bulge: -Math.tan(Math.PI / 8) },
      { x: 49.7, y: 40 },
    ])
    const chords = step(
      Array.from({ length: 9 }, (_, i) => ({
        x: 49.7 + 0.3 * Math.cos((i / 8) * (Math.PI / 2)),
        y: 40.3 - 0.3 * Math.sin((i / 8) * (Math.PI / 2)),
      })),
    )
    expect(edges(arc)).toEqual([0, 1, 2, 3, 5, 6])
    expect(edges(chords)).toEqual([0, 1, 2, 3, 12, 13])
    // Both turn at (49.5, 40.5), √2·(0.5 − 0.3) − (0.5 − 0.3) short of the drawn radius.
    for (const passes of [arc, chords]) {
      const i = passes.firstStation[passes === arc ? 5 : 12]!
      expect(passes.path.x[i]).toBeCloseTo(49.5, 9)
      expect(passes.path.y[i]).toBeCloseTo(40.5, 9)
    }
    expect(codes(arc)).toEqual(['detail-finer-than-jet 4'])
    expect(arc.problems[0]!.value).toBeCloseTo(0.2 * (Math.SQRT2 - 1), 9)
  })
})

describe('holes', () => {
  const withHole = (hole: Vertex[], tilt: number, thickness = 10) =>
    plate(thickness, [rectangle(-50, -50, 100, 100), hole], (l) => facets([thickness, l === 1 ? tilt : 0]))

  it('tells the smallest diameter where tilted jets cross', () => {
    // Axis at the bottom: 0.5/cos 30° + 10·tan 30° inside the top edge.
    const least = 2 * (0.5 / Math.cos(30 * DEGREE) + 10 * Math.tan(30 * DEGREE))
    const small = passesOf(withHole(circle(0, 0, 5, true), 30), JET, FREE)
    expect(small.problems).toEqual([
      {
        code: 'hole-too-small-for-tilt',
        loop: 1,
        at: -1,
        level: 0,
        value: expect.closeTo(least, 9) as number,
      },
    ])
    expect(small.passes.map(({ loop }) => loop)).toEqual([0])
    // Its cure: just below it is refused, a little above it is cut.
    const at = (radius: number) => codes(passesOf(withHole(circle(0, 0, radius, true), 30), JET, FREE))
    expect(at(least / 2 - 1e-6)).toEqual(['hole-too-small-for-tilt -1'])
    expect(at(least / 2 + 1)).toEqual([])
  })

  it('does the same for a hole of many sides', () => {
    const sides = reversed(regular(60, 5))
    expect(codes(passesOf(withHole(sides, 30), JET, FREE))).toEqual(['hole-too-small-for-tilt -1'])
    expect(codes(passesOf(withHole(reversed(regular(60, 9)), 30), JET, FREE))).toEqual([])
  })

  it('loses a slot narrower than the kerf', () => {
    const passes = passesOf(withHole(reversed(rectangle(-10, -0.4, 20, 0.8)), 0), JET, FREE)
    expect(codes(passes)).toEqual(['hole-too-small-for-tilt -1'])
  })
})
