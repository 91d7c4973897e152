import type { Vertex } from '../../shared/geometry/types.ts'
import { circle, rectangle, reversed } from '../support/plates.ts'

/**
 * Plates as drawings and, beside each, as a sum of solids in a kernel's own terms: which walls bound it, on which
 * side, joined how. Only this list knows both; no offset, mitre or crossing is worked out here.
 */
export type Solid =
  /** The material side of an edge's wall: beneath a plane, inside a cone (convex arc) or outside one (concave arc). */
  | { readonly kind: 'material'; readonly loop: number; readonly edge: number }
  /** The other side. */
  | { readonly kind: 'waste'; readonly loop: number; readonly edge: number }
  /** What lies on the side of a vertical plane that (x, y) points to, from a place. */
  | {
      readonly kind: 'beyond'
      readonly at: readonly [number, number]
      readonly x: number
      readonly y: number
    }
  | { readonly kind: 'all'; readonly of: readonly Solid[] }
  | { readonly kind: 'any'; readonly of: readonly Solid[] }

export interface Drawing {
  readonly name: string
  readonly loops: readonly (readonly Vertex[])[]
  /** Their volumes add up to the plate's. Round corners are cut out by planes square to the tangent. */
  readonly add: readonly Solid[]
  readonly take?: readonly Solid[]
  /** Relative, where the kernel's own curves allow no more than the test asks elsewhere. */
  readonly within?: number
}

const m = (edge: number, loop = 0): Solid => ({ kind: 'material', loop, edge })
const w = (edge: number, loop = 1): Solid => ({ kind: 'waste', loop, edge })
const all = (...of: Solid[]): Solid => ({ kind: 'all', of })
const any = (...of: Solid[]): Solid => ({ kind: 'any', of })
const beyond = (ax: number, ay: number, x: number, y: number): Solid => ({
  kind: 'beyond',
  at: [ax, ay],
  x,
  y,
})
const east = (x: number) => beyond(x, 0, 1, 0)
const west = (x: number) => beyond(x, 0, -1, 0)
const north = (y: number) => beyond(0, y, 0, 1)
const south = (y: number) => beyond(0, y, 0, -1)
/** Between two columns or rows. */
const column = (from: number, to: number) => all(east(from), west(to))
const row = (from: number, to: number) => all(north(from), south(to))

const QUARTER = Math.tan(Math.PI / 8)
const p = (x: number, y: number, bulge?: number): Vertex => (bulge === undefined ? { x, y } : { x, y, bulge })
const polar = (r: number, degrees: number, bulge?: number) =>
  p(r * Math.cos((degrees * Math.PI) / 180), r * Math.sin((degrees * Math.PI) / 180), bulge)
/** Bulge of an arc of so many degrees, counter-clockwise positive. */
const turn = (degrees: number) => Math.tan((degrees * Math.PI) / 720)

function roundedRectangle(width: number, height: number, r: number): Vertex[] {
  return [
    p(r, 0),
    p(width - r, 0, QUARTER),
    p(width, r),
    p(width, height - r, QUARTER),
    p(width - r, height),
    p(r, height, QUARTER),
    p(0, height - r),
    p(0, r, QUARTER),
  ]
}

const roundedParts: readonly Solid[] = [
  all(column(25, 135), m(0), m(4)),
  all(east(135), row(25, 75), m(2)),
  all(west(25), row(25, 75), m(6)),
  all(m(1), east(135), south(25)),
  all(m(3), east(135), north(75)),
  all(m(5), west(25), north(75)),
  all(m(7), west(25), south(25)),
]

/** Counter-clockwise: lower side, round end, upper side, round end. */
const stadium = (x: number, y: number, length: number, r: number): Vertex[] => [
  p(x, y - r),
  p(x + length, y - r, 1),
  p(x + length, y + r),
  p(x, y + r, 1),
]

/** Heading where the arcs of the last plate meet: their chord's, and half an arc more. */
const TURNOVER = Math.atan2(-20, -80) + Math.PI / 6

const sides = all(m(0), m(1), m(2), m(3))

