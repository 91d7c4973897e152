import type { Frame } from '../contours/frame.ts'
import { bandsOf, slidesOf, type RowFigures, type Slides } from '../contours/slides.ts'
import { rowOffsets } from '../walls/wall-table.ts'

/** One even stretch of the way from the drawing, `t` from 0 to `length`, by row of the wall table. */
export interface PlainStretch {
  readonly length: number
  readonly depthAt: (t: number) => number
  /** How fast edges move outward, and corners slide along their edges, per unit of t. */
  readonly rate: RowFigures
  readonly slides: Slides
  /** How far edges have moved and corners have slid when the stretch begins; null at the drawing itself. */
  readonly start: { readonly offset: RowFigures; readonly slides: Slides } | null
}

/**
 * With datum 'top' downward from 0, with 'bottom' upward from the thickness, with 'root' first from the outline to the
 * top contour all at once, then downward. The first stretch begins at the drawing.
 */
export function* plainStretches(frame: Frame): Generator<PlainStretch> {
  const { body, table, levels } = frame
  const { datum, thickness } = body
  const offsetsAt = (depth: number): RowFigures => {
    const both = Float64Array.from(rowOffsets(table, table.start, depth))
    return { start: both, end: both }
  }
  const startAt = (depth: number, atDrawing: boolean) => {
    if (atDrawing) return null
    const offset = offsetsAt(depth)
    return { offset, slides: slidesOf(frame, offset) }
  }
  if (datum === 'root') {
    const rate = offsetsAt(0)
    yield { length: 1, depthAt: () => 0, rate, slides: slidesOf(frame, rate), start: null }
  }
  const bands = bandsOf(frame)
  if (datum !== 'bottom') {
    for (const { from, to, rate, slides } of bands) {
      const start = startAt(from, datum === 'top' && from === levels[0])
      yield { length: to - from, depthAt: (t) => from + t, rate, slides, start }
    }
    return
  }
  for (const { from, to, rate, slides } of [...bands].reverse()) {
    yield {
      length: to - from,
      depthAt: (t) => to - t,
      rate: { start: negative(rate.start), end: negative(rate.end) },
      slides: { ahead: negative(slides.ahead), back: negative(slides.back) },
      start: startAt(to, to === thickness),
    }
  }
}

function negative(column: ArrayLike<number>): Float64Array {
  return Float64Array.from(column, (value) => -value)
}

export function isStill({ start }: RowFigures): boolean {
  for (let row = 0; row < start.length; row++) if (start[row] !== 0) return false
  return true
}
