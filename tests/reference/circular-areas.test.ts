import { describe, expect, test } from 'vitest'
import { contourArea } from '../../shared/contours/check.ts'
import { contourAt } from '../../shared/contours/contour.ts'
import { soundRange } from '../../shared/events/range.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import { volumeOf } from '../../shared/solid/volume.ts'
import { DEGREE, facets, plate, seeded } from '../support/plates.ts'

/**
 * Source: handbook formulas, from memory, for the area of a circle's segment and of the lens of two circles. Walls of
 * arcs are cones, so that at every depth a half moon, a lens and a crescent are these figures with moved radii.
 */
const turn = (degrees: number) => Math.tan((degrees * Math.PI) / 720)

/** Segment of a circle beyond a chord at a distance from its centre (negative: the greater part). */
const segment = (r: number, distance: number) =>
  r * r * Math.acos(distance / r) - distance * Math.sqrt(r * r - distance * distance)

/** What two circles with centres `apart` have in common. */
function lens(r1: number, r2: number, apart: number): number {
  const d1 = (apart * apart + r1 * r1 - r2 * r2) / (2 * apart)
  return segment(r1, d1) + segment(r2, apart - d1)
}

/** Half a chord, and the arcs on it in degrees of sweep. */
const HALF = 60
const radius = (sweep: number) => HALF / Math.sin((sweep / 2) * DEGREE)
const drop = (sweep: number) => HALF / Math.tan((sweep / 2) * DEGREE)

interface Shape {
  readonly name: string
  readonly loop: Vertex[]
  /** Area when the first and the second edge stand outside their top lines by u and v. */
  readonly area: (u: number, v: number) => number
}

const shapes: readonly Shape[] = [
  {
    name: 'half moon of an arc of 140° and its chord',
    loop: [{ x: -HALF, y: 0, bulge: turn(140) }, { x: HALF, y: 0 }],
    area: (u, v) => segment(radius(140) + u, drop(140) - v),
  },
  {
    name: 'lens of arcs of 110° and 150°',
    loop: [{ x: -HALF, y: 0, bulge: turn(110) }, { x: HALF, y: 0, bulge: turn(150) }],
    area: (u, v) => lens(radius(110) + u, radius(150) + v, drop(110) + drop(150)),
  },
  {
    name: 'crescent of arcs of 200° and −90°',
    loop: [{ x: -HALF, y: 0, bulge: turn(200) }, { x: HALF, y: 0, bulge: turn(-90) }],
    // The hollow arc's circle shrinks as its wall moves into the waste.
    area: (u, v) => {
      const r = radius(200) + u
      return Math.PI * r * r - lens(r, radius(90) - v, drop(90) - drop(200))
    },
  },
] // prettier-ignore

const RELATIVE = 1e-12
/** Simpson's strips in one band: the areas are smooth there, and the fourth power of a strip is below rounding. */
const STRIPS = 1_000

describe.each(shapes)('$name', ({ loop, area }) => {
  test.each(Array.from({ length: 8 }, (_, i) => [i + 1]))('walls %i', (seed) => {
    const random = seeded(seed)
    const thickness = 9
    const tilts = [0, 1].map(() => [0, 1].map(() => 60 * (random() - 0.5)))
    const body = plate(thickness, [loop], (_, e) => facets([4, tilts[e]![0]!], [thickness, tilts[e]![1]!]))
    expect(soundRange(body)).toMatchObject({ from: 0, to: thickness })
    const reach = (edge: number, depth: number) =>
      Math.min(depth, 4) * Math.tan(tilts[edge]![0]! * DEGREE) +
      Math.max(0, depth - 4) * Math.tan(tilts[edge]![1]! * DEGREE)
    const at = (depth: number) => area(reach(0, depth), reach(1, depth))
    for (let k = 0; k <= 9; k++) {
      expect(Math.abs(contourArea(contourAt(body, k)) / at(k) - 1)).toBeLessThan(RELATIVE)
    }
    const simpson = (from: number, to: number) => {
      const h = (to - from) / STRIPS
      let sum = 0
      for (let i = 0; i < STRIPS; i++) {
        const a = from + i * h
        sum += (h / 6) * (at(a) + 4 * at(a + h / 2) + at(a + h))
      }
      return sum
    }
    expect(Math.abs(volumeOf(body)! / (simpson(0, 4) + simpson(4, thickness)) - 1)).toBeLessThan(RELATIVE)
  })
})
