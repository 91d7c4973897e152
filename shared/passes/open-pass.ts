import { lengthenRunIn, outwardBetween, putOutside } from './closed-pass.ts'
import { makeEdgePlan, planEdge } from './edge-plan.ts'
import type { Level } from './level.ts'
import type { Run } from './runs.ts'
import { putSquare, writeEnd, writeStart } from './stations.ts'
import { CornerMove, MoveKind } from './types.ts'
import { finish, put, type PathWriter } from './writer.ts'

/** How an open run of edges begins or ends. */
export const RunEnd = {
  /** At a convex corner: on along the prolongation, into the waste. */
  runOut: 0,
  /** At a concave corner: along the seam with the neighbour's wall, and between the two into the waste. */
  seam: 1,
  /** Where the neighbour goes on smoothly: square to the edge, straight off the wall. */
  off: 2,
} as const

export function runEnd(level: Level, offers: Uint8Array, corner: number): number {
  const { turnSin } = level
  if (offers[corner]! & (1 << CornerMove.step)) return RunEnd.off
  return turnSin[corner]! > 0 ? RunEnd.runOut : RunEnd.seam
}

/** Writes the pass of an open run. `move`: the moves at the corners within it; those at its ends are set here. */
export function writeOpenPass(
  w: PathWriter,
  level: Level,
  move: Uint8Array,
  offers: Uint8Array,
  run: Run,
  leadIn: number,
  leadOut: number,
): void {
  const plan = makeEdgePlan()
  const after = level.next[run.last]!
  const start = runEnd(level, offers, run.first)
  const end = runEnd(level, offers, after)
  move[run.first] = MOVE_AT_END[start]!
  move[after] = MOVE_AT_END[end]!
  const first = w.at
  if (start === RunEnd.seam) putBetween(w, level, run.first, leadIn, MoveKind.leadIn)
  else if (start === RunEnd.off) {
    planEdge(level, move, run.first, plan)
    putOutside(w, level, plan, plan.from, leadIn, MoveKind.leadIn)
  }
  for (let g = run.first; ; g = level.next[g]!) {
    planEdge(level, move, g, plan)
    writeStart(w, level, plan)
    writeEnd(w, level, plan)
    if (g === run.last) break
  }
  if (end === RunEnd.runOut) finish(w)
  else if (end === RunEnd.seam) {
    putBetween(w, level, after, 0, MoveKind.leadOut)
    putBetween(w, level, after, leadOut, MoveKind.end)
  } else {
    putSquare(w, level, plan, plan.to, MoveKind.leadOut)
    w.edge[w.at - 1] = -1
    putOutside(w, level, plan, plan.to, leadOut, MoveKind.end)
  }
  if (start === RunEnd.runOut) lengthenRunIn(w, level, move, first, leadIn)
}

const MOVE_AT_END = [CornerMove.runOut, CornerMove.lean, CornerMove.none]

/** A station between the two walls at a corner, off both by moving the seam's jet along itself. */
function putBetween(w: PathWriter, level: Level, corner: number, out: number, move: number): void {
  const way = outwardBetween(level, corner)
  const { x, y, p, q } = level
  put(
    w,
    x[corner]! + out * way.x,
    y[corner]! + out * way.y,
    p[corner]!,
    q[corner]!,
    move,
    -1,
    level.facet[corner]!,
  )
}
