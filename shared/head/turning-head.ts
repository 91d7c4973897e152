import type { JetPath, Pass } from '../passes/types.ts'
import { chooseHalfTurns, makeRuns, type TiltedRuns } from './half-turns.ts'
import { headingOf, lessTurns, nearestTilt, tiltOf } from './kinematics.ts'
import { isSteady, makeSlopeRun, slopeRun } from './slope-run.ts'
import type { HeadSpec } from './types.ts'

/** Columns of a plan, being written. */
export interface AxisColumns {
  readonly outer: Float64Array
  readonly inner: Float64Array
  readonly dwell: Float64Array
  readonly crossing: Float64Array
  readonly held: Uint8Array
}

/** Turns of C smaller than this are rounding: far below any axis' resolution, radians. */
const SAME_ANGLE = 1e-9

/**
 * A and C of a C-A head along the passes. `flat`: up to this slope the jet counts as vertical and C is held. At a
 * station off vertical A and C are exact. On a move that begins or ends at a held station C keeps the heading that it
 * has at the move's tilted end (turning with a round move), and A tilts in that plane: the jet's distance from the
 * plane goes evenly from at most `flat` to none, so the direction is never off by more than asin(flat).
 */
export function planTurningHead(
  path: JetPath,
  passes: readonly Pass[],
  head: HeadSpec,
  flat: number,
  out: AxisColumns,
): void {
  const runs = makeRuns()
  let c = Math.min(head.outer.to, Math.max(head.outer.from, 0))
  for (const pass of passes) {
    findAngles(path, pass, flat, out)
    findRuns(path, pass, flat, out, runs)
    const choice = chooseHalfTurns(runs, head, c)
    for (let r = 0; r < runs.count; r++) {
      const halfTurns = choice[r]!
      if (halfTurns === 0) continue
      for (let i = runs.start[r]!; i <= runs.end[r]!; i++) {
        out.outer[i]! += halfTurns * Math.PI
        if (halfTurns % 2 !== 0) out.inner[i] = -out.inner[i]!
      }
    }
    hold(path, pass, head, out, runs, c)
    c = out.outer[pass.last]!
  }
}

/** Angles of the usual branch, station by station. */
function findAngles(
  { p, q }: JetPath,
  { first, last }: Pass,
  flat: number,
  { outer, inner, held }: AxisColumns,
) {
  for (let i = first; i <= last; i++) {
    if (i > first && p[i] === p[i - 1] && q[i] === q[i - 1]) {
      outer[i] = outer[i - 1]!
      inner[i] = inner[i - 1]!
      held[i] = held[i - 1]!
      continue
    }
    const pi = p[i]!
    const qi = q[i]!
    held[i] = pi * pi + qi * qi <= flat * flat ? 1 : 0
    if (held[i]) continue
    outer[i] = headingOf(pi, qi)
    inner[i] = tiltOf(pi, qi)
  }
}

const shape = makeSlopeRun()

/** Follows the heading through each tilted run, the way that the move itself turns (a whole circle is a whole turn). */
function findRuns(
  path: JetPath,
  { first, last }: Pass,
  flat: number,
  { outer, inner, crossing, held }: AxisColumns,
  runs: TiltedRuns,
) {
  runs.count = 0
  let open = false
  for (let i = first; i <= last; i++) {
    if (held[i]) {
      // C goes on with a round move to the upright station, and comes with one from it: that needs travel as well.
      if (open) widen(runs, runs.to[runs.count - 1]! + path.sweep[i - 1]!)
      open = false
      continue
    }
    let carried = 0
    let arriving = i > first && held[i - 1] ? path.sweep[i - 1]! : 0
    if (open && !isSteady(path, i - 1)) {
      slopeRun(path, i - 1, shape)
      const turn = path.sweep[i - 1]!
      if (shape.flattest <= flat && shape.part > 0 && shape.part < 1) {
        crossing[i - 1] = shape.part
        widen(runs, outer[i - 1]! + turn * shape.part)
        arriving = turn * (1 - shape.part)
        carried = turn
        open = false
      } else {
        const before = outer[i - 1]!
        const now = before + turn + lessTurns(outer[i]! - before - turn)
        // Whole turns are added to the station's own heading, so that rounding does not pile up.
        outer[i]! += 2 * Math.PI * Math.round((now - outer[i]!) / (2 * Math.PI))
      }
    } else if (open) outer[i] = outer[i - 1]!
    else if (runs.count > 0) carried = path.sweep[runs.end[runs.count - 1]!]! + path.sweep[i - 1]!
    if (!open) {
      beginRun(runs, i, outer[i]!, carried)
      widen(runs, outer[i]! - arriving)
      open = true
    }
    const r = runs.count - 1
    runs.end[r] = i
    runs.to[r] = outer[i]!
    widen(runs, outer[i]!)
    if (inner[i]! > runs.steepest[r]!) runs.steepest[r] = inner[i]!
  }
}

/** Takes an angle into the range of the last run. */
function widen(runs: TiltedRuns, c: number) {
  const r = runs.count - 1
  if (c < runs.low[r]!) runs.low[r] = c
  if (c > runs.high[r]!) runs.high[r] = c
}

function beginRun(runs: TiltedRuns, i: number, c: number, carried: number) {
  const r = runs.count++
  runs.start[r] = i
  runs.from[r] = runs.low[r] = runs.high[r] = c
  runs.steepest[r] = 0
  runs.carried[r] = carried
}

/**
 * C over the held stretches: as the run before left it, turned along the stretch's longest move to what the run after
 * needs; a stretch of one station turns there at a standstill. A pass that is vertical all along keeps `before`.
 */
function hold(
  path: JetPath,
  { first, last }: Pass,
  head: HeadSpec,
  out: AxisColumns,
  runs: TiltedRuns,
  before: number,
) {
  for (let r = 0; r <= runs.count; r++) {
    const from = r === 0 ? first : runs.end[r - 1]! + 1
    const until = r === runs.count ? last : runs.start[r]! - 1
    if (from > until) continue
    const leaving = r === 0 ? null : out.outer[from - 1]! + path.sweep[from - 1]!
    const needed = r === runs.count ? null : out.outer[until + 1]! - path.sweep[until]!
    const end = needed ?? leaving ?? before
    const start = leaving ?? end
    const turnsFrom = start === end ? from - 1 : longestMove(path, from, until)
    for (let i = from; i <= until; i++) {
      const c = i <= turnsFrom ? start : end
      out.outer[i] = c
      const tilt = nearestTilt(path.p[i]!, path.q[i]!, c)
      out.inner[i] = Math.min(head.inner.to, Math.max(head.inner.from, tilt))
    }
    if (from === until && Math.abs(end - start) > SAME_ANGLE) out.dwell[from] = end - start
  }
}

/** The station from which the longest move between two stations begins; the last of equals. One before the first where there is no move. */
function longestMove({ x, y, sweep, cx, cy }: JetPath, from: number, until: number): number {
  let best = from - 1
  let longest = -1
  for (let i = from; i < until; i++) {
    const round = sweep[i] !== 0
    const length = round
      ? Math.abs(sweep[i]!) * Math.hypot(x[i]! - cx[i]!, y[i]! - cy[i]!)
      : Math.hypot(x[i + 1]! - x[i]!, y[i + 1]! - y[i]!)
    if (length >= longest) {
      longest = length
      best = i
    }
  }
  return best
}
