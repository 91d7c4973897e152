import { jetAt } from '../passes/jet-at.ts'
import { MoveKind, type JetPath, type Pass } from '../passes/types.ts'
import type { FeedAlong } from './feed-along.ts'
import { feedFor } from './feed.ts'
import type { ProcessSpec } from './spec.ts'

export type FeedFaultCode =
  /** Some point of the jet within the plate is faster than the material allows. */
  | 'too-fast'
  /** A length is not that of the axis' way. */
  | 'length'
  /** Minutes of a move, a pass or the whole are not the sum of their parts. */
  | 'sum'
  /** Water and abrasive do not follow from the minutes. */
  | 'consumption'
  | 'not-finite'

export interface FeedFault {
  readonly code: FeedFaultCode
  /** Station; pass, or −1 for all, where a sum of passes is meant. */
  readonly at: number
  readonly value: number
}

/** Straight pieces that a move is looked at in. */
const PIECES = 64
const DEPTHS = 5

/** Rounding of sums over a whole path, as a share. */
const ROUNDING = 1e-9

/**
 * What is wrong with feeds along a path, by walking every move in small pieces. Chords fall short of the way by a
 * third of what halving them gained, or nearly: lengths are held between the chords and them plus all of that gain.
 * Speeds are told by chords and never too high.
 */
export function feedFaults(
  path: JetPath,
  passes: readonly Pass[],
  thickness: number,
  spec: ProcessSpec,
  feeds: FeedAlong,
): FeedFault[] {
  const faults: FeedFault[] = []
  for (let i = 0; i + 1 < path.count; i++) {
    if (path.move[i] === MoveKind.end) continue
    const minutes = feeds.minutes[i]!
    if (!Number.isFinite(minutes) || !Number.isFinite(feeds.feed[i]!)) {
      faults.push({ code: 'not-finite', at: i, value: minutes })
      continue
    }
    checkMove(path, i, thickness, spec, feeds, faults)
  }
  for (const [k, { first, last }] of passes.entries()) {
    const told = feeds.passes[k]!
    let minutes = told.pierceMinutes
    for (let i = first; i < last; i++) minutes += feeds.minutes[i]!
    if (!isNear(told.minutes, minutes)) faults.push({ code: 'sum', at: k, value: told.minutes - minutes })
    if (!isNear(told.abrasive, (spec.make.abrasiveRate * minutes) / 1000))
      faults.push({ code: 'consumption', at: k, value: told.abrasive })
  }
  const all = feeds.passes.reduce((sum, pass) => sum + pass.minutes, 0)
  if (!isNear(feeds.total.minutes, all))
    faults.push({ code: 'sum', at: -1, value: feeds.total.minutes - all })
  return faults
}

function checkMove(
  path: JetPath,
  i: number,
  thickness: number,
  spec: ProcessSpec,
  feeds: FeedAlong,
  faults: FeedFault[],
) {
  const kind = path.move[i]
  const inWaste = kind === MoveKind.leadIn || kind === MoveKind.leadOut || kind === MoveKind.turn
  const quality = inWaste ? (spec.wasteQuality ?? spec.quality) : spec.quality
  // Time that the whole move takes at full feed: what the speed between the slow parts is told by.
  const whole = feeds.feed[i]! > 0 ? feeds.topLength[i]! / feeds.feed[i]! : feeds.minutes[i]!
  const full = feeds.slowUntil[i]! - feeds.slowFrom[i]!
  const slow = feeds.slowFeed[i]! > 0 ? feeds.topLength[i]! / feeds.slowFeed[i]! : feeds.minutes[i]!
  if (!isNear(feeds.minutes[i]!, full * whole + (1 - full) * slow))
    faults.push({ code: 'sum', at: i, value: feeds.minutes[i]! })
  for (let k = 0; k < DEPTHS; k++) {
    const depth = (k / (DEPTHS - 1)) * thickness
    let length = 0
    let coarse = 0
    for (let n = 0; n < PIECES; n++) {
      const [a, b] = [jetAt(path, i, n / PIECES), jetAt(path, i, (n + 1) / PIECES)]
      const step = Math.hypot(b.x - a.x + depth * (b.p - a.p), b.y - a.y + depth * (b.q - a.q))
      length += step
      if (n % 2 === 1) {
        const c = jetAt(path, i, (n - 1) / PIECES)
        coarse += Math.hypot(b.x - c.x + depth * (b.p - c.p), b.y - c.y + depth * (b.q - c.q))
      }
      const h = thickness * Math.sqrt(1 + Math.min(a.p ** 2 + a.q ** 2, b.p ** 2 + b.q ** 2))
      const allowed = feedFor(spec.material.machinability, spec.make, quality, h, spec.abrasive.factor)
      if (typeof allowed === 'number' && step * PIECES > allowed * whole * (1 + ROUNDING))
        faults.push({ code: 'too-fast', at: i, value: (step * PIECES) / (allowed * whole) })
    }
    if (k > 0 && k < DEPTHS - 1) continue
    const told = (k === 0 ? feeds.topLength : feeds.bottomLength)[i]!
    const rounding = ROUNDING * (1 + told)
    if (told < length - rounding || told > 2 * length - coarse + rounding)
      faults.push({ code: 'length', at: i, value: told - length })
  }
}

function isNear(a: number, b: number): boolean {
  return Math.abs(a - b) <= ROUNDING * Math.max(1, Math.abs(a), Math.abs(b))
}
