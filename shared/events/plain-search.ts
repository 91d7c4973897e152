import type { Frame } from '../contours/frame.ts'
import { bandsOf, slideCorner, type RowFigures } from '../contours/slides.ts'
import { rowOffsets } from '../walls/wall-table.ts'
import { First, type Happening } from './first.ts'
import { eventOf } from './plain-event.ts'
import {
  edgeOrder,
  offerPlainMeetings,
  offerPlainMeetingsOf,
  offerPlainVanishing,
  offerPlainVanishings,
  plainMarch,
  remarch,
  type EdgeOrder,
  type PlainMarch,
} from './plain.ts'
import { plainStretches } from './stretches.ts'
import type { BodyEvent } from './types.ts'

/** A stretch that has been searched, with all that happens first in it, simultaneously. */
interface Searched {
  readonly march: PlainMarch
  readonly found: readonly Happening[]
}

/**
 * The search for the first event of a plain body drawn at its top, kept so that the wall of one edge can change: pairs
 * without a touched edge keep what they had, so only those with one are looked at again.
 */
export class PlainSearch {
  #frame: Frame
  readonly #edges: EdgeOrder
  /** From the top down, none below the first that has something. */
  #searched: Searched[] = []

  constructor(frame: Frame) {
    this.#frame = frame
    this.#edges = edgeOrder(frame)
    this.#searchOn()
  }

  /** `frame` with edge g's new wall, its bands put right. */
  edit(frame: Frame, g: number): BodyEvent | null {
    this.#frame = frame
    const touched = [frame.previous[g]!, g, frame.next[g]!]
    const before = this.#searched
    this.#searched = []
    for (const [i, { march, found }] of before.entries()) {
      const again = remarched(march, frame, i, g)
      this.#searched.push({ march: again, found: foundAgain(again, found, touched) })
      if (this.#searched.at(-1)!.found.length > 0) break
    }
    if (this.#searched.at(-1)!.found.length === 0) this.#searchOn()
    return this.#event()
  }

  /** Searches the stretches below those that have been. */
  #searchOn(): void {
    let i = 0
    for (const stretch of plainStretches(this.#frame)) {
      if (i++ < this.#searched.length) continue
      const march = plainMarch(this.#frame, this.#edges, stretch)
      const found = searchAll(march)
      this.#searched.push({ march, found })
      if (found.length > 0) return
    }
  }

  #event(): BodyEvent | null {
    const { march, found } = this.#searched.at(-1)!
    const first = new First(march.length)
    for (const happening of found) offerAgain(first, happening)
    return first.found && eventOf(this.#frame, march, first.found)
  }
}

function searchAll(march: PlainMarch): readonly Happening[] {
  const first = new First(march.length)
  offerPlainVanishings(march, first)
  offerPlainMeetings(march, first, null)
  return first.all
}

/** The march of stretch i (band i) with the new wall of edge g. */
function remarched(march: PlainMarch, frame: Frame, i: number, g: number): PlainMarch {
  const { from, rate, slides } = bandsOf(frame)[i]!
  const corners = [g, frame.next[g]!]
  let start = march.start
  if (start) {
    const both = Float64Array.from(rowOffsets(frame.table, frame.table.start, from))
    const offset: RowFigures = { start: both, end: both }
    for (const corner of corners) slideCorner(frame, corner, offset, start.slides)
    start = { offset, slides: start.slides }
  }
  const again = { ...march, frame, rate, slides, start }
  remarch(again, corners)
  return again
}

/** What of the old remains true, and what the touched edges do now. */
function foundAgain(
  march: PlainMarch,
  found: readonly Happening[],
  touched: readonly number[],
): readonly Happening[] {
  const kept = found.filter(({ edge, other }) => !touched.includes(edge) && !touched.includes(other))
  // When the earliest itself is gone, what came next was never kept.
  if (found.length > 0 && earliest(kept) !== earliest(found)) return searchAll(march)
  const first = new First(march.length)
  for (const happening of kept) offerAgain(first, happening)
  for (const g of touched) offerPlainVanishing(march, g, first)
  for (const g of touched) offerPlainMeetingsOf(march, g, first)
  return first.all
}

function earliest(found: readonly Happening[]): number {
  return found.reduce((least, { t }) => Math.min(least, t), Infinity)
}

function offerAgain(first: First, { t, kind, edge, other, x, y }: Happening): void {
  first.offer(t, kind, edge, other, x, y)
}
