import { capFactor } from '../geometry/loop.ts'
import { segmentFromVertices } from '../geometry/bulge.ts'
import type { ArcSegment, Point, Segment } from '../geometry/types.ts'

/**
 * The contour of an arc whose wall blends: about the arc's centre, with a radius that goes evenly with the heading
 * from one corner to the other (a spiral of Archimedes).
 */
export interface Spiral {
  readonly centre: Point
  /** Its ends, as the corners are placed. */
  readonly from: Point
  readonly to: Point
  readonly fromRadius: number
  readonly toRadius: number
  /** Signed, radians, as of an arc. */
  readonly sweep: number
}

/** The point at a share of the sweep, 0 at the start to 1 at the end; the ends are given back exactly. */
export function spiralPoint({ centre, from, to, fromRadius, toRadius, sweep }: Spiral, share: number): Point {
  if (share === 0) return from
  if (share === 1) return to
  const heading = Math.atan2(from.y - centre.y, from.x - centre.x) + share * sweep
  const radius = fromRadius + share * (toRadius - fromRadius)
  return { x: centre.x + radius * Math.cos(heading), y: centre.y + radius * Math.sin(heading) }
}

/**
 * Twice the area between the spiral and its chord, exact: sweep·(r₀² + r₀r₁ + r₁²)/3 for the sector (twice ½∫r²dθ,
 * derived) less r₀r₁ sin(sweep) for the triangle, written so that nothing cancels on flat arcs.
 */
export function twiceSpiralCap(fromRadius: number, toRadius: number, sweep: number): number {
  const change = toRadius - fromRadius
  return fromRadius * toRadius * capFactor(sweep) + (sweep * change * change) / 3
}

/** Halvings at most: 2^12 arcs for one edge are more than any drawing needs. */
const MOST_HALVINGS = 12

/**
 * Arcs, end to end, that keep within `tolerance` (mm) of the spiral. Each goes through the spiral's points at its
 * ends and its middle. What is left is then a cubic with zeros there, greatest at ±1/√3 of the half (derived); it is
 * looked at just there, and halved until it is small enough everywhere.
 */
export function spiralArcs(spiral: Spiral, tolerance: number): Segment[] {
  let arcs: Segment[] = []
  for (let halvings = 0; halvings <= MOST_HALVINGS; halvings++) {
    const count = 2 ** halvings
    arcs = Array.from({ length: count }, (_, i) =>
      arcThrough(
        spiralPoint(spiral, i / count),
        spiralPoint(spiral, (i + 0.5) / count),
        spiralPoint(spiral, (i + 1) / count),
      ),
    )
    const worst = arcs.reduce(
      (most, arc, i) =>
        GREATEST.reduce(
          (sofar, s) => Math.max(sofar, distanceTo(arc, spiralPoint(spiral, (i + s) / count))),
          most,
        ),
      0,
    )
    if (worst <= tolerance) break
  }
  return arcs
}

const GREATEST = [(1 - 1 / Math.sqrt(3)) / 2, (1 + 1 / Math.sqrt(3)) / 2]

/** The circle's arc from a through m to b; nearly straight ones become lines. The turn at m is half the sweep (inscribed angle). */
function arcThrough(a: Point, m: Point, b: Point): Segment {
  const [ux, uy, vx, vy] = [m.x - a.x, m.y - a.y, b.x - m.x, b.y - m.y]
  const turn = Math.atan2(ux * vy - uy * vx, ux * vx + uy * vy)
  return segmentFromVertices({ x: a.x, y: a.y, bulge: Math.tan(turn / 2) }, b)
}

function distanceTo(segment: Segment, at: Point): number {
  return segment.kind === 'arc' ? offCircle(segment, at) : offLine(segment, at)
}

function offCircle({ centre, radius }: ArcSegment, { x, y }: Point): number {
  return Math.abs(Math.hypot(x - centre.x, y - centre.y) - radius)
}

function offLine({ from, to }: Segment, { x, y }: Point): number {
  const [dx, dy] = [to.x - from.x, to.y - from.y]
  const length = Math.hypot(dx, dy)
  return length > 0
    ? Math.abs((x - from.x) * dy - (y - from.y) * dx) / length
    : Math.hypot(x - from.x, y - from.y)
}
