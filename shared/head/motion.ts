import type { JetPath, Pass } from '../passes/types.ts'
import { isSteady, makeSlopeRun, slopeRun, type SlopeRun } from './slope-run.ts'
import type { HeadAxes, HeadProblem, HeadProblemCode, HeadSpec } from './types.ts'

/** What makes a move take as long as it does. */
export const MotionLimit = {
  /** The wish, or nothing: the move has no length. */
  none: 0,
  rotary: 1,
  linear: 2,
} as const

/** What the process asks of every move; column i tells the move from station i to i + 1. */
export interface WishedMotion {
  /** Speed of the point where the jet's axis crosses the top face, mm/min; 0 for none. */
  readonly feed: Float64Array
  /** Shortest time of the move, minutes: of a pivot for example, at which the top point stands still. */
  readonly minutes?: Float64Array | undefined
}

export interface MotionAlong {
  /** Way of the top point, mm. */
  readonly length: Float64Array
  readonly minutes: Float64Array
  /** Mean feed of the top point, mm/min: never above the wish; 0 where it stands still. */
  readonly feed: Float64Array
  /** A `MotionLimit`. */
  readonly limit: Uint8Array
  /** Of all passes, without the ways between them. */
  readonly totalMinutes: number
  readonly problems: readonly HeadProblem[]
}

/** A move that takes longer by less than this part of its wished time is no problem to tell. Ours. */
const NOTABLE_SLOWING = 0.01

/**
 * Time and feed of every move when the feed is lowered only as long as an axis is too slow for it, and a move without
 * length takes its rotary time. Without a wish: the shortest times that the head can do. Rotary times follow C's
 * swing past the vertical in closed form; A and the pivot are taken as even along a move, which `refine` does
 * not. `standoff`: from the tip to the plate along the axis, mm.
 */
export function motionAlong(
  path: JetPath,
  passes: readonly Pass[],
  axes: HeadAxes,
  head: HeadSpec,
  standoff: number,
  wish: WishedMotion | null,
): MotionAlong {
  const numbers = () => new Float64Array(path.count)
  const [length, minutes, feed] = [numbers(), numbers(), numbers()]
  const limit = new Uint8Array(path.count)
  const problems: HeadProblem[] = []
  const slow = makeSlowing(path, problems)
  const pace = wishedPace(path, passes, wish)
  let total = 0
  for (const { first, last } of passes) {
    for (let i = first; i < last; i++) {
      const way = topLength(path, i)
      length[i] = way
      const wished = pace[i]!
      const still = Math.abs(axes.dwell[i + 1]!) / (60 * head.outer.speed)
      let time = wished
      if (isSteady(path, i) && axes.outer[i] === axes.outer[i + 1]) {
        const linear = way / head.linearSpeed
        if (linear > time) {
          time = linear
          limit[i] = MotionLimit.linear
        }
      } else {
        const rotary = rotaryMinutes(path, i, axes, head, wished)
        const linear = linearWay(path, i, standoff, head.pivotLength) / head.linearSpeed
        time = Math.max(wished, rotary, linear)
        if (time > wished) limit[i] = rotary >= linear ? MotionLimit.rotary : MotionLimit.linear
      }
      if (still > 0) {
        time += still
        limit[i] = MotionLimit.rotary
      }
      minutes[i] = time
      feed[i] = time > 0 ? way / time : 0
      total += time
      if (wished > 0 && time > wished * (1 + NOTABLE_SLOWING))
        noteSlowing(slow, i, way, wished, time, limit[i]!)
      else endSlowing(slow)
    }
    endSlowing(slow)
  }
  return { length, minutes, feed, limit, totalMinutes: total, problems }
}

/** Minutes that each move takes as the process wishes it; 0 where it wishes nothing. */
export function wishedPace(path: JetPath, passes: readonly Pass[], wish: WishedMotion | null): Float64Array {
  const pace = new Float64Array(path.count)
  if (!wish) return pace
  for (const { first, last } of passes) {
    for (let i = first; i < last; i++) {
      const asked = wish.feed[i]!
      pace[i] = Math.max(asked > 0 ? topLength(path, i) / asked : 0, wish.minutes?.[i] ?? 0)
    }
  }
  return pace
}

/** Inverse time feed of a move (G93): the move takes 1/F minutes. 0 for a move that takes no time. */
export function inverseTimeFeed(minutes: number): number {
  return minutes > 0 ? 1 / minutes : 0
}

/** Way of the top point: straight, or round about a centre from which its distance goes evenly (the mean one is used: exact where both are alike). */
function topLength({ x, y, sweep, cx, cy }: JetPath, i: number): number {
  const dx = x[i + 1]! - x[i]!
  const dy = y[i + 1]! - y[i]!
  if (sweep[i] === 0) return Math.sqrt(dx * dx + dy * dy)
  const from = Math.hypot(x[i]! - cx[i]!, y[i]! - cy[i]!)
  const to = Math.hypot(x[i + 1]! - cx[i]!, y[i + 1]! - cy[i]!)
  return Math.hypot((Math.abs(sweep[i]!) * (from + to)) / 2, to - from)
}

const shape = makeSlopeRun()

