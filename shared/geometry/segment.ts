import type { ArcSegment, Bounds, Point, Segment } from './types.ts'
import { distance, unit } from './vector.ts'

/** Measures of one segment. Tangents point along travel; normals point right, out of the material. */

export function segmentLength(segment: Segment): number {
  return segment.kind === 'line'
    ? distance(segment.from, segment.to)
    : segment.radius * Math.abs(segment.sweep)
}

export function startTangent(segment: Segment): Point {
  return segment.kind === 'line' ? lineDirection(segment) : arcTangent(segment, segment.from)
}

export function endTangent(segment: Segment): Point {
  return segment.kind === 'line' ? lineDirection(segment) : arcTangent(segment, segment.to)
}

/** Outward unit normal at a fraction of the segment's length, 0 at its start to 1 at its end. */
export function normalAt(segment: Segment, fraction: number): Point {
  const t = segment.kind === 'line' ? lineDirection(segment) : arcTangent(segment, pointAt(segment, fraction))
  return { x: t.y, y: -t.x }
}

/** Point at a fraction of the segment's length; the ends are returned exactly. */
export function pointAt(segment: Segment, fraction: number): Point {
  const { from, to } = segment
  if (fraction === 0) return from
  if (fraction === 1) return to
  if (segment.kind === 'line') {
    return { x: from.x + fraction * (to.x - from.x), y: from.y + fraction * (to.y - from.y) }
  }
  const angle = startAngle(segment) + fraction * segment.sweep
  return {
    x: segment.centre.x + segment.radius * Math.cos(angle),
    y: segment.centre.y + segment.radius * Math.sin(angle),
  }
}

/** Heading from the centre to the arc's start, radians. */
export function startAngle(arc: ArcSegment): number {
  return Math.atan2(arc.from.y - arc.centre.y, arc.from.x - arc.centre.x)
}

/**
 * How far round the arc a heading lies, as a fraction of the sweep: 0 at the start, 1 at the end, above 1
 * beyond the end. Headings just short of the start come out as just under 2π / |sweep|.
 */
export function arcFraction(arc: ArcSegment, heading: number): number {
  const turn = arc.sweep > 0 ? heading - startAngle(arc) : startAngle(arc) - heading
  const full = 2 * Math.PI
  return (turn - full * Math.floor(turn / full)) / Math.abs(arc.sweep)
}

export function reverseSegment(segment: Segment): Segment {
  return segment.kind === 'line'
    ? { kind: 'line', from: segment.to, to: segment.from }
    : { ...segment, from: segment.to, to: segment.from, sweep: -segment.sweep }
}

/** Smallest box that holds the segment; an arc's quadrant points are counted. */
export function segmentBounds(segment: Segment): Bounds {
  const { from, to } = segment
  let minX = Math.min(from.x, to.x)
  let maxX = Math.max(from.x, to.x)
  let minY = Math.min(from.y, to.y)
  let maxY = Math.max(from.y, to.y)
  if (segment.kind === 'arc') {
    const { centre, radius } = segment
    if (arcFraction(segment, 0) < 1) maxX = Math.max(maxX, centre.x + radius)
    if (arcFraction(segment, Math.PI / 2) < 1) maxY = Math.max(maxY, centre.y + radius)
    if (arcFraction(segment, Math.PI) < 1) minX = Math.min(minX, centre.x - radius)
    if (arcFraction(segment, -Math.PI / 2) < 1) minY = Math.min(minY, centre.y - radius)
  }
  return { minX, minY, maxX, maxY }
}

function lineDirection({ from, to }: Segment): Point {
  return unit({ x: to.x - from.x, y: to.y - from.y })
}

function arcTangent({ centre, sweep }: ArcSegment, at: Point): Point {
  const radial = unit({ x: at.x - centre.x, y: at.y - centre.y })
  return sweep > 0 ? { x: -radial.y, y: radial.x } : { x: radial.y, y: -radial.x }
}
