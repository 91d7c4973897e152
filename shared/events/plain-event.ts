import type { Frame } from '../contours/frame.ts'
import type { EdgeRef } from '../walls/types.ts'
import { First, type Happening } from './first.ts'
import { edgeOrder, offerPlainMeetings, offerPlainVanishings, plainMarch } from './plain.ts'
import { isStill, plainStretches, type PlainStretch } from './stretches.ts'
import type { BodyEvent } from './types.ts'

/** The first event of a plain body. The march begins at the drawing: `touching` hears of pairs that may touch there. */
export function plainEvent(
  frame: Frame,
  touching: ((a: number, b: number) => void) | null = null,
): BodyEvent | null {
  const edges = edgeOrder(frame)
  let heard = touching
  for (const stretch of plainStretches(frame)) {
    const still = isStill(stretch.rate)
    if (still && !heard) continue
    const march = plainMarch(frame, edges, stretch)
    const first = new First(stretch.length)
    if (!still) offerPlainVanishings(march, first)
    offerPlainMeetings(march, first, heard)
    heard = null
    const { found } = first
    if (found) return eventOf(frame, stretch, found)
  }
  return null
}

export function eventOf(frame: Frame, stretch: PlainStretch, found: Happening): BodyEvent {
  const { t, kind, edge, other, x, y } = found
  return {
    kind,
    ...refOf(frame, edge),
    depth: stretch.depthAt(Math.min(t, stretch.length)),
    at: { x, y },
    other: other < 0 ? null : refOf(frame, other),
  }
}

function refOf(frame: Frame, g: number): EdgeRef {
  return { loop: frame.loopOf[g]!, edge: frame.edgeOf[g]! }
}
