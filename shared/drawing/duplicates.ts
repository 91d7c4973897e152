import { pointAt } from '../geometry/segment.ts'
import type { Point } from '../geometry/types.ts'
import { distance } from '../geometry/vector.ts'
import type { DrawnSegment, Edge } from './chain.ts'
import { DrawingError } from './errors.ts'
import type { NoticeBook } from './notices.ts'
import { PointGrid } from './point-grid.ts'

/** Different edges between the same two points; a sound drawing has two. */
const MAX_RIVALS = 100

/**
 * Drops loose edges that run between the same points through the same middle as another edge, either way, and
 * closed entities all of whose edges do. A closed entity that only shares a side with another keeps it.
 *
 * @throws DrawingError drawing-too-slow
 */
export function dropDuplicates(
  rings: readonly (readonly Edge[])[],
  loose: readonly Edge[],
  coincident: number,
  notices: NoticeBook,
): { rings: (readonly Edge[])[]; loose: Edge[] } {
  const middles = new Map<string, Point[]>()
  const isKnown = (edge: Edge): boolean => {
    const middle = pointAt(edge.segment, 0.5)
    // Both ends may be off by the slack, and so may the middle.
    return middles.get(keyOf(edge))?.some((rival) => distance(rival, middle) <= 2 * coincident) ?? false
  }
  const remember = (edge: Edge) => {
    const rivals = middles.get(keyOf(edge)) ?? []
    if (rivals.length >= MAX_RIVALS) throw crowded()
    rivals.push(pointAt(edge.segment, 0.5))
    middles.set(keyOf(edge), rivals)
  }
  const isNew = (edges: readonly Edge[]): boolean => {
    const [first] = edges
    if (first && edges.every(isKnown)) {
      notices.note('duplicate-dropped', pointAt(first.segment, 0.5), { count: edges.length })
      return false
    }
    edges.forEach(remember)
    return true
  }
  return { rings: rings.filter(isNew), loose: loose.filter((edge) => isNew([edge])) }
}

function keyOf({ from, to }: Edge): string {
  return from < to ? `${from},${to}` : `${to},${from}`
}

function crowded(): DrawingError {
  return new DrawingError(
    'drawing-too-slow',
    'Too many edges run between the same two points. Remove what was drawn over and over.',
  )
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
