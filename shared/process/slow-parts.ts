import { MoveKind, type JetPath, type Pass } from '../passes/types.ts'
import type { CornerSlowing } from './spec.ts'

/**
 * Which part of each move runs slow for a corner. A corner is where the axis at the top face turns between two moves
 * along walls, and every pivot; leads, run-outs and turns in the waste have none (the run-out is there so that the jet
 * keeps its speed past the corner). Leans are slow as a whole.
 */
export interface SlowParts {
  /** Slow from the move's start up to this part of it, and again from `until` on (0 to 1; all slow: from = 1). */
  readonly from: Float64Array
  readonly until: Float64Array
}

export function slowParts(
  path: JetPath,
  passes: readonly Pass[],
  lengths: Float64Array,
  { distance, turn }: CornerSlowing,
): SlowParts {
  const from = new Float64Array(path.count)
  const until = new Float64Array(path.count).fill(1)
  const leastCos = Math.cos(Math.min(turn, Math.PI))
  const part = (i: number, left: number) => (left <= 0 ? 0 : left >= lengths[i]! ? 1 : left / lengths[i]!)
  for (const { first, last } of passes) {
    // What is left of the slow distance, once from the corner behind and once toward the one ahead.
    let left = 0
    for (let i = first; i < last; i++) {
      if (isCornerAt(path, i, first, last, leastCos)) left = distance
      from[i] = isSlowMove(path.move[i]!) ? 1 : part(i, left)
      left -= lengths[i]!
    }
    left = 0
    for (let i = last - 1; i >= first; i--) {
      if (isCornerAt(path, i + 1, first, last, leastCos)) left = distance
      until[i] = 1 - part(i, left)
      left -= lengths[i]!
      if (from[i]! >= until[i]!) {
        from[i] = 1
        until[i] = 1
      }
    }
  }
  return { from, until }
}

function isSlowMove(move: number): boolean {
  return move === MoveKind.lean || move === MoveKind.pivot
}

function isOnWall(move: number): boolean {
  return move === MoveKind.cut || move === MoveKind.lean
}

function isCornerAt(path: JetPath, j: number, first: number, last: number, leastCos: number): boolean {
  if (j <= first || j >= last) return false
  const [before, after] = [path.move[j - 1]!, path.move[j]!]
  if (before === MoveKind.pivot || after === MoveKind.pivot) return true
  if (!isOnWall(before) || !isOnWall(after)) return false
  const [ax, ay] = [alongX(path, j - 1, j), alongY(path, j - 1, j)]
  const [bx, by] = [alongX(path, j, j), alongY(path, j, j)]
  const size = Math.sqrt((ax * ax + ay * ay) * (bx * bx + by * by))
  // A move that stands still at the top has no direction; beside one nothing is known, so it counts as a corner.
  return !(ax * bx + ay * by >= leastCos * size && size > 0)
}

/** Direction of move i at its station j (start or end), not of unit length: what a straight move has throughout. */
function alongX({ x, y, sweep, cx, cy }: JetPath, i: number, j: number): number {
  const s = sweep[i]!
  if (s === 0) return x[i + 1]! - x[i]!
  return growth({ x, y, cx, cy }, i, j) * (x[j]! - cx[i]!) - s * (y[j]! - cy[i]!)
}

function alongY({ x, y, sweep, cx, cy }: JetPath, i: number, j: number): number {
  const s = sweep[i]!
  if (s === 0) return y[i + 1]! - y[i]!
  return growth({ x, y, cx, cy }, i, j) * (y[j]! - cy[i]!) + s * (x[j]! - cx[i]!)
}

/** How much a round move's distance from its centre grows, as a share of what it is at station j. */
function growth({ x, y, cx, cy }: Pick<JetPath, 'x' | 'y' | 'cx' | 'cy'>, i: number, j: number): number {
  const distance = (k: number) => Math.hypot(x[k]! - cx[i]!, y[k]! - cy[i]!)
  const here = distance(j)
  return here === 0 ? 0 : (distance(i + 1) - distance(i)) / here
}
