import { reverseSegment, segmentLength } from '../geometry/segment.ts'
import type { Point } from '../geometry/types.ts'
import { distance, middle } from '../geometry/vector.ts'
import type { Chain, DrawnSegment, Edge, LinkTolerances } from './chain.ts'
import { dropDuplicates } from './duplicates.ts'
import { DrawingError } from './errors.ts'
import type { NoticeBook } from './notices.ts'
import { PointGrid } from './point-grid.ts'

/**
 * Joins segments end to end. Ends that coincide become one point; then only ends that are still loose are
 * brought together, nearest first, so that fine detail smaller than the gap allowed is never pulled together.
 */
export function linkSegments(
  drawn: readonly DrawnSegment[],
  tolerances: LinkTolerances,
  notices: NoticeBook,
): Chain[] {
  const points: Point[] = []
  const edges = dropDuplicates(
    numberEnds(drawn, tolerances.coincident, points, notices),
    tolerances.coincident,
    notices,
  )
  joinLooseEnds(edges, points, tolerances.join, notices)
  return walk(edges, points, notices)
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
  for (const { segment, layer } of drawn) {
    if (segmentLength(segment) <= coincident) {
      notices.note('zero-length-dropped', segment.from)
      continue
    }
    edges.push({ segment, layer, from: numberOf(segment.from), to: numberOf(segment.to) })
  }
  return edges
}

/** Pairs of loose ends within the gap allowed. A flat part has a handful; a filled area drawn as strokes, millions. */
const MAX_LOOSE_PAIRS = 1_000_000

interface LooseEnd {
  readonly edge: Edge
  readonly side: 'from' | 'to'
  readonly at: Point
}

function joinLooseEnds(edges: readonly Edge[], points: Point[], join: number, notices: NoticeBook): void {
  if (!(join > 0)) return
  const degree = degrees(edges, points.length)
  const loose: LooseEnd[] = edges.flatMap((edge) =>
    (['from', 'to'] as const)
      .filter((side) => degree[edge[side]] === 1)
      .map((side) => ({ edge, side, at: points[edge[side]] ?? edge.segment[side] })),
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

function degrees(edges: readonly Edge[], count: number): Uint32Array {
  const degree = new Uint32Array(count)
  for (const { from, to } of edges) {
    degree[from] = (degree[from] ?? 0) + 1
    degree[to] = (degree[to] ?? 0) + 1
  }
  return degree
}

function walk(edges: readonly Edge[], points: readonly Point[], notices: NoticeBook): Chain[] {
  const degree = degrees(edges, points.length)
  const at: number[][] = points.map(() => [])
  edges.forEach(({ from, to }, i) => {
    at[from]?.push(i)
    at[to]?.push(i)
  })
  const branchedPoints = markFigures(edges, at, degree)
  const used = new Uint8Array(edges.length)
  const chains: Chain[] = []

  const follow = (first: number, start: number) => {
    const segments: DrawnSegment[] = []
    let index: number | undefined = first
    let point = start
    do {
      const edge: Edge | undefined = edges[index]
      if (!edge) break
      used[index] = 1
      const forward: boolean = edge.from === point
      segments.push(placed(edge, forward, points))
      point = forward ? edge.to : edge.from
      index = degree[point] === 2 ? at[point]?.find((next) => used[next] === 0) : undefined
    } while (index !== undefined)
    chains.push({ segments, closed: point === start, branched: branchedPoints[start] === 1 })
  }

  // Chains with an end or a branch first, from there; what is left are rings.
  edges.forEach((edge, i) => {
    for (const start of [edge.from, edge.to]) {
      if (used[i] === 0 && degree[start] !== 2) follow(i, start)
    }
  })
  edges.forEach((edge, i) => {
    if (used[i] === 0) follow(i, edge.from)
  })
  reportUnclosed(chains, points, degree, branchedPoints, at, edges, notices)
  return chains
}

/** 1 for every point of a figure (connected set of edges) in which somewhere more than two ends meet. */
function markFigures(edges: readonly Edge[], at: readonly number[][], degree: Uint32Array): Uint8Array {
  const marked = new Uint8Array(at.length)
  const queue: number[] = []
  degree.forEach((count, point) => {
    if (count > 2) {
      marked[point] = 1
      queue.push(point)
    }
  })
  for (let point = queue.pop(); point !== undefined; point = queue.pop()) {
    for (const index of at[point] ?? []) {
      const edge = edges[index]
      const next = edge && (edge.from === point ? edge.to : edge.from)
      if (next === undefined || marked[next] === 1) continue
      marked[next] = 1
      queue.push(next)
    }
  }
  return marked
}

/** The edge in the direction walked, its ends on the numbered points; an arc keeps its included angle. */
function placed(edge: Edge, forward: boolean, points: readonly Point[]): DrawnSegment {
  const segment = forward ? edge.segment : reverseSegment(edge.segment)
  const from = points[forward ? edge.from : edge.to] ?? segment.from
  const to = points[forward ? edge.to : edge.from] ?? segment.to
  return { segment: { ...segment, from, to }, layer: edge.layer }
}

/** One count for each figure: an open one at its ends, a branched one at the points where it branches. */
function reportUnclosed(
  chains: readonly Chain[],
  points: readonly Point[],
  degree: Uint32Array,
  branched: Uint8Array,
  at: readonly number[][],
  edges: readonly Edge[],
  notices: NoticeBook,
): void {
  for (const chain of chains) {
    if (chain.closed || chain.branched) continue
    notices.note('chain-open', chain.segments[0]?.segment.from ?? null)
    notices.note('chain-open', chain.segments.at(-1)?.segment.to ?? null, { count: 0 })
  }
  const seen = new Uint8Array(points.length)
  points.forEach((place, start) => {
    if (branched[start] !== 1 || seen[start] === 1) return
    notices.note('chain-branched')
    const queue = [start]
    seen[start] = 1
    for (let point = queue.pop(); point !== undefined; point = queue.pop()) {
      if ((degree[point] ?? 0) > 2) notices.note('chain-branched', points[point] ?? place, { count: 0 })
      for (const index of at[point] ?? []) {
        const edge = edges[index]
        const next = edge && (edge.from === point ? edge.to : edge.from)
        if (next === undefined || seen[next] === 1) continue
        seen[next] = 1
        queue.push(next)
      }
    }
  })
}

function crowded(): DrawingError {
  return new DrawingError(
    'drawing-too-slow',
    'Too many loose ends lie close together. Choose a smaller gap, or leave out the layer of the filling.',
  )
}
