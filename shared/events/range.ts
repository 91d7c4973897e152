import { firstEvent } from './event.ts'
import type { Body } from '../walls/types.ts'
import type { BodyEvent } from './types.ts'

/** The depths over which the plain contour is right. */
export interface SoundRange {
  /** 0, or the event's depth where the drawing is the bottom edge (then the body is told upward from it). */
  readonly from: number
  /** The thickness, or the event's depth. */
  readonly to: number
  /** No depth at all is sound: only with datum 'root', when even the top contour cannot be reached. */
  readonly empty: boolean
  readonly event: BodyEvent | null
}

const ranges = new WeakMap<Body, SoundRange>()

/** Looked for once for each body: bodies never change, and contours, volume and mesh all ask. */
export function soundRange(body: Body): SoundRange {
  let range = ranges.get(body)
  if (!range) {
    range = rangeOfEvent(body, firstEvent(body))
  }
  return range
}

/** The same for a body whose first event is known already; remembered for whoever asks later. */
export function rangeOfEvent(body: Body, event: BodyEvent | null): SoundRange {
  const range = rangeUpTo(body, event)
  ranges.set(body, range)
  return range
}

function rangeUpTo(body: Body, event: BodyEvent | null): SoundRange {
  const { thickness } = body
  if (!event) return { from: 0, to: thickness, empty: false, event }
  if (body.datum === 'bottom') return { from: event.depth, to: thickness, empty: false, event }
  return { from: 0, to: event.depth, empty: body.datum === 'root' && event.depth === 0, event }
}