/** Shortest time that the rotary axes need for a move which otherwise takes `pace` minutes, evenly. */
function rotaryMinutes(path: JetPath, i: number, axes: HeadAxes, head: HeadSpec, pace: number): number {
  const { outer, inner, dwell, held } = axes
  slopeRun(path, i, shape)
  const turn = outer[i + 1]! - dwell[i + 1]! - outer[i]!
  const sweep = Math.abs(path.sweep[i]!)
  const outerRate = 60 * head.outer.speed
  const innerRate = 60 * head.inner.speed
  if (head.kind === 'A-B') {
    // Going round, both tilts swing to and fro: no faster than the slope's own turning.
    const slope = Math.max(Math.hypot(path.p[i]!, path.q[i]!), Math.hypot(path.p[i + 1]!, path.q[i + 1]!))
    const swing = sweep === 0 ? 0 : sweep * slope + shape.change
    const tilt = inner[i + 1]! - inner[i]!
    return Math.max(Math.max(swing, Math.abs(turn)) / outerRate, Math.max(swing, Math.abs(tilt)) / innerRate)
  }
  // A goes down to where the jet is flattest and up again.
  const flattest = Math.atan(shape.flattest)
  const from = Math.abs(inner[i]!)
  const to = Math.abs(inner[i + 1]!)
  const dips = shape.part > 0 && shape.part < 1
  const tilting = (dips ? from + to - 2 * flattest : Math.abs(inner[i + 1]! - inner[i]!)) / innerRate
  if (axes.crossing[i] !== 0) {
    const jump = Math.abs(turn - path.sweep[i]!)
    return Math.max(pace, sweep / outerRate, tilting) + jump / outerRate
  }
  if (held[i] !== 0 || held[i + 1] !== 0) return Math.max(tilting, Math.abs(turn) / outerRate)
  return Math.max(tilting, swingMinutes(shape, sweep, outerRate, pace))
}

/**
 * Time of a move during which C follows the heading of a slope that passes the vertical at a distance D: per part u of
 * the move it turns by sweep + D·M/(D² + M²(u − u₀)²), fastest at u₀. Where that is above the axis' rate the move
 * slows to it, elsewhere it keeps its pace (derived).
 */
function swingMinutes({ change, offset, foot }: SlopeRun, sweep: number, rate: number, pace: number): number {
  const spare = pace * rate - sweep
  const peak = offset > 0 ? change / offset : 0
  if (peak <= spare || peak === 0) return Math.max(pace, sweep / rate)
  const angle = (u: number) => Math.atan((change * (u - foot)) / offset)
  if (spare <= 0) return (sweep + angle(1) - angle(0)) / rate
  const half = Math.sqrt((offset * change) / spare - offset * offset) / change
  const from = Math.min(1, Math.max(0, foot - half))
  const to = Math.min(1, Math.max(0, foot + half))
  return pace * (1 - (to - from)) + (sweep * (to - from) + angle(to) - angle(from)) / rate
}

/** The longer way of tip and pivot, in the frame that turns with the move: from end to end there, and the turning. */
function linearWay(path: JetPath, i: number, standoff: number, pivotLength: number): number {
  return Math.max(wayAt(path, i, standoff), wayAt(path, i, standoff + pivotLength))
}

function wayAt({ x, y, p, q, sweep, cx, cy }: JetPath, i: number, lever: number): number {
  const j = i + 1
  const turn = sweep[i]!
  const a = lever / Math.sqrt(1 + p[i]! * p[i]! + q[i]! * q[i]!)
  const b = lever / Math.sqrt(1 + p[j]! * p[j]! + q[j]! * q[j]!)
  const x0 = x[i]! - a * p[i]! - cx[i]!
  const y0 = y[i]! - a * q[i]! - cy[i]!
  let x1 = x[j]! - b * p[j]! - cx[i]!
  let y1 = y[j]! - b * q[j]! - cy[i]!
  let round = 0
  if (turn !== 0) {
    const c = Math.cos(turn)
    const s = Math.sin(turn)
    const back = x1 * c + y1 * s
    y1 = y1 * c - x1 * s
    x1 = back
    round = Math.abs(turn) * Math.sqrt(Math.max(x0 * x0 + y0 * y0, x1 * x1 + y1 * y1))
  }
  return round + Math.sqrt((x1 - x0) ** 2 + (y1 - y0) ** 2 + (b - a) ** 2)
}

/** The stretch of slowed moves being walked, told at its worst when it ends. */
interface Slowing {
  readonly path: JetPath
  readonly problems: HeadProblem[]
  station: number
  share: number
  limit: number
  value: number
  wished: number
}

function makeSlowing(path: JetPath, problems: HeadProblem[]): Slowing {
  return { path, problems, station: -1, share: 0, limit: MotionLimit.none, value: 0, wished: 0 }
}

function noteSlowing(slow: Slowing, i: number, way: number, wished: number, time: number, limit: number) {
  const { edge } = slow.path
  if (slow.station >= 0 && (edge[i] !== edge[slow.station] || limit !== slow.limit)) endSlowing(slow)
  const share = time / wished
  if (slow.station >= 0 && share <= slow.share) return
  const still = way === 0
  slow.station = i
  slow.share = share
  slow.limit = limit
  slow.value = still ? time : way / time
  slow.wished = still ? wished : way / wished
}

function endSlowing(slow: Slowing) {
  const { station, limit, value, wished } = slow
  if (station < 0) return
  const code: HeadProblemCode =
    limit === MotionLimit.rotary ? 'feed-limited-by-rotary' : 'feed-limited-by-linear'
  const edge = slow.path.edge[station]!
  slow.problems.push({ code, station, edge, axis: null, value, limit: wished, unwindAt: -1 })
  slow.station = -1
}
