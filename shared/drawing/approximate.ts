import { segmentFromVertices } from '../geometry/bulge.ts'
import { distanceToSegment } from '../geometry/inside.ts'
import type { Point, Segment } from '../geometry/types.ts'
import {
  addScaled,
  cross,
  distance,
  dot,
  middle,
  norm,
  scale,
  subtract,
  turnBetween,
  unit,
} from '../geometry/vector.ts'
import { DrawingError } from './errors.ts'
import { MAX_PIECES } from './limits.ts'

/** A smooth curve over a range of its parameter. */
export interface Curve {
  readonly start: number
  readonly end: number
  point(t: number): Point
  /** Derivative; zero where the curve stands still. */
  velocity(t: number): Point
}

/** Places between the ends at which a piece is compared with the curve. */
const CHECKS = 9

/** Share of the tolerance that a piece may use at the places checked; the rest covers what lies between them. */
const SAFETY = 0.8

/** A piece that departs from its chord by less than this share of its length is a straight line. */
const STRAIGHT = 1e-10

/** Halvings of one curve; a piece is then a four-millionth of it. */
const MAX_HALVINGS = 22

/**
 * Pairs of tangent arcs (biarcs) that stay within `tolerance` of the curve and meet it in point and direction
 * at their ends. Straight pieces become lines. Ends are exactly the curve's own.
 */
export function approximate(curve: Curve, tolerance: number): Segment[] {
  const out: Segment[] = []
  const ends = (t: number, side: 1 | -1) => ({ t, at: curve.point(t), along: directionAt(curve, t, side) })
  const divide = (from: End, to: End, halvings: number) => {
    const pieces = pieceFor(curve, from, to, tolerance, halvings >= MAX_HALVINGS)
    if (pieces) {
      out.push(...pieces)
      if (out.length > MAX_PIECES) throw tooMany()
      return
    }
    const half = (from.t + to.t) / 2
    divide(from, ends(half, -1), halvings + 1)
    divide(ends(half, 1), to, halvings + 1)
  }
  divide(ends(curve.start, 1), ends(curve.end, -1), 0)
  return out
}

interface End {
  readonly t: number
  readonly at: Point
  readonly along: Point
}

function pieceFor(curve: Curve, from: End, to: End, tolerance: number, last: boolean): Segment[] | null {
  const samples = Array.from({ length: CHECKS }, (_, i) =>
    curve.point(from.t + ((i + 1) / (CHECKS + 1)) * (to.t - from.t)),
  )
  const chord: Segment = { kind: 'line', from: from.at, to: to.at }
  const bow = Math.max(...samples.map((sample) => distanceToSegment(chord, sample)))
  if (last || bow <= STRAIGHT * distance(from.at, to.at)) return [chord]
  const arcs = biarc(from, to)
  if (!arcs) return null
  const within = samples.every(
    (sample) => Math.min(...arcs.map((arc) => distanceToSegment(arc, sample))) <= SAFETY * tolerance,
  )
  return within ? arcs : null
}

/** Half a turn of one arc: beyond a quarter the piece is better halved. */
const WIDEST_HALF_SWEEP = Math.PI / 4

/**
 * Two arcs, each tangent at its end, that meet halfway between equal tangent lengths (derived from the
 * condition that the joint's tangent is the line between the two tangent ends). Null when they turn too far.
 */
function biarc(from: End, to: End): Segment[] | null {
  const span = subtract(to.at, from.at)
  const sum = { x: from.along.x + to.along.x, y: from.along.y + to.along.y }
  const reach = tangentLength(dot(span, span), dot(span, sum), 2 * (1 - dot(from.along, to.along)))
  if (reach === null) return null
  const joint = middle(addScaled(from.at, from.along, reach), addScaled(to.at, to.along, -reach))
  const first = turnBetween(from.along, subtract(joint, from.at))
  const second = turnBetween(subtract(to.at, joint), to.along)
  if (!(Math.abs(first) <= WIDEST_HALF_SWEEP && Math.abs(second) <= WIDEST_HALF_SWEEP)) return null
  const arcs = [
    segmentFromVertices({ ...from.at, bulge: Math.tan(first / 2) }, joint),
    segmentFromVertices({ ...joint, bulge: Math.tan(second / 2) }, to.at),
  ]
  return isOneArc(arcs)
    ? [segmentFromVertices({ ...from.at, bulge: Math.tan((first + second) / 2) }, to.at)]
    : arcs
}

/** Positive root d of |span|² = 2d·(span·sum) + d²·spread; null when there is none. */
function tangentLength(square: number, along: number, spread: number): number | null {
  const root = Math.sqrt(along * along + spread * square)
  const length = square / (along + root)
  return Number.isFinite(length) && length > 0 ? length : null
}

/** Relative difference of radii under which both arcs of a pair are one. */
const SAME_RADIUS = 1e-9

function isOneArc([first, second]: Segment[]): boolean {
  if (first?.kind !== 'arc' || second?.kind !== 'arc') return false
  const slack = SAME_RADIUS * first.radius
  return (
    first.sweep > 0 === second.sweep > 0 &&
    Math.abs(first.radius - second.radius) <= slack &&
    distance(first.centre, second.centre) <= slack
  )
}

/** Share of the range stepped aside where the curve stands still (coincident control points). */
const STEP_ASIDE = 1e-5

/** A velocity below this share of the mean one beside it is taken for a standstill. */
const STANDING_STILL = 1e-3

/** Unit direction of travel at t, where the range may run backwards; `side` says on which side the curve goes on. */
function directionAt(curve: Curve, t: number, side: 1 | -1): Point {
  const velocity = curve.velocity(t)
  const range = curve.end - curve.start
  const step = subtract(curve.point(t + side * STEP_ASIDE * range), curve.point(t))
  const expected = norm(step) / (STEP_ASIDE * Math.abs(range))
  if (norm(velocity) > STANDING_STILL * expected) return unit(scale(velocity, Math.sign(range)))
  return unit(scale(step, side))
}

/** Ellipse through conjugate radii: centre + u·cos t + v·sin t. */
export function ellipseCurve(centre: Point, u: Point, v: Point, start: number, end: number): Curve {
  return {
    start,
    end,
    point: (t) => ({
      x: centre.x + u.x * Math.cos(t) + v.x * Math.sin(t),
      y: centre.y + u.y * Math.cos(t) + v.y * Math.sin(t),
    }),
    velocity: (t) => ({
      x: v.x * Math.cos(t) - u.x * Math.sin(t),
      y: v.y * Math.cos(t) - u.y * Math.sin(t),
    }),
  }
}

/** True when the radii lie on one line: the ellipse is drawn edge on and encloses nothing. */
export function isFlat(u: Point, v: Point): boolean {
  return Math.abs(cross(u, v)) <= STRAIGHT * (dot(u, u) + dot(v, v))
}

function tooMany(): DrawingError {
  return new DrawingError(
    'drawing-too-many-entities',
    'A curve needs too many arcs at this tolerance. Choose a larger arc tolerance.',
  )
}