export const drawings: readonly Drawing[] = [
  {
    name: 'disc whose halves lean unlike',
    loops: [circle(0, 0, 50)],
    add: [all(m(0), south(0)), all(m(1), north(0))],
  },
  {
    name: 'ring',
    loops: [circle(0, 0, 90), circle(0, 0, 50, true)],
    // The hole runs clockwise from its west end: over the north first.
    add: [all(m(0), m(1, 1), south(0)), all(m(1), m(0, 1), north(0))],
  },
  {
    name: 'rounded rectangle, every edge its own wall',
    loops: [roundedRectangle(160, 100, 25)],
    add: roundedParts,
  },
  {
    name: 'stadium',
    loops: [stadium(0, 0, 120, 40)],
    add: [all(column(0, 120), m(0), m(2)), all(m(1), east(120)), all(m(3), west(0))],
  },
  {
    name: 'rectangle with a slot',
    loops: [rectangle(-60, -70, 220, 140), reversed(stadium(0, 0, 100, 20))],
    add: [sides],
    // Reversed: west end, upper side, east end, lower side, each from where the last ended.
    take: [all(w(0), west(0)), all(column(0, 100), w(1), w(3)), all(w(2), east(100))],
  },
  {
    name: 'half moon: arc and chord',
    loops: [[polar(60, 200, turn(140)), polar(60, 340)]],
    add: [all(m(0), m(1))],
  },
  {
    name: 'slice of a round',
    loops: [[p(0, 0), polar(120, 10, turn(70)), polar(120, 80)]],
    add: [all(m(0), m(1), m(2))],
  },
  {
    name: 'slice of a ring',
    loops: [[polar(60, 0), polar(120, 0, turn(80)), polar(120, 80), polar(60, 80, turn(-80))]],
    add: [all(m(0), m(1), m(2), m(3))],
  },
  {
    name: 'rectangle with a round bite',
    loops: [[p(0, 0), p(160, 0), p(160, 100), p(110, 100, turn(-130)), p(50, 100), p(0, 100)]],
    // The upper side in two, each with a wall of its own: apart at the middle of the bite.
    add: [all(m(0), m(1), m(2), m(3), east(80)), all(m(0), m(3), m(4), m(5), west(80))],
  },
  {
    name: 'rectangle with a round tab',
    loops: [[p(0, 0), p(160, 0), p(160, 100), p(110, 100, turn(230)), p(50, 100), p(0, 100)]],
    add: [all(m(0), any(all(m(1), m(2)), m(3)), east(80)), all(m(0), any(all(m(4), m(5)), m(3)), west(80))],
  },
  {
    name: 'lens: two arcs at an angle',
    loops: [[p(-60, 0, turn(110)), p(60, 0, turn(150))]],
    add: [all(m(0), m(1))],
  },
  {
    name: 'crescent: a round less a round',
    loops: [[p(-60, 0, turn(200)), p(60, 0, turn(-90))]],
    add: [all(m(0), m(1))],
    // Two cones cross in a quartic that the kernel draws within 1e-7 mm; ours agrees with circular-areas.test.ts.
    within: 1e-8,
  },
  {
    name: 'rectangle with one side bulging, one hollow',
    loops: [[p(0, 0), p(160, 0, turn(60)), p(160, 100), p(0, 100, turn(-50))]],
    add: [all(m(0), m(1), m(2), m(3))],
  },
  {
    name: 'keyhole in a rectangle',
    loops: [
      rectangle(-100, -90, 200, 180),
      reversed([p(-10, 0), p(-10, -50), p(10, -50), p(10, 0, turn(300))]),
    ],
    add: [sides],
    // Reversed: the round from west to east, then down, across and up. The slot ends within the round.
    take: [any(w(0), all(w(1), w(2), w(3), south(17)))],
  },
  {
    name: 'polygon with a half-moon hole and a round one',
    loops: [
      [p(0, 0), p(180, -10), p(210, 90), p(90, 150), p(-20, 100)],
      reversed([p(40, 60, turn(170)), p(90, 60)]),
      circle(145, 65, 22, true),
    ],
    add: [all(m(0), m(1), m(2), m(3), m(4))],
    // Reversed: the chord first, from west to east, then the arc.
    take: [all(w(0), w(1)), all(w(0, 2), north(65)), all(w(1, 2), south(65))],
  },
  {
    name: 'side of two arcs that run on into one another',
    loops: [[p(0, 0), p(160, 0), p(160, 90, turn(60)), p(80, 70, turn(-60)), p(0, 50)]],
    add: [
      all(m(0), m(1), m(4), m(2), beyond(80, 70, -Math.cos(TURNOVER), -Math.sin(TURNOVER))),
      all(m(0), m(1), m(4), m(3), beyond(80, 70, Math.cos(TURNOVER), Math.sin(TURNOVER))),
    ],
  },
]
