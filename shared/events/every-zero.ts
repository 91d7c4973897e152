import type { First } from './first.ts'
import { firstZero } from './first-zero.ts'
import type { March } from './march.ts'

/** A measure of which the zeros are sought, and how far it can stray over a span from its middle. */
export interface Gap {
  readonly gap: (t: number) => number
  readonly stray: (from: number, to: number) => number
}

/** Looks at the zeros of a gap in turn, within the march's window, until `take` accepts one. */
export function everyZero(
  march: March,
  gap: (t: number) => number,
  slack: (from: number, to: number) => number,
  first: First,
  take: (t: number) => boolean,
): void {
  let start = march.window.from
  const end = Math.min(first.until, march.window.to)
  while (start < end) {
    const from = start
    const t = firstZero(
      (s) => gap(from + s),
      (a, b) => slack(from + a, from + b),
      end - from,
    )
    if (t === null || take(from + t)) return
    start = from + t + march.length * PAST_CROSSING
  }
}

/** Where a crossing beside the piece was passed over, the search goes on this share of the march later. */
const PAST_CROSSING = 1e-6
