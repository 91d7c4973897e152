import { reverseLoop, signedArea } from './loop.ts'
import type { Loop } from './types.ts'

export interface OrientedLoops {
  readonly loops: readonly Loop[]
  /** Which loops were turned round. */
  readonly reversed: readonly boolean[]
}

/**
 * Puts orientation right without changing the order of loops: the first counter-clockwise, the others
 * clockwise. A loop that is turned round keeps its first corner: corner k is then the drawing's corner
 * (n − k) mod n, and edge k the drawing's edge n − 1 − k (see `edgeInDrawing`).
 */
export function orientLoops(loops: readonly Loop[]): OrientedLoops {
  const reversed = loops.map((loop, i) => signedArea(loop) > 0 !== (i === 0))
  return { loops: loops.map((loop, i) => (reversed[i] ? reverseLoop(loop) : loop)), reversed }
}

/** The number that an edge of a turned loop of n edges has in the drawing; its own inverse. */
export function edgeInDrawing(edge: number, n: number, reversed: boolean): number {
  return reversed ? n - 1 - edge : edge
}

/** The number that a corner of a turned loop of n corners has in the drawing; its own inverse. */
export function cornerInDrawing(vertex: number, n: number, reversed: boolean): number {
  return reversed ? (n - vertex) % n : vertex
}
