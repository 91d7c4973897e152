import { rayCrossings } from '../geometry/inside.ts'
import { segmentBounds } from '../geometry/segment.ts'
import type { Loop } from '../geometry/types.ts'
import { BoxTree } from './box-tree.ts'
import { DrawingError } from './errors.ts'

/** Edges that all rays together may meet. */
const MAX_CROSSINGS = 20_000_000

/**
 * For every loop the index of the loop right around it, null for one that lies free. A ray is cast from each
 * loop's first corner; the loops that it crosses an odd number of times contain it. Areas (mm², any sign)
 * tell which of them is the nearest.
 *
 * @throws DrawingError drawing-too-slow
 */
export function nestLoops(loops: readonly Loop[], areas: readonly number[]): (number | null)[] {
  const edges = loops.flatMap((loop, l) => loop.map((segment) => ({ segment, l })))
  const tree = new BoxTree(edges.map(({ segment }) => segmentBounds(segment)))
  const size = (index: number) => Math.abs(areas[index] ?? 0)
  let met = 0
  return loops.map((loop, own) => {
    const at = loop[0]?.from
    if (!at) return null
    const odd = new Set<number>()
    tree.visit({ minX: at.x, maxX: Infinity, minY: at.y, maxY: at.y }, (index) => {
      if (++met > MAX_CROSSINGS) {
        throw new DrawingError(
          'drawing-too-slow',
          'The drawing holds too many outlines. Export only the part.',
        )
      }
      const edge = edges[index]
      if (!edge || edge.l === own || rayCrossings(edge.segment, at) % 2 === 0) return
      if (!odd.delete(edge.l)) odd.add(edge.l)
    })
    // Outlines that cross may each seem to hold the other: only a larger one can be around this one.
    return [...odd]
      .filter((index) => size(index) > size(own))
      .reduce<number | null>(
        (best, index) => (best === null || size(index) < size(best) ? index : best),
        null,
      )
  })
}
