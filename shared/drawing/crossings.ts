import { arcFraction, segmentBounds } from '../geometry/segment.ts'
import { quadraticRoots } from '../geometry/roots.ts'
import type { ArcSegment, LineSegment, Loop, Point, Segment } from '../geometry/types.ts'
import { addScaled, cross, distance, dot, leftOf, norm, subtract, unit } from '../geometry/vector.ts'
import { BoxTree } from './box-tree.ts'
import { DrawingError } from './errors.ts'
import type { NoticeBook } from './notices.ts'

/** Pairs of edges that may be compared; a sound outline needs a few for each of its edges. */
const MAX_PAIRS = 1_000_000

/**
 * Notes every place where edges of closed loops cross or touch other than at the corner they share, and where
 * lines lie on one another. `slack` (mm) is how near counts as touching.
 *
 * @throws DrawingError drawing-too-slow when edges lie on one another in heaps
 */
export function noteCrossings(loops: readonly Loop[], slack: number, notices: NoticeBook): void {
  const edges = loops.flatMap((loop, l) => loop.map((segment, i) => ({ segment, l, i, n: loop.length })))
  const boxes = edges.map(({ segment }) => segmentBounds(segment))
  const tree = new BoxTree(boxes)
  let pairs = 0
  edges.forEach((a, index) => {
    const box = boxes[index]
    if (!box) return
    tree.visit(box, (other) => {
      const b = edges[other]
      if (!b || other <= index) return
      if (++pairs > MAX_PAIRS) throw tooSlow()
      if (onOneSide(a.segment, b.segment, slack) || onOneSide(b.segment, a.segment, slack)) return
      const shared = a.l === b.l ? sharedCorners(a, b) : []
      const overlap = overlapMiddle(a.segment, b.segment, slack)
      if (overlap) notices.note('lines-overlap', overlap)
      for (const place of meetings(a.segment, b.segment, slack)) {
        if (!shared.some((corner) => distance(corner, place) <= 2 * slack))
          notices.note('loop-crosses', place)
      }
    })
  })
}

interface LoopEdge {
  readonly segment: Segment
  readonly l: number
  readonly i: number
  readonly n: number
}

/** True when the second lies wholly beyond the slack on one side of the first: most pairs end here. Lines only. */
function onOneSide(a: Segment, b: Segment, slack: number): boolean {
  if (a.kind !== 'line' || b.kind !== 'line') return false
  const [ux, uy] = [a.to.x - a.from.x, a.to.y - a.from.y]
  const from = ux * (b.from.y - a.from.y) - uy * (b.from.x - a.from.x)
  const to = ux * (b.to.y - a.from.y) - uy * (b.to.x - a.from.x)
  return from > 0 === to > 0 && Math.min(Math.abs(from), Math.abs(to)) > slack * Math.hypot(ux, uy)
}

function sharedCorners(a: LoopEdge, b: LoopEdge): Point[] {
  const corners: Point[] = []
  if ((a.i + 1) % a.n === b.i) corners.push(b.segment.from)
  if ((b.i + 1) % b.n === a.i) corners.push(a.segment.from)
  return corners
}

/** Middle of the stretch that two lines share, when it is longer than the slack. */
function overlapMiddle(a: Segment, b: Segment, slack: number): Point | null {
  if (a.kind !== 'line' || b.kind !== 'line') return null
  const along = unit(subtract(a.to, a.from))
  const off = (point: Point) => Math.abs(cross(along, subtract(point, a.from)))
  if (off(b.from) > slack || off(b.to) > slack) return null
  const place = (point: Point) => dot(along, subtract(point, a.from))
  const low = Math.max(0, Math.min(place(b.from), place(b.to)))
  const high = Math.min(place(a.to), Math.max(place(b.from), place(b.to)))
  return high - low > 2 * slack ? addScaled(a.from, along, (low + high) / 2) : null
}

/** Points that both segments pass within the slack; none for lines that run parallel or arcs of one circle. */
function meetings(a: Segment, b: Segment, slack: number): Point[] {
  const candidates =
    a.kind === 'line'
      ? b.kind === 'line'
        ? lineWithLine(a, b)
        : lineWithArc(a, b)
      : b.kind === 'line'
        ? lineWithArc(b, a)
        : arcWithArc(a, b)
  return candidates.filter((point) => isOn(a, point, slack) && isOn(b, point, slack))
}

function isOn(segment: Segment, point: Point, slack: number): boolean {
  if (distance(segment.from, point) <= slack || distance(segment.to, point) <= slack) return true
  if (segment.kind === 'arc') {
    const { centre } = segment
    return arcFraction(segment, Math.atan2(point.y - centre.y, point.x - centre.x)) <= 1
  }
  const span = subtract(segment.to, segment.from)
  const along = dot(subtract(point, segment.from), span)
  return along >= 0 && along <= dot(span, span)
}

/** Sine of the angle under which lines count as parallel: their meeting point is then rounding. */
const PARALLEL = 1e-12

function lineWithLine(a: LineSegment, b: LineSegment): Point[] {
  const [u, v] = [subtract(a.to, a.from), subtract(b.to, b.from)]
  const area = cross(u, v)
  if (Math.abs(area) <= PARALLEL * norm(u) * norm(v)) return []
  return [addScaled(a.from, u, cross(subtract(b.from, a.from), v) / area)]
}

function lineWithArc(line: LineSegment, arc: ArcSegment): Point[] {
  const along = subtract(line.to, line.from)
  const from = subtract(line.from, arc.centre)
  return quadraticRoots(
    dot(along, along),
    2 * dot(along, from),
    dot(from, from) - arc.radius * arc.radius,
  ).map((t) => addScaled(line.from, along, t))
}

function arcWithArc(a: ArcSegment, b: ArcSegment): Point[] {
  const between = subtract(b.centre, a.centre)
  const apart = norm(between)
  if (apart === 0) return []
  const along = (apart * apart + a.radius * a.radius - b.radius * b.radius) / (2 * apart)
  const square = a.radius * a.radius - along * along
  if (square < 0) return []
  const foot = addScaled(a.centre, between, along / apart)
  const side = leftOf(unit(between))
  const rise = Math.sqrt(square)
  return rise === 0 ? [foot] : [addScaled(foot, side, rise), addScaled(foot, side, -rise)]
}

function tooSlow(): DrawingError {
  return new DrawingError(
    'drawing-too-slow',
    'Too many edges lie on one another. Leave out the layers that draw no outline.',
  )
}
