import { leanLength } from './edge-plan.ts'
import type { Level } from './level.ts'
import { CornerMove, MoveKind } from './types.ts'
import { put, type PathWriter } from './writer.ts'

/**
 * The stations of a straight edge between corners that are leaned round or smooth, without taper or blend: the
 * common case of a plate of many edges, written without a plan. False, with nothing written, where the edge asks
 * for more than that.
 */
export function writeStraightEdge(w: PathWriter, level: Level, move: Uint8Array, g: number): boolean {
  const { frame, axis, x, y, p, q } = level
  const h = level.next[g]!
  const leansFrom = move[g] === CornerMove.lean
  const leansTo = move[h] === CornerMove.lean
  if (frame.arc[g] || level.jet.taper !== 0 || axis.start !== axis.end) return false
  if ((!leansFrom && move[g] !== CornerMove.none) || (!leansTo && move[h] !== CornerMove.none)) return false
  const t = frame.body.thickness
  const [ux, uy, sx, sy] = [frame.ux[g]!, frame.uy[g]!, x[g]!, y[g]!]
  const length = (x[h]! - sx) * ux + (y[h]! - sy) * uy
  const from = leansFrom ? leanLength(level, t * (p[g]! * ux + q[g]! * uy)) : 0
  const to = leansTo ? leanLength(level, t * (p[h]! * ux + q[h]! * uy)) : 0
  const facet = level.facet[g]!
  const slope = axis.start.slope[level.figure[g]!]!
  const [outX, outY] = [slope * uy, -slope * ux]
  const whole = from + to > 0 && from + to >= length
  if (leansFrom) put(w, sx, sy, p[g]!, q[g]!, MoveKind.lean, g, facet)
  else put(w, sx, sy, outX, outY, whole ? MoveKind.lean : MoveKind.cut, g, facet)
  if (whole) return true
  if (leansFrom) put(w, sx + from * ux, sy + from * uy, outX, outY, MoveKind.cut, g, facet)
  const cut = length - to
  if (leansTo) put(w, sx + cut * ux, sy + cut * uy, outX, outY, MoveKind.lean, g, facet)
  return true
}
