import { distanceToSegment } from './inside.ts'
import { quadraticRoots } from './roots.ts'
import type { ArcSegment, LineSegment, Point, Segment } from './types.ts'

/** A point that two segments share, or that lies within `within` mm of both; null when they keep apart. */
export function commonPoint(a: Segment, b: Segment, within: number): Point | null {
  if (a.kind === 'line' && b.kind === 'line') {
    const crossing = lineCrossing(a, b)
    if (crossing) return crossing
  } else {
    const crossing = crossings(a, b).find((point) => onBoth(a, b, point, within))
    if (crossing) return crossing
  }
  return (
    [b.from, b.to].find((end) => distanceToSegment(a, end) <= within) ??
    [a.from, a.to].find((end) => distanceToSegment(b, end) <= within) ??
    null
  )
}

/**
 * The same for b following a: a point other than the corner between them (and, in a loop of two edges, the
 * other corner). Near a tangent corner two curves cannot be told apart as far as the sliver between them is
 * thinner than `within`, so crossings as near as that to a corner are the corner.
 */
export function commonPointBesideCorner(
  a: Segment,
  b: Segment,
  closed: boolean,
  within: number,
): Point | null {
  if (a.kind === 'line' && b.kind === 'line') return foldBack(a, b, within)
  const radius = Math.max(a.kind === 'arc' ? a.radius : 0, b.kind === 'arc' ? b.radius : 0)
  const sliver = Math.sqrt(8 * radius * within)
  const corners = closed ? [b.from, a.from] : [b.from]
  const apart = (point: Point) => corners.every((c) => Math.hypot(point.x - c.x, point.y - c.y) > sliver)
  const crossing = crossings(a, b).find((point) => apart(point) && onBoth(a, b, point, within))
  if (crossing) return crossing
  if (closed) return null
  if (distanceToSegment(a, b.to) <= within) return b.to
  return distanceToSegment(b, a.from) <= within ? a.from : null
}

function foldBack(a: LineSegment, b: LineSegment, within: number): Point | null {
  const ux = a.to.x - a.from.x
  const uy = a.to.y - a.from.y
  const vx = b.to.x - b.from.x
  const vy = b.to.y - b.from.y
  if (ux * vx + uy * vy >= 0) return null
  const shorter = ux * ux + uy * uy < vx * vx + vy * vy
  const [tip, along] = shorter ? [a.from, b] : [b.to, a]
  return distanceToSegment(along, tip) <= within ? tip : null
}

/** Where two lines properly cross; null for parallels. */
function lineCrossing(a: LineSegment, b: LineSegment): Point | null {
  const ux = a.to.x - a.from.x
  const uy = a.to.y - a.from.y
  const vx = b.to.x - b.from.x
  const vy = b.to.y - b.from.y
  const wx = b.from.x - a.from.x
  const wy = b.from.y - a.from.y
  const det = ux * vy - uy * vx
  const s = (wx * vy - wy * vx) / det
  const t = (wx * uy - wy * ux) / det
  return s >= 0 && s <= 1 && t >= 0 && t <= 1 ? { x: a.from.x + s * ux, y: a.from.y + s * uy } : null
}

function onBoth(a: Segment, b: Segment, point: Point, within: number): boolean {
  return distanceToSegment(a, point) <= within && distanceToSegment(b, point) <= within
}

/** Points that the whole line or circle of an arc and of another segment share, at most two. */
function crossings(a: Segment, b: Segment): Point[] {
  if (a.kind === 'arc') return b.kind === 'arc' ? circleCircle(a, b) : circleLine(a, b)
  return b.kind === 'arc' ? circleLine(b, a) : []
}

function circleLine({ centre, radius }: ArcSegment, { from, to }: Segment): Point[] {
  const ux = to.x - from.x
  const uy = to.y - from.y
  const wx = from.x - centre.x
  const wy = from.y - centre.y
  const far = Math.hypot(wx, wy)
  const roots = quadraticRoots(ux * ux + uy * uy, 2 * (wx * ux + wy * uy), (far - radius) * (far + radius))
  return roots.map((t) => ({ x: from.x + t * ux, y: from.y + t * uy }))
}

function circleCircle(a: ArcSegment, b: ArcSegment): Point[] {
  const dx = b.centre.x - a.centre.x
  const dy = b.centre.y - a.centre.y
  const apart = Math.hypot(dx, dy)
  if (apart === 0) return []
  const along = (apart + ((a.radius - b.radius) * (a.radius + b.radius)) / apart) / 2
  const square = (a.radius - along) * (a.radius + along)
  if (square < 0) return []
  const across = Math.sqrt(square)
  const [ex, ey] = [dx / apart, dy / apart]
  return [across, -across].map((h) => ({
    x: a.centre.x + ex * along - ey * h,
    y: a.centre.y + ey * along + ex * h,
  }))
}
