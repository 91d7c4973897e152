import { segmentLength } from '../geometry/segment.ts'
import type { Point } from '../geometry/types.ts'
import { distance, middle } from '../geometry/vector.ts'
import type { Chain, DrawnSegment, Edge } from './chain.ts'
import { dropDuplicates } from './duplicates.ts'
import { DrawingError } from './errors.ts'
import type { NoticeBook } from './notices.ts'
import { PointGrid } from './point-grid.ts'
import { placed, walkEdges } from './walk.ts'

export interface LinkTolerances {
  /** Ends nearer than this are one point; rounding in the file, never reported. mm */
  readonly coincident: number
  /** Loose ends nearer than this are brought together, and reported. mm */
  readonly join: number
}

/**
 * Joins segments end to end. Ends that coincide become one point. An entity that closes by itself (a circle, a
 * closed polyline) is a chain of its own, whatever touches it. Of the others only ends that are still loose are
 * brought together, nearest first, so that fine detail smaller than the gap allowed is never pulled together.
 *
 * @throws DrawingError drawing-too-slow
 */
export function linkSegments(
  drawn: readonly DrawnSegment[],
  tolerances: LinkTolerances,
  notices: NoticeBook,
): Chain[] {
  const points: Point[] = []
  const numbered = numberEnds(drawn, tolerances.coincident, points, notices)
  const parted = partClosedEntities(numbered)
  const { rings, loose } = dropDuplicates(parted.rings, parted.loose, tolerances.coincident, notices)
  joinLooseEnds(loose, points, tolerances.join, notices)
  const ownChains = rings.map((ring): Chain => ({
    segments: ring.map((edge) => placed(edge, true, points)),
    closed: true,
    branched: false,
  }))
  return [...ownChains, ...walkEdges(loose, points, notices)]
}

/** Entities whose edges follow one another back to where they started, and all other edges. */
function partClosedEntities(edges: readonly Edge[]): { rings: Edge[][]; loose: Edge[] } {
  const rings: Edge[][] = []
  const loose: Edge[] = []
  let start = 0
  edges.forEach((edge, i) => {
    if (edges[i + 1]?.entity === edge.entity) return
    const own = edges.slice(start, i + 1)
    start = i + 1
    if (own.length > 1 && own.every((one, j) => one.to === (own[j + 1] ?? own[0])?.from)) rings.push(own)
    else loose.push(...own)
  })
  return { rings, loose }
}

function numberEnds(
  drawn: readonly DrawnSegment[],
  coincident: number,
  points: Point[],
  notices: NoticeBook,
): Edge[] {
  const grid = new PointGrid(coincident)
  const numberOf = (at: Point): number => {
    const known = grid.nearest(at)
    if (known !== null) return known
    grid.add(points.length, at)
    points.push(at)
    return points.length - 1
  }
  const edges: Edge[] = []
  for (const one of drawn) {
    const { segment } = one
    if (segmentLength(segment) <= coincident) {
      notices.note('zero-length-dropped', segment.from)
      continue
    }
    edges.push({ ...one, from: numberOf(segment.from), to: numberOf(segment.to) })
  }
  return edges
}

/** Pairs of loose ends within the gap allowed. A flat part has a handful; a filled area drawn as strokes, millions. */
const MAX_LOOSE_PAIRS = 1_000_000

const SIDES = ['from', 'to'] as const

interface LooseEnd {
  readonly edge: Edge
  readonly side: (typeof SIDES)[number]
  readonly at: Point
}

function joinLooseEnds(edges: readonly Edge[], points: Point[], join: number, notices: NoticeBook): void {
  if (!(join > 0)) return
  const degree = new Uint32Array(points.length)
  for (const edge of edges) for (const side of SIDES) degree[edge[side]] = (degree[edge[side]] ?? 0) + 1
  const loose: LooseEnd[] = edges.flatMap((edge) =>
    SIDES.filter((side) => degree[edge[side]] === 1).map((side) => ({
      edge,
      side,
      at: points[edge[side]] ?? edge.segment[side],
    })),
  )
  const grid = new PointGrid(join)
  const pairs: { a: number; b: number; gap: number }[] = []
  loose.forEach((end, a) => {
    for (const b of grid.within(end.at)) {
      const other = loose[b]
      // A short line is not a gap: its own two ends stay apart.
      if (!other || (other.edge === end.edge && end.edge.segment.kind === 'line')) continue
      pairs.push({ a, b, gap: distance(end.at, other.at) })
      if (pairs.length > MAX_LOOSE_PAIRS) throw crowded()
    }
    grid.add(a, end.at)
  })
  pairs.sort((p, q) => p.gap - q.gap)
  const taken = new Set<number>()
  for (const { a, b } of pairs) {
    const [first, second] = [loose[a], loose[b]]
    if (!first || !second || taken.has(a) || taken.has(b)) continue
    taken.add(a).add(b)
    const kept = first.edge[first.side]
    points[kept] = middle(first.at, second.at)
    second.edge[second.side] = kept
    notices.note('gap-joined', points[kept])
  }
}

function crowded(): DrawingError {
  return new DrawingError(
    'drawing-too-slow',
    'Too many loose ends lie close together. Choose a smaller gap, or leave out the layer of the filling.',
  )
}
