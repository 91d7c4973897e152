import { MoveKind, type JetPath, type Pass } from '../passes/types.ts'
import { FEED_POWER, type FeedRefusal } from './feed.ts'
import { runAtDepth } from './move-length.ts'
import { slowParts } from './slow-parts.ts'
import { settle, type ProcessRefusal, type ProcessSpec, type Settled } from './spec.ts'

/** What holds a move's speed down. */
export const FeedLimit = {
  /** Nothing moves: the last station of a pass, or a move without length. */
  none: 0,
  /** The material, at the top face. */
  top: 1,
  /** The material, at the bottom face, where the jet runs faster than at the top. */
  bottom: 2,
  /** The head's own speed. */
  head: 3,
} as const
export type FeedLimit = (typeof FeedLimit)[keyof typeof FeedLimit]

/** Of one pass or of all; times in minutes. */
export interface Consumption {
  /** Jet on: piercing and moving. */
  readonly minutes: number
  readonly pierceMinutes: number
  /** Way of the axis at the top face, mm. */
  readonly length: number
  /** l */
  readonly water: number
  /** kg */
  readonly abrasive: number
}

/**
 * Column i tells the move from station i to i + 1. **Feed is the speed of the point where the axis crosses the top
 * face**, mm/min, the mean over the move; the move's parameter goes evenly with time between `slowFrom` and
 * `slowUntil`, and evenly but slower outside. A move whose top point stands still (some pivots) has feed 0: its time is
 * what tells its speed.
 */
export interface FeedAlong {
  readonly kind: 'feeds'
  /** mm, of the axis at the top and at the bottom face. */
  readonly topLength: Float64Array
  readonly bottomLength: Float64Array
  readonly feed: Float64Array
  /** Feed in the slow parts: from the start up to the part `slowFrom` of the move and from `slowUntil` to its end. */
  readonly slowFeed: Float64Array
  readonly slowFrom: Float64Array
  readonly slowUntil: Float64Array
  /** Of the whole move, slow parts and all. */
  readonly minutes: Float64Array
  /** A `FeedLimit` of the part that is not slowed for a corner. */
  readonly limit: Uint8Array
  readonly passes: readonly Consumption[]
  readonly total: Consumption
}

/**
 * Feeds, times, water and abrasive along the passes of a plate. Within the plate no point of the axis, top or bottom, is
 * faster than the material allows for the jet's longest path h through it during the move (all of the plate's thickness,
 * also where a pass before has taken some of the metal away). The jet's ways from pass to pass, off, are not in it.
 * `leastMinutes`: per move the shortest time that the head can do it in, where known. Refused where the spec is.
 */
export function feedAlong(
  path: JetPath,
  passes: readonly Pass[],
  thickness: number,
  spec: ProcessSpec,
  leastMinutes: Float64Array | null = null,
): FeedAlong | ProcessRefusal {
  const settled = settle(spec)
  if (settled.kind === 'refused') return settled
  if (!(thickness > 0 && thickness < Infinity)) return pathRefusal
  const { count } = path
  const numbers = () => new Float64Array(count)
  const [topLength, bottomLength, feed, slowFeed, minutes] = [
    numbers(),
    numbers(),
    numbers(),
    numbers(),
    numbers(),
  ]
  const quickest = numbers()
  const limit = new Uint8Array(count)
  const run = { length: 0, fastest: 0 }
  for (let i = 0; i + 1 < count; i++) {
    if (path.move[i] === MoveKind.end) continue
    runAtDepth(path, i, 0, run)
    topLength[i] = run.length
    const top = run.fastest
    runAtDepth(path, i, thickness, run)
    bottomLength[i] = run.length
    const fastest = Math.max(top, run.fastest)
    if (fastest === 0) continue
    quickest[i] = fastest / materialFeed(path, i, thickness, settled)
    limit[i] = run.fastest > top ? FeedLimit.bottom : FeedLimit.top
  }
  const slow = slowParts(path, passes, topLength, settled.corners)
  for (let i = 0; i + 1 < count; i++) {
    const head = leastMinutes?.[i] ?? 0
    const slowTime = Math.max(quickest[i]! / settled.corners.share, head)
    const fullTime = Math.max(quickest[i]!, head)
    if (head > quickest[i]!) limit[i] = FeedLimit.head
    if (fullTime === 0) continue
    feed[i] = topLength[i]! / fullTime
    slowFeed[i] = topLength[i]! / slowTime
    const full = slow.until[i]! - slow.from[i]!
    minutes[i] = full * fullTime + (1 - full) * slowTime
  }
  const consumptions = passes.map((pass) => consumptionOf(path, pass, thickness, settled, topLength, minutes))
  return {
    kind: 'feeds',
    topLength,
    bottomLength,
    feed,
    slowFeed,
    slowFrom: slow.from,
    slowUntil: slow.until,
    minutes,
    limit,
    passes: consumptions,
    total: sumOf(consumptions),
  }
}

const pathRefusal: FeedRefusal = { kind: 'refused', code: 'path-out-of-range' }

/** Feed that the material allows during move i: that of the jet's steepest line, which is at one end of it as the slope's size is convex along a move. */
function materialFeed(
  { p, q, move }: JetPath,
  i: number,
  thickness: number,
  { wallFeed, wasteFeed }: Settled,
): number {
  const square = (k: number) => 1 + p[k]! * p[k]! + q[k]! * q[k]!
  const longest = thickness * Math.sqrt(Math.max(square(i), square(i + 1)))
  const kind = move[i]
  const inWaste = kind === MoveKind.leadIn || kind === MoveKind.leadOut || kind === MoveKind.turn
  return (inWaste ? wasteFeed : wallFeed) / longest ** FEED_POWER
}

function consumptionOf(
  { p, q }: JetPath,
  { first, last }: Pass,
  thickness: number,
  { pierceSeconds, water, abrasiveRate }: Settled,
  lengths: Float64Array,
  times: Float64Array,
): Consumption {
  const depth = thickness * Math.sqrt(1 + p[first]! * p[first]! + q[first]! * q[first]!)
  const pierceMinutes = (pierceSeconds * depth) / 60
  let minutes = pierceMinutes
  let length = 0
  for (let i = first; i < last; i++) {
    minutes += times[i]!
    length += lengths[i]!
  }
  return { minutes, pierceMinutes, length, water: water * minutes, abrasive: abrasiveRate * minutes }
}

function sumOf(consumptions: readonly Consumption[]): Consumption {
  const sum = (of: (consumption: Consumption) => number) =>
    consumptions.reduce((all, one) => all + of(one), 0)
  return {
    minutes: sum((one) => one.minutes),
    pierceMinutes: sum((one) => one.pierceMinutes),
    length: sum((one) => one.length),
    water: sum((one) => one.water),
    abrasive: sum((one) => one.abrasive),
  }
}
