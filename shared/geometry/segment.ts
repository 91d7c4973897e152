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
  const ends = {
    minX: Math.min(from.x, to.x),
    maxX: Math.max(from.x, to.x),
    minY: Math.min(from.y, to.y),
    maxY: Math.max(from.y, to.y),
  }
  if (segment.kind === 'line') return ends
  return withQuadrants(ends, segment.centre, segment.radius, startAngle(segment), segment.sweep)
}

/** Smallest box that holds an arc told by its angles, radians. */
export function arcBounds(centre: Point, radius: number, start: number, sweep: number): Bounds {
  const ax = centre.x + radius * Math.cos(start)
  const ay = centre.y + radius * Math.sin(start)
  const bx = centre.x + radius * Math.cos(start + sweep)
  const by = centre.y + radius * Math.sin(start + sweep)
  const ends = {
    minX: Math.min(ax, bx),
    maxX: Math.max(ax, bx),
    minY: Math.min(ay, by),
    maxY: Math.max(ay, by),
  }
  return withQuadrants(ends, centre, radius, start, sweep)
}

function withQuadrants(ends: Bounds, centre: Point, radius: number, start: number, sweep: number): Bounds {
  const passes = (quarter: number) => {
    const turn = sweep > 0 ? quarter - start : start - quarter
    return turn - 2 * Math.PI * Math.floor(turn / (2 * Math.PI)) < Math.abs(sweep)
  }
  return {
    minX: passes(Math.PI) ? Math.min(ends.minX, centre.x - radius) : ends.minX,
    minY: passes(-Math.PI / 2) ? Math.min(ends.minY, centre.y - radius) : ends.minY,
    maxX: passes(0) ? Math.max(ends.maxX, centre.x + radius) : ends.maxX,
    maxY: passes(Math.PI / 2) ? Math.max(ends.maxY, centre.y + radius) : ends.maxY,
  }
}

function lineDirection({ from, to }: Segment): Point {
  const x = to.x - from.x
  const y = to.y - from.y
  const length = Math.sqrt(x * x + y * y)
  return length === 0 ? { x, y } : { x: x / length, y: y / length }
}

function arcTangent({ centre, sweep }: ArcSegment, at: Point): Point {
  const radial = unit({ x: at.x - centre.x, y: at.y - centre.y })
  return sweep > 0 ? { x: -radial.y, y: radial.x } : { x: radial.y, y: -radial.x }
}
