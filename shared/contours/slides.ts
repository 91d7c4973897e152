import { rowRates } from '../walls/wall-table.ts'
import type { Frame } from './frame.ts'

/**
 * How far corners slide along their two edges. Where the edge before a corner moves outward by w₁ and the edge after it
 * by w₂, and the tangent turns by φ, the corner moves by
 *
 *   ahead = (w₂ − w₁)/sin φ + w₁ tan(φ/2)   along the edge before it, and
 *   back  = (w₂ − w₁)/sin φ − w₂ tan(φ/2)   along the edge after it
 *
 * (derived from v·n₁ = w₁ and v·n₂ = w₂; nothing cancels for small turns). So an edge grows by the `ahead` of the
 * corner at its end less the `back` of the one at its start, and a seam's slope is √(w₁² + ahead²). At steps both are
 * without meaning.
 */
export interface Slides {
  readonly ahead: Float64Array
  readonly back: Float64Array
}

/** A figure for every row of the wall table: at the edge's end for the edge before a corner, at its start for the one after. */
export interface RowFigures {
  readonly start: ArrayLike<number>
  readonly end: ArrayLike<number>
}

export function slidesOf(frame: Frame, rows: RowFigures): Slides {
  const out = { ahead: new Float64Array(frame.count), back: new Float64Array(frame.count) }
  for (let g = 0; g < frame.count; g++) slideCorner(frame, g, rows, out)
  return out
}

export function slideCorner(frame: Frame, g: number, { start, end }: RowFigures, out: Slides): void {
  const { rowOfEdge } = frame.table
  const w1 = end[rowOfEdge[frame.previous[g]!]!]!
  const w2 = start[rowOfEdge[g]!]!
  const sin = frame.turnSin[g]!
  const half = sin / (1 + frame.turnCos[g]!)
  const unlike = w1 === w2 ? 0 : (w2 - w1) / sin
  out.ahead[g] = w1 === 0 ? unlike : unlike + w1 * half
  out.back[g] = w2 === 0 ? unlike : unlike - w2 * half
}

/** What holds between two neighbouring levels. */
export interface Band {
  readonly from: number
  readonly to: number
  /** Tangents of the tilts. */
  readonly rate: RowFigures
  /** Slides per mm of depth. */
  readonly slides: Slides
}

const bands = new WeakMap<Frame, readonly Band[]>()

/** The bands of a frame from the top down, worked out once. */
export function bandsOf(frame: Frame): readonly Band[] {
  let known = bands.get(frame)
  if (!known) {
    const { levels } = frame
    known = levels.slice(1).map((to, i) => {
      const from = levels[i]!
      const rate = ratesAt(frame, from)
      return { from, to, rate, slides: slidesOf(frame, rate) }
    })
    bands.set(frame, known)
  }
  return known
}

/** The bands of a frame that has got other walls in place: what corners slide by is the caller's to put right. */
export function rerateBands(frame: Frame, known: readonly Band[]): readonly Band[] {
  const again = known.map((band) => ({ ...band, rate: ratesAt(frame, band.from) }))
  bands.set(frame, again)
  return again
}

function ratesAt({ table }: Frame, depth: number): RowFigures {
  const start = Float64Array.from(rowRates(table, table.start, depth))
  return { start, end: table.blends ? Float64Array.from(rowRates(table, table.end, depth)) : start }
}
