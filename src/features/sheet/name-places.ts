import type { EdgeRef } from '../../../shared/walls/types.ts'
import { edgeName } from '../../../shared/walls/names.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import { pointAt, segmentLength } from '../../../shared/geometry/segment.ts'
import type { Point, Segment, VertexLoop } from '../../../shared/geometry/types.ts'
import { distance } from '../../../shared/geometry/vector.ts'

/** Where the names of edges stand on the outline. Paper millimetres, y down. */
export interface NamePlace extends EdgeRef {
  readonly name: string
  /** Centre of the text. */
  readonly at: Point
}

export interface NameOptions {
  /** From part to paper. */
  readonly toPaper: (point: Point) => Point
  readonly width: number
  readonly height: number
  /** Height of the letters; 0.6 of it wide each. */
  readonly font: number
  /** Other lines of the picture that names keep clear of. */
  readonly avoid: readonly VertexLoop[]
  /** Edges that must be named first: those with a prep. */
  readonly first: (edge: EdgeRef) => boolean
}

interface Box {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

/** Paper distance between the points that stand for an outline when names look for free room. */
const SAMPLE = 1.5
const MOST_SAMPLES = 400
/** More edges than this and only those with a prep are named. */
const MOST_NAMES = 300

/**
 * Names at the middle of their edges, outside the material if there is room, else inside. A name that would
 * touch another name, a line or the picture's rim is left off: the table has every edge.
 */
export function placeNames(loops: readonly VertexLoop[], options: NameOptions): NamePlace[] {
  const edges = loops.flatMap((loop, index) =>
    loopFromVertices(loop).map((segment, edge) => ({
      loop: index,
      edge,
      points: samplePoints(segment, options.toPaper),
    })),
  )
  const others = options.avoid.flatMap((loop) =>
    loopFromVertices(loop).flatMap((segment) => samplePoints(segment, options.toPaper)),
  )
  const lines = [...edges.flatMap(({ points }) => points), ...others]
  const placed: NamePlace[] = []
  const taken: Box[] = []
  const wanted = [...edges.filter(options.first), ...edges.filter((edge) => !options.first(edge))]
  for (const edge of wanted.length > MOST_NAMES ? edges.filter(options.first) : wanted) {
    const name = edgeName(edge)
    const size = { width: name.length * options.font * 0.6 + 0.8, height: options.font * 1.1 }
    for (const at of candidates(edge.points, size)) {
      const box = { x: at.x - size.width / 2, y: at.y - size.height / 2, ...size }
      const inside =
        box.x >= 0 && box.y >= 0 && box.x + box.width <= options.width && box.y + box.height <= options.height
      if (!inside || taken.some((other) => meet(box, other)) || lines.some((point) => holds(box, point)))
        continue
      taken.push(box)
      placed.push({ loop: edge.loop, edge: edge.edge, name, at })
      break
    }
  }
  return placed
}

/** Either side of the middle of the edge, just clear of it. */
function candidates(
  points: readonly Point[],
  size: { readonly width: number; readonly height: number },
): Point[] {
  const i = Math.floor(points.length / 2)
  const middle = points[i]!
  const [a, b] = [points[Math.max(0, i - 1)]!, points[Math.min(points.length - 1, i + 1)]!]
  const length = Math.hypot(b.x - a.x, b.y - a.y)
  if (length === 0) return []
  // Right of travel is the waste; with y down that is (−dy, dx).
  const n = { x: -(b.y - a.y) / length, y: (b.x - a.x) / length }
  const clear = (Math.abs(n.x) * size.width + Math.abs(n.y) * size.height) / 2 + 0.8
  return [1, -1, 2.2, -2.2].map((times) => ({
    x: middle.x + n.x * clear * times,
    y: middle.y + n.y * clear * times,
  }))
}

function samplePoints(segment: Segment, toPaper: (point: Point) => Point): Point[] {
  const [a, b] = [toPaper(segment.from), toPaper(segment.to)]
  // Paper length of the segment: its own length times the scale of a millimetre on paper.
  const unit = distance(toPaper({ x: 0, y: 0 }), toPaper({ x: 1, y: 0 }))
  const length = Math.max(distance(a, b), segmentLength(segment) * unit)
  const steps = Math.min(MOST_SAMPLES, 2 * Math.max(1, Math.ceil(length / SAMPLE / 2)))
  return Array.from({ length: steps + 1 }, (_, i) => toPaper(pointAt(segment, i / steps)))
}

function meet(a: Box, b: Box): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height
}

function holds(box: Box, { x, y }: Point): boolean {
  return x > box.x && x < box.x + box.width && y > box.y && y < box.y + box.height
}
