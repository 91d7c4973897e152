import { BOX_STRIDE, boxTree, visitMeetingPairs } from '../geometry/boxes.ts'
import { boundsOf } from '../geometry/loop.ts'
import { nearbyOrder } from '../geometry/order.ts'
import { roundingOf } from '../geometry/rounding.ts'
import { chainOf, type Chain } from './chain.ts'
import { marchOf, type March, type Window } from './march.ts'
import { offerCornerFolds } from './corner-fold.ts'
import { First } from './first.ts'
import { frameOf, type Frame } from '../contours/frame.ts'
import { levelsOf } from '../walls/levels.ts'
import { offerMeeting } from './meet.ts'
import { isPlain } from './plain.ts'
import { plainEvent } from './plain-event.ts'
import { fillMotionBoxes } from './motion-boxes.ts'
import type { Body, EdgeRef } from '../walls/types.ts'
import type { BodyEvent } from './types.ts'
import { fillOffsets, fillRates, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'
import { offerVanishings } from './vanish.ts'

/**
 * The first event of the body, null when there is none between 0 and the thickness (both included). The
 * drawing is marched away from: with datum 'top' downward, with 'bottom' upward from the thickness (the event
 * is then the lowest one), with 'root' first from the outline to the top contour all at once (an event on the
 * way is told at depth 0), then downward. Depth is right to 1e-9 of itself where only lines are concerned.
 */
export function firstEvent(body: Body): BodyEvent | null {
  const known = events.get(body)
  if (known !== undefined) return known
  const event = march(frameOf(body))
  events.set(body, event)
  return event
}

const events = new WeakMap<Body, BodyEvent | null>()

/** One even stretch of the way from the drawing. */
interface Stretch {
  readonly length: number
  readonly offset: EdgeEnds
  readonly rate: EdgeEnds
  readonly depthAt: (t: number) => number
}

function march(frame: Frame): BodyEvent | null {
  const { body } = frame
  if (frame.count === 0) return null
  if (isPlain(frame)) return plainEvent(frame)
  const order = nearbyOrder(body.loops.map((loop) => loop[0]?.from ?? { x: 0, y: 0 }))
  const chain = chainOf(frame, order)
  const near = roundingOf(boundsOf(body.loops.flat()))
  for (const stretch of stretchesOf(frame)) {
    const happening = firstHappening(chain, stretch, near)
    if (!happening) continue
    const { t, kind, edge, other, x, y } = happening
    return {
      kind,
      ...refOf(frame, edge),
      depth: stretch.depthAt(Math.min(t, stretch.length)),
      at: { x, y },
      other: other < 0 ? null : refOf(frame, other),
    }
  }
  return null
}

function firstHappening(chain: Chain, { length, offset, rate }: Stretch, near: number) {
  if (rate.start.every((w) => w === 0) && rate.end.every((w) => w === 0)) return null
  const run = marchOf(chain, offset, rate, length)
  const first = new First(length)
  offerVanishings(run, first)
  if (chain.frame.table.blends && chain.frame.hasArcs) offerCornerFolds(run, first)
  offerMeetings(run, near, first)
  return first.found
}

/** Only pairs whose boxes overlap at the same moment are looked at, and only up to the first happening so far. */
function offerMeetings(march: March, near: number, first: First): void {
  const boxes = new Float64Array(march.chain.count * BOX_STRIDE)
  for (const window of windowsOf(march, Math.min(first.until, march.length))) {
    const { from, to } = window
    if (from > first.until) return
    fillMotionBoxes(march, window, near, boxes)
    visitMeetingPairs(
      boxTree(boxes),
      () => (to > from ? (first.until - from) / (to - from) : 1),
      (e, f) => offerMeeting({ ...march, window }, e, f, near, first),
    )
  }
}

/**
 * The whole span at once; where points of blended arcs slide along them, piece by piece, as such a point has one box
 * for all the places where it goes. A corner slides with the square root of the time left before its curves part, so
 * that windows which shrink toward the end see it slide evenly.
 */
function windowsOf({ chain }: March, end: number): readonly Window[] {
  const count = chain.hasLoose ? LOOSE_WINDOWS : 1
  const at = (k: number) => (k === count ? end : end * (1 - (1 - k / count) ** 2))
  return Array.from({ length: count }, (_, k) => ({ from: at(k), to: at(k + 1) }))
}

const LOOSE_WINDOWS = 16

function* stretchesOf(frame: Frame): Generator<Stretch> {
  const { body, table } = frame
  const levels = levelsOf(body)
  const upward = body.datum === 'bottom'
  if (body.datum === 'root') {
    const rate = makeEdgeEnds(table)
    fillOffsets(table, 0, rate)
    yield { length: 1, offset: makeEdgeEnds(table), rate, depthAt: () => 0 }
  }
  for (let i = 1; i < levels.length; i++) {
    const [above, below] = upward
      ? [levels[levels.length - 1 - i]!, levels[levels.length - i]!]
      : [levels[i - 1]!, levels[i]!]
    const offset = makeEdgeEnds(table)
    const rate = makeEdgeEnds(table)
    fillOffsets(table, upward ? below : above, offset)
    fillRates(table, above, rate)
    if (upward) turnRound(rate)
    yield { length: below - above, offset, rate, depthAt: (t) => (upward ? below - t : above + t) }
  }
}

function refOf(frame: Frame, g: number): EdgeRef {
  const loop = frame.loopOf[g]!
  return { loop, edge: frame.edgeOf[g]! }
}

function turnRound({ start, end }: EdgeEnds): void {
  for (let g = 0; g < start.length; g++) start[g] = -start[g]!
  if (end !== start) for (let g = 0; g < end.length; g++) end[g] = -end[g]!
}
