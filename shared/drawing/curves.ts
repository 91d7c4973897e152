import { segmentFromVertices } from '../geometry/bulge.ts'
import { pointAt, startAngle } from '../geometry/segment.ts'
import type { ArcSegment, Point, Segment } from '../geometry/types.ts'
import { addScaled, norm } from '../geometry/vector.ts'
import { approximate, ellipseCurve, isFlat } from './approximate.ts'
import type { BulgedPoint } from './entities.ts'
import type { PlacedEntity } from './expand.ts'
import { splineCurves } from './spline.ts'
import {
  areCircular,
  compose,
  determinant,
  mapPoint,
  mapVector,
  MIRROR_X,
  type Transform,
} from './transform.ts'

export interface EntityCurves {
  readonly segments: readonly Segment[]
  readonly approximated: 'spline' | 'ellipse' | null
}

const FULL_TURN = 2 * Math.PI

/** An arc that lacks less than this of a full turn is cut in two, so that its bulge stays small. */
const NEARLY_FULL = FULL_TURN - 0.1

/** End angles that differ by less are the same: degrees are written with about ten digits. */
const SAME_ANGLE = 1e-9

/** Lines and arcs of one entity, mm; ellipses, stretched arcs and splines within `tolerance` (mm). */
export function curvesOf({ entity, map: outer }: PlacedEntity, tolerance: number): EntityCurves {
  const mirrored = entity.record.normal === 'down'
  const map = mirrored && hasOwnPlane(entity) ? compose(outer, MIRROR_X) : outer
  switch (entity.type) {
    case 'LINE':
      return exact([{ kind: 'line', from: mapPoint(map, entity.from), to: mapPoint(map, entity.to) }])
    case 'CIRCLE':
      return placeArc(map, { ...entity, start: 0, sweep: FULL_TURN }, tolerance)
    case 'ARC':
      return placeArc(map, { ...entity, sweep: sweepBetween(entity.start, entity.end) }, tolerance)
    case 'POLYLINE':
      return polylineCurves(entity.vertices, entity.closed, map, tolerance)
    case 'ELLIPSE': {
      const side = mirrored ? -entity.ratio : entity.ratio
      const minor = { x: -entity.major.y * side, y: entity.major.x * side }
      const sweep = sweepBetween(entity.start, entity.end)
      return placeEllipse(map, entity.centre, entity.major, minor, entity.start, sweep, tolerance)
    }
    case 'SPLINE': {
      const control = entity.control.map((point) => mapPoint(map, point))
      const fit = entity.fit.map((point) => mapPoint(map, point))
      const curves = splineCurves({ ...entity, control, fit }, entity.record.weights, entity.record.line)
      const straight = entity.control.length > 0 && entity.degree === 1
      return {
        segments: curves.flatMap((curve) => approximate(curve, tolerance)),
        approximated: straight ? null : 'spline',
      }
    }
  }
}

/** Arcs, circles and flat polylines are drawn in the plane of their extrusion; the others in the drawing's. */
export function hasOwnPlane({ type, record }: PlacedEntity['entity']): boolean {
  return type === 'ARC' || type === 'CIRCLE' || (type === 'POLYLINE' && !record.spatial)
}

function exact(segments: Segment[]): EntityCurves {
  return { segments, approximated: null }
}

/** Counter-clockwise from start to end; equal angles mean the whole turn, as the format's readers agree. */
function sweepBetween(start: number, end: number): number {
  const turn = end - start
  const sweep = turn - FULL_TURN * Math.floor(turn / FULL_TURN)
  return sweep < SAME_ANGLE || sweep > FULL_TURN - SAME_ANGLE ? FULL_TURN : sweep
}

interface TurnedArc {
  readonly centre: Point
  readonly radius: number
  readonly start: number
  readonly sweep: number
}

function placeArc(map: Transform, arc: TurnedArc, tolerance: number): EntityCurves {
  const along = { x: arc.radius, y: 0 }
  const across = { x: 0, y: arc.radius }
  return placeEllipse(map, arc.centre, along, across, arc.start, arc.sweep, tolerance)
}

