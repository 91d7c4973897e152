import type { HeadSpec } from './types.ts'

/**
 * Which branch and which turn of C to take. While the jet is off vertical C follows its heading and the choice, a
 * number of half turns (odd: the other branch, A negative), cannot change. It can where the jet is vertical. A pass is
 * therefore a chain of **tilted runs**, and the choice a shortest way through a few candidates per run.
 */
export interface TiltedRuns {
  count: number
  /** First and last station. */
  readonly start: number[]
  readonly end: number[]
  /** C of the usual branch (A ≥ 0) at both ends, and its range between them, radians; each run by itself. */
  readonly from: number[]
  readonly to: number[]
  readonly low: number[]
  readonly high: number[]
  /** Greatest tilt. */
  readonly steepest: number[]
  /** How far C turns with a round move between the run before and this one, without a choice. */
  readonly carried: number[]
}

export function makeRuns(): TiltedRuns {
  return { count: 0, start: [], end: [], from: [], to: [], low: [], high: [], steepest: [], carried: [] }
}

/** Candidates per run: all that a travel of two whole turns offers, and an even count of either branch. */
const CANDIDATES = 6
/** What is weighed, per radian or per run, so that each matters only where those before it are equal: travel overrun, turning, A < 0, rewinding before the pass. */
const OVERRUN = 1e6
const NEGATIVE = 1e-6
const REWIND = 1e-8
/** Past the end of travel by less than this is at the end of it: far below any axis' resolution, radians. */
export const TRAVEL_ROUNDING = 1e-9

/**
 * Half turns to add to each run's C: within travel where possible, then the least turning at the verticals between runs,
 * then A ≥ 0, then the least rewinding from `before`, where C stands before the pass. Linear in runs.
 */
export function chooseHalfTurns(runs: TiltedRuns, { outer, inner }: HeadSpec, before: number): Int32Array {
  const { count } = runs
  const choice = new Int32Array(count)
  const lowest = new Int32Array(count)
  const offered = new Uint8Array(count)
  const back = new Uint8Array(count * CANDIDATES)
  let costs = new Float64Array(CANDIDATES)
  let next = new Float64Array(CANDIDATES)
  let reference = before
  for (let r = 0; r < count; r++) {
    const from = runs.from[r]!
    const low = runs.low[r]!
    const high = runs.high[r]!
    const steepest = runs.steepest[r]!
    // Half turns that keep this run within travel; where there are none, those about the middle of it.
    const least = Math.ceil((outer.from - TRAVEL_ROUNDING - low) / Math.PI)
    const most = Math.floor((outer.to + TRAVEL_ROUNDING - high) / Math.PI)
    const fits = least <= most
    const wished = Math.round((fits ? reference - from : (outer.from + outer.to - low - high) / 2) / Math.PI)
    const middle = fits ? Math.min(most, Math.max(least, wished)) : wished
    let first = middle - CANDIDATES / 2 + 1
    if (fits) first = Math.max(least, Math.min(first, most - CANDIDATES + 1))
    const offers = fits ? Math.min(CANDIDATES, most - first + 1) : CANDIDATES
    lowest[r] = first
    offered[r] = offers
    for (let j = 0; j < offers; j++) {
      const k = first + j
      const shift = k * Math.PI
      const odd = k % 2 !== 0
      const overrun =
        Math.max(0, outer.from - low - shift - TRAVEL_ROUNDING) +
        Math.max(0, high + shift - outer.to - TRAVEL_ROUNDING) +
        Math.max(0, (odd ? inner.from + steepest : steepest - inner.to) - TRAVEL_ROUNDING)
      const own = OVERRUN * overrun + (odd ? NEGATIVE : 0)
      if (r === 0) {
        next[j] = own + REWIND * Math.abs(from + shift - before)
        continue
      }
      const start = from + shift - runs.carried[r]! - runs.to[r - 1]!
      let best = Infinity
      for (let b = 0; b < offered[r - 1]!; b++) {
        const cost = costs[b]! + Math.abs(start - (lowest[r - 1]! + b) * Math.PI)
        if (cost < best) {
          best = cost
          back[r * CANDIDATES + j] = b
        }
      }
      next[j] = best + own
    }
    ;[costs, next] = [next, costs]
    reference = runs.to[r]! + middle * Math.PI + (runs.carried[r + 1] ?? 0)
  }
  let at = 0
  for (let j = 1; j < (offered[count - 1] ?? 0); j++) if (costs[j]! < costs[at]!) at = j
  for (let r = count - 1; r >= 0; r--) {
    choice[r] = lowest[r]! + at
    at = back[r * CANDIDATES + at]!
  }
  return choice
}
