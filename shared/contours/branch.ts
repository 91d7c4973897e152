import type { ArcSegment, Point, Segment } from '../geometry/types.ts'
import { quadraticRoots } from '../geometry/roots.ts'
import { endTangent, startTangent } from '../geometry/segment.ts'

/**
 * The moving meeting point of two neighbours of which at least one is an arc and which are not tangent.
 * Centres stay where they are, so the point is told in an axis frame fixed to the first circle's centre:
 * `along` the axis and `across` it. For a line the axis is its outward normal, for a second circle the line of
 * centres. The point never changes sides of the axis: where `across` reaches zero the curves have become
 * tangent and no longer meet (a vanishing). Both are kept as changes from the drawing, so that nothing cancels.
 */
export interface Branch {
  /** The circle whose centre is the frame's origin, and whether it belongs to the edge before the corner. */
  readonly centre: Point
  readonly circleIsBefore: boolean
  readonly axis: Point
  readonly along: number
  readonly across: number
  /** Side of the axis, ±1; where the curves are tangent in the drawing, the side to which the corner retreats. */
  readonly side: number
  readonly radius: number
  /** ±1: what an outward offset does to the radius. */
  readonly grow: number
  /** The second circle; null when the other curve is a line. */
  readonly second: { readonly radius: number; readonly grow: number; readonly apart: number } | null
}

export function branchOf(before: Segment, after: Segment): Branch {
  const at = after.from
  const circleIsBefore = before.kind === 'arc'
  const circle = (circleIsBefore ? before : after) as ArcSegment
  const other = circleIsBefore ? after : before
  const fromCentre = { x: at.x - circle.centre.x, y: at.y - circle.centre.y }
  let axis: Point
  let second: Branch['second'] = null
  if (other.kind === 'line') {
    const t = startTangent(other)
    axis = { x: t.y, y: -t.x }
  } else {
    const dx = other.centre.x - circle.centre.x
    const dy = other.centre.y - circle.centre.y
    const apart = Math.hypot(dx, dy)
    axis = apart === 0 ? { x: 1, y: 0 } : { x: dx / apart, y: dy / apart }
    second = { radius: other.radius, grow: Math.sign(other.sweep), apart }
  }
  const along = axis.x * fromCentre.x + axis.y * fromCentre.y
  const across = axis.x * fromCentre.y - axis.y * fromCentre.x
  const back = endTangent(before)
  const retreat = -(axis.x * back.y - axis.y * back.x)
  return {
    centre: circle.centre,
    circleIsBefore,
    axis,
    along,
    across,
    side: across !== 0 ? Math.sign(across) : Math.sign(retreat) || 1,
    radius: circle.radius,
    grow: Math.sign(circle.sweep),
    second,
  }
}

/** The meeting point for offsets of the edges before and after the corner; clamped to the axis where they no longer meet. */
export function branchPoint(branch: Branch, before: number, after: number): Point {
  const { along, square } = branchPlace(branch, before, after)
  const across = branch.side * Math.sqrt(Math.max(0, square))
  const { axis, centre } = branch
  return {
    x: centre.x + axis.x * along - axis.y * across,
    y: centre.y + axis.y * along + axis.x * across,
  }
}

/** Along the axis, and the square of the distance across it (negative: the curves do not meet). */
function branchPlace(
  branch: Branch,
  before: number,
  after: number,
): { readonly along: number; readonly square: number } {
  const [mine, others] = branch.circleIsBefore ? [before, after] : [after, before]
  const dr = branch.grow * mine
  const drSquare = dr * (2 * branch.radius + dr)
  let shift: number
  if (branch.second) {
    const ds = branch.second.grow * others
    shift = (drSquare - ds * (2 * branch.second.radius + ds)) / (2 * branch.second.apart)
  } else {
    shift = others
  }
  const along = branch.along + shift
  const radius = branch.radius + dr
  const shiftSquare = shift * (2 * branch.along + shift)
  // Two forms of radius² − along², told apart by which cancels less: the change from the drawing is steady for
  // small offsets (and keeps a corner that is near tangent), the product where the radius nears its end.
  const changeNoise = branch.across * branch.across + Math.abs(drSquare) + Math.abs(shiftSquare)
  const productNoise = branch.radius * (Math.abs(radius) + Math.abs(along))
  return {
    along,
    square:
      changeNoise <= productNoise
        ? branch.across * branch.across + drSquare - shiftSquare
        : (radius - along) * (radius + along),
  }
}

/** Offset of an edge over a span in which it changes evenly. */
export type OffsetSpan = readonly [from: number, to: number]

/** Where the meeting point goes over a span: its radius between two values, its heading between extremes. */
export interface BranchRange {
  readonly radii: readonly [number, number]
  /** About the centre, radians from the world's x axis, not wrapped; the least and the greatest. */
  readonly headings: readonly [number, number]
}

/**
 * The radius changes evenly. The heading turns one way between its extremes, which are at the ends of the span
 * or, between two circles, where along / radius stands still.
 */
export function branchRange(branch: Branch, before: OffsetSpan, after: OffsetSpan): BranchRange {
  const start = polarAt(branch, before[0], after[0])
  const end = polarAt(branch, before[1], after[1])
  let least = Math.min(start.heading, end.heading)
  let most = Math.max(start.heading, end.heading)
  if (branch.second) {
    // along is quadratic in s: q0 + q1 s + q2 s²; (q / r)' = 0 where q2 r1 s² + 2 q2 r0 s + q1 r0 − q0 r1 = 0.
    const middle = polarAt(branch, (before[0] + before[1]) / 2, (after[0] + after[1]) / 2)
    const q2 = 2 * (start.along - 2 * middle.along + end.along)
    const q1 = end.along - start.along - q2
    const r1 = end.radius - start.radius
    for (const s of quadraticRoots(q2 * r1, 2 * q2 * start.radius, q1 * start.radius - start.along * r1)) {
      if (s <= 0 || s >= 1) continue
      const still = polarAt(
        branch,
        before[0] + s * (before[1] - before[0]),
        after[0] + s * (after[1] - after[0]),
      )
      least = Math.min(least, still.heading)
      most = Math.max(most, still.heading)
    }
  }
  const axisHeading = Math.atan2(branch.axis.y, branch.axis.x)
  return {
    radii: [start.radius, end.radius],
    headings:
      branch.side > 0 ? [axisHeading + least, axisHeading + most] : [axisHeading - most, axisHeading - least],
  }
}

/** How far the meeting point can be, anywhere in the span, from where it is in the middle of it, mm. */
export function branchStray(branch: Branch, before: OffsetSpan, after: OffsetSpan): number {
  const { radii, headings } = branchRange(branch, before, after)
  const widest = Math.max(Math.abs(radii[0]), Math.abs(radii[1]))
  return Math.abs(radii[1] - radii[0]) / 2 + widest * (headings[1] - headings[0])
}

/** Radius and heading from the axis, 0 to π, on the branch's side. */
function polarAt(branch: Branch, before: number, after: number) {
  const { along, square } = branchPlace(branch, before, after)
  const radius = branch.radius + branch.grow * (branch.circleIsBefore ? before : after)
  return { along, radius, heading: Math.atan2(Math.sqrt(Math.max(0, square)), along) }
}
