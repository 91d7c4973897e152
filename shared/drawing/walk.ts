import { segmentFromVertices } from '../geometry/bulge.ts'
import { reverseSegment } from '../geometry/segment.ts'
import type { Point, Segment } from '../geometry/types.ts'
import type { Chain, DrawnSegment, Edge } from './chain.ts'
import type { NoticeBook } from './notices.ts'

/**
 * Chains of edges between numbered points. Where more than two ends meet, a figure branches, and which way an
 * outline runs is for a person to say. Before that is asked, rings that close on one layer are taken out of it:
 * an outline on a layer of its own is an outline, whatever else touches it.
 */
export function walkEdges(edges: readonly Edge[], points: readonly Point[], notices: NoticeBook): Chain[] {
  const rings: Edge[] = []
  const drawn = figuresOf(edges)
  for (const figure of drawn) {
    if (figure.kind !== 'branched') continue
    for (const own of byLayer(figure.edges)) {
      for (const part of figuresOf(own)) if (part.kind === 'ring') rings.push(...part.edges)
    }
  }
  const taken = new Set(rings)
  const figures = rings.length === 0 ? drawn : figuresOf(edges.filter((edge) => !taken.has(edge)))
  for (const figure of figures) report(figure, points, notices)
  // Rings of two layers may share a point, so each layer is walked by itself.
  const apart = byLayer(rings).flatMap((own) => figuresOf(own))
  return [...apart, ...figures].flatMap((figure) => chainsOf(figure, points))
}

function byLayer(edges: readonly Edge[]): Edge[][] {
  const groups = new Map<string, Edge[]>()
  for (const edge of edges) {
    const group = groups.get(edge.layer)
    if (group) group.push(edge)
    else groups.set(edge.layer, [edge])
  }
  return [...groups.values()]
}

/** The edge in the direction walked, its ends on the numbered points; an arc keeps its included angle. */
export function placed(edge: Edge, forward: boolean, points: readonly Point[]): DrawnSegment {
  const segment = forward ? edge.segment : reverseSegment(edge.segment)
  const from = points[forward ? edge.from : edge.to] ?? segment.from
  const to = points[forward ? edge.to : edge.from] ?? segment.to
  return { layer: edge.layer, entity: edge.entity, segment: between(segment, from, to) }
}

function between(segment: Segment, from: Point, to: Point): Segment {
  if (segment.kind === 'line') return { kind: 'line', from, to }
  const still = (a: Point, b: Point) => a.x === b.x && a.y === b.y
  if (still(from, segment.from) && still(to, segment.to)) return segment
  return segmentFromVertices({ ...from, bulge: Math.tan(segment.sweep / 4) }, to)
}

/** A connected set of edges, and which of them meet at each point. */
interface Figure {
  readonly kind: 'ring' | 'open' | 'branched'
  readonly edges: readonly Edge[]
  readonly at: ReadonlyMap<number, readonly Edge[]>
}

function figuresOf(edges: readonly Edge[]): Figure[] {
  const at = edgesAt(edges)
  const seen = new Set<Edge>()
  const figures: Figure[] = []
  for (const first of edges) {
    if (seen.has(first)) continue
    seen.add(first)
    const own: Edge[] = []
    const queue = [first]
    for (let edge = queue.pop(); edge; edge = queue.pop()) {
      own.push(edge)
      for (const point of [edge.from, edge.to]) {
        for (const next of at.get(point) ?? []) {
          if (seen.has(next)) continue
          seen.add(next)
          queue.push(next)
        }
      }
    }
    figures.push(figureOf(own))
  }
  return figures
}

function figureOf(edges: readonly Edge[]): Figure {
  const at = edgesAt(edges)
  let [loose, branches] = [false, false]
  for (const meeting of at.values()) {
    loose ||= meeting.length === 1
    branches ||= meeting.length > 2
  }
  return { kind: branches ? 'branched' : loose ? 'open' : 'ring', edges, at }
}

/** An edge from a point back to it counts twice there. */
function edgesAt(edges: readonly Edge[]): Map<number, Edge[]> {
  const at = new Map<number, Edge[]>()
  for (const edge of edges) {
    for (const point of [edge.from, edge.to]) {
      const meeting = at.get(point)
      if (meeting) meeting.push(edge)
      else at.set(point, [edge])
    }
  }
  return at
}

/** A ring or an open figure is one chain; a branched one is cut where it branches. */
function chainsOf({ kind, edges, at }: Figure, points: readonly Point[]): Chain[] {
  const used = new Set<Edge>()
  const chains: Chain[] = []
  const follow = (first: Edge, start: number) => {
    const segments: DrawnSegment[] = []
    let point = start
    for (let edge: Edge | undefined = first; edge;) {
      used.add(edge)
      const forward: boolean = edge.from === point
      segments.push(placed(edge, forward, points))
      point = forward ? edge.to : edge.from
      const meeting: readonly Edge[] = at.get(point) ?? []
      edge = meeting.length === 2 ? meeting.find((next) => !used.has(next)) : undefined
    }
    chains.push({ segments, closed: point === start, branched: kind === 'branched' })
  }
  // In drawing order, ends and branches first; what is left runs round.
  const ordered = [...edges].sort((a, b) => a.entity - b.entity)
  for (const edge of ordered) {
    for (const start of [edge.from, edge.to]) {
      if (!used.has(edge) && at.get(start)?.length !== 2) follow(edge, start)
    }
  }
  for (const edge of ordered) if (!used.has(edge)) follow(edge, edge.from)
  return chains
}

/** One count for each figure: an open one at its ends, a branched one at the points where it branches. */
function report({ kind, at }: Figure, points: readonly Point[], notices: NoticeBook): void {
  if (kind === 'ring') return
  const code = kind === 'open' ? 'chain-open' : 'chain-branched'
  let count = 1
  for (const [point, meeting] of at) {
    if (kind === 'open' ? meeting.length !== 1 : meeting.length <= 2) continue
    notices.note(code, points[point] ?? null, { count })
    count = 0
  }
}
