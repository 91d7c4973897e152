import { pointAt } from '../geometry/segment.ts'
import { distance } from '../geometry/vector.ts'
import type { DrawnSegment, Edge } from './chain.ts'
import type { NoticeBook } from './notices.ts'
import { PointGrid } from './point-grid.ts'

/** Drops an edge that runs between the same points through the same middle as an earlier one, either way. */
export function dropDuplicates(edges: readonly Edge[], coincident: number, notices: NoticeBook): Edge[] {
  const kept: Edge[] = []
  const between = new Map<string, Edge[]>()
  for (const edge of edges) {
    const key = edge.from < edge.to ? `${edge.from},${edge.to}` : `${edge.to},${edge.from}`
    const rivals = between.get(key) ?? []
    const middle = pointAt(edge.segment, 0.5)
    // Both ends may be off by the slack, and so may the middle.
    if (rivals.some((rival) => distance(pointAt(rival.segment, 0.5), middle) <= 2 * coincident)) {
      notices.note('duplicate-dropped', middle)
      continue
    }
    rivals.push(edge)
    between.set(key, rivals)
    kept.push(edge)
  }
  return kept
}

/** A circle drawn twice from different start points is no duplicate edge by edge; as rings it is. */
export function dropRepeatedCircles(
  rings: readonly (readonly DrawnSegment[])[],
  coincident: number,
  notices: NoticeBook,
): (readonly DrawnSegment[])[] {
  const grid = new PointGrid(2 * coincident)
  const radii: number[] = []
  return rings.filter((ring) => {
    const first = ring[0]?.segment
    if (first?.kind !== 'arc') return true
    const { centre, radius } = first
    const isCircle = ring.every(
      ({ segment }) =>
        segment.kind === 'arc' &&
        distance(segment.centre, centre) <= coincident &&
        Math.abs(segment.radius - radius) <= coincident,
    )
    if (!isCircle) return true
    // Filed by its easternmost point, so that concentric circles do not crowd one cell.
    const east = { x: centre.x + radius, y: centre.y }
    if (grid.within(east).some((id) => Math.abs((radii[id] ?? 0) - radius) <= coincident)) {
      notices.note('duplicate-dropped', first.from, { count: ring.length })
      return false
    }
    grid.add(radii.length, east)
    radii.push(radius)
    return true
  })
}
