import { rayCrossings } from '../geometry/inside.ts'
import { boundsOf } from '../geometry/loop.ts'
import { segmentBounds } from '../geometry/segment.ts'
import type { Loop, Point } from '../geometry/types.ts'
import { BoxTree } from './box-tree.ts'
import { DrawingError } from './errors.ts'

/** Boxes and edges that all questions together may look at. */
const MAX_LOOKS = 5_000_000

/**
 * For every loop the index of the loop right around it, null for one that lies free: of the loops that hold
 * its first corner, the smallest. Areas (mm², any sign) tell which one that is.
 *
 * @throws DrawingError drawing-too-slow
 */
export function nestLoops(loops: readonly Loop[], areas: readonly number[]): (number | null)[] {
  const bounds = loops.map(boundsOf)
  const boxes = new BoxTree(bounds)
  const size = (index: number) => Math.abs(areas[index] ?? 0)
  const edgeTrees = new Map<number, BoxTree>()
  const edgesOf = (index: number, loop: Loop): BoxTree => {
    const tree = edgeTrees.get(index) ?? new BoxTree(loop.map(segmentBounds))
    edgeTrees.set(index, tree)
    return tree
  }
  let looks = 0
  const look = () => {
    if (++looks > MAX_LOOKS) {
      throw new DrawingError('drawing-too-slow', 'The drawing holds too many outlines. Export only the part.')
    }
  }
  const holds = (index: number, at: Point): boolean => {
    const loop = loops[index] ?? []
    let crossings = 0
    edgesOf(index, loop).visit({ minX: at.x, maxX: Infinity, minY: at.y, maxY: at.y }, (edge) => {
      look()
      const segment = loop[edge]
      if (segment) crossings += rayCrossings(segment, at)
    })
    return crossings % 2 === 1
  }
  return loops.map((loop, own) => {
    const at = loop[0]?.from
    let best: number | null = null
    if (!at) return best
    boxes.visit({ minX: at.x, maxX: at.x, minY: at.y, maxY: at.y }, (index) => {
      look()
      // Outlines that cross may each seem to hold the other: only a larger one can be around this one.
      if (index === own || size(index) <= size(own)) return
      if ((best === null || size(index) < size(best)) && holds(index, at)) best = index
    })
    return best
  })
}
