import { cornerInDrawing, edgeInDrawing } from '../geometry/orient.ts'
import { loopOfEdge, type Outline } from '../geometry/outline.ts'
import type { CornerRef, EdgeRef } from '../walls/types.ts'

/**
 * The body's numbers and the caller's. Loops keep their order, so both count edges and corners through all loops in the
 * same ranges; a loop that came in the other way round runs backward: edge k is the caller's edge n − 1 − k, corner k
 * the caller's corner (n − k) mod n. Either way is its own inverse.
 */
export interface Numbering {
  readonly reversed: readonly boolean[]
  /** The caller's number of every edge, through all loops, by the body's; null where they are the same. */
  readonly edge: Int32Array | null
  readonly corner: Int32Array | null
  /** The same for one edge told by its loop. */
  readonly edgeRef: (ref: EdgeRef) => EdgeRef
  readonly cornerRef: (ref: CornerRef) => CornerRef
  /** Loop and number within it, of an edge or a corner through all loops. */
  readonly edgeAt: (through: number) => EdgeRef
  readonly cornerAt: (through: number) => CornerRef
}

export function numberingOf(outline: Outline, reversed: readonly boolean[]): Numbering {
  const { loopStart } = outline
  const sizeOf = (loop: number) => loopStart[loop + 1]! - loopStart[loop]!
  const turned = (loop: number) => reversed[loop] ?? false
  const through = (inDrawing: typeof edgeInDrawing) => {
    if (!reversed.includes(true)) return null
    const out = new Int32Array(outline.count)
    for (let l = 0; l < reversed.length; l++) {
      const first = loopStart[l]!
      const n = sizeOf(l)
      for (let k = 0; k < n; k++) out[first + k] = first + inDrawing(k, n, turned(l))
    }
    return out
  }
  const split = (at: number) => {
    const loop = loopOfEdge(outline, at)
    return { loop, within: at - loopStart[loop]! }
  }
  return {
    reversed,
    edge: through(edgeInDrawing),
    corner: through(cornerInDrawing),
    edgeRef: ({ loop, edge }) => ({ loop, edge: edgeInDrawing(edge, sizeOf(loop), turned(loop)) }),
    cornerRef: ({ loop, vertex }) => ({ loop, vertex: cornerInDrawing(vertex, sizeOf(loop), turned(loop)) }),
    edgeAt: (at) => {
      const { loop, within } = split(at)
      return { loop, edge: within }
    },
    cornerAt: (at) => {
      const { loop, within } = split(at)
      return { loop, vertex: within }
    },
  }
}
