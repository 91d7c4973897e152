import type { Frame } from './frame.ts'
import { bandsOf, slidesOf, type Slides } from './slides.ts'
import { rowOffsets } from '../walls/wall-table.ts'

/**
 * Lengths of all edges of a plain body (lines alone, without steps and blends) at every level, from the top down, mm:
 * as drawn at the drawing's level and evenly growing between two levels.
 */
export function plainLengths(frame: Frame): readonly Float64Array[] {
  const { body, table, count } = frame
  let top = frame.length
  if (body.datum !== 'top') {
    const both = Float64Array.from(rowOffsets(table, table.start, 0))
    top = new Float64Array(count)
    grow(frame, frame.length, slidesOf(frame, { start: both, end: both }), 1, top)
  }
  const lengths = [top]
  for (const { from, to, slides } of bandsOf(frame)) {
    const below = new Float64Array(count)
    grow(frame, lengths.at(-1)!, slides, to - from, below)
    lengths.push(below)
  }
  return lengths
}

function grow(frame: Frame, from: Float64Array, slides: Slides, by: number, out: Float64Array): void {
  for (let g = 0; g < frame.count; g++) growEdge(frame, g, from, slides, by, out)
}

/** Length of one edge after its corners have slid. */
export function growEdge(
  { next }: Frame,
  g: number,
  from: Float64Array,
  { ahead, back }: Slides,
  by: number,
  out: Float64Array,
): void {
  out[g] = from[g]! + by * (ahead[next[g]!]! - back[g]!)
}