function placeEllipse(
  map: Transform,
  centre: Point,
  u: Point,
  v: Point,
  start: number,
  sweep: number,
  tolerance: number,
): EntityCurves {
  const [c, mu, mv] = [mapPoint(map, centre), mapVector(map, u), mapVector(map, v)]
  if (areCircular(mu, mv)) {
    const turn = mu.x * mv.y - mu.y * mv.x < 0 ? -1 : 1
    const heading = Math.atan2(mu.y, mu.x) + turn * start
    return exact(circularArc(c, norm(mu), heading, turn * sweep))
  }
  if (isFlat(mu, mv)) return exact([])
  const curve = ellipseCurve(c, mu, mv, start, start + sweep)
  return {
    segments: quarters(curve.start, curve.end).flatMap(([from, to]) => {
      const piece = { ...curve, start: from, end: to }
      return approximate(piece, tolerance)
    }),
    approximated: 'ellipse',
  }
}

/** An ellipse is divided where it crosses its own radii first: symmetric pieces come out alike. */
function quarters(start: number, end: number): (readonly [number, number])[] {
  const cuts = [start]
  const quarter = Math.PI / 2
  for (let t = quarter * (Math.floor(start / quarter) + 1); t < end - SAME_ANGLE; t += quarter) {
    if (t > start + SAME_ANGLE) cuts.push(t)
  }
  cuts.push(end)
  return cuts.slice(1).map((to, i) => [cuts[i] ?? start, to])
}

/** One arc, or two halves where it is all but a full turn; the halves meet exactly. */
function circularArc(centre: Point, radius: number, heading: number, sweep: number): Segment[] {
  if (!(radius > 0)) return []
  const at = (angle: number): Point => addScaled(centre, directionOf(angle), radius)
  const full = Math.abs(sweep) === FULL_TURN
  const from = at(heading)
  const to = full ? from : at(heading + sweep)
  if (Math.abs(sweep) < NEARLY_FULL) return [{ kind: 'arc', from, to, centre, radius, sweep }]
  const half = at(heading + sweep / 2)
  return [
    { kind: 'arc', from, to: half, centre, radius, sweep: sweep / 2 },
    { kind: 'arc', from: half, to, centre, radius, sweep: sweep / 2 },
  ]
}

/** Unit vector; exact at quarter turns, where most arcs of real parts end. */
function directionOf(angle: number): Point {
  const quarters = angle / (Math.PI / 2)
  const near = Math.round(quarters)
  if (Math.abs(quarters - near) > 1e-13 * Math.max(1, Math.abs(near))) {
    return { x: Math.cos(angle), y: Math.sin(angle) }
  }
  const turn = ((near % 4) + 4) % 4
  return { x: turn === 0 ? 1 : turn === 2 ? -1 : 0, y: turn === 1 ? 1 : turn === 3 ? -1 : 0 }
}

function polylineCurves(
  vertices: readonly BulgedPoint[],
  closed: boolean,
  map: Transform,
  tolerance: number,
): EntityCurves {
  const edges = closed ? vertices.length : vertices.length - 1
  const segments: Segment[] = []
  let stretched = false
  for (let i = 0; i < edges; i++) {
    const [from, to] = [vertices[i], vertices[(i + 1) % vertices.length]]
    if (!from || !to) continue
    const edge = placeSegment(map, segmentFromVertices(from, to), tolerance)
    stretched ||= edge.approximated !== null
    segments.push(...edge.segments)
  }
  return { segments, approximated: stretched ? 'ellipse' : null }
}

function placeSegment(map: Transform, segment: Segment, tolerance: number): EntityCurves {
  const [from, to] = [mapPoint(map, segment.from), mapPoint(map, segment.to)]
  if (segment.kind === 'line') return exact([{ kind: 'line', from, to }])
  const u = mapVector(map, { x: 1, y: 0 })
  const v = mapVector(map, { x: 0, y: 1 })
  if (!areCircular(u, v)) return placeArc(map, { ...segment, start: startAngle(segment) }, tolerance)
  const sweep = determinant(map) < 0 ? -segment.sweep : segment.sweep
  const arc: ArcSegment = {
    kind: 'arc',
    from,
    to,
    centre: mapPoint(map, segment.centre),
    radius: segment.radius * norm(u),
    sweep,
  }
  if (Math.abs(sweep) < NEARLY_FULL) return exact([arc])
  const half = pointAt(arc, 0.5)
  return exact([
    { ...arc, to: half, sweep: sweep / 2 },
    { ...arc, from: half, sweep: sweep / 2 },
  ])
}
