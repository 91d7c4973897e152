import type { Frame } from '../contours/frame.ts'
import { bandsOf } from '../contours/slides.ts'
import { blockCount, blockRange, blocksOf } from '../geometry/blocks.ts'

/**
 * How fast the area of a plain body changes with depth just below and just above the two ends of a band: the sum of
 * every edge's length times the tangent of its tilt, mm² per mm, by blocks of edges.
 */
export interface AreaRates {
  readonly start: Float64Array
  readonly end: Float64Array
}

/** By band from the top down. `lengths`: of the edges at every level (`plainLengths`). */
export function areaRates(frame: Frame, lengths: readonly Float64Array[]): readonly AreaRates[] {
  const blocks = blockCount(frame.count)
  return bandsOf(frame).map((_, i) => {
    const rates = { start: new Float64Array(blocks), end: new Float64Array(blocks) }
    for (let block = 0; block < blocks; block++) fillBlock(frame, i, lengths, block, rates)
    return rates
  })
}

/** Works out anew what some edges have part in. */
export function refreshAreaRates(
  frame: Frame,
  lengths: readonly Float64Array[],
  edges: readonly number[],
  all: readonly AreaRates[],
): void {
  all.forEach((rates, i) => {
    for (const block of blocksOf(edges)) fillBlock(frame, i, lengths, block, rates)
  })
}

function fillBlock(
  frame: Frame,
  band: number,
  lengths: readonly Float64Array[],
  block: number,
  out: AreaRates,
): void {
  const [first, end] = blockRange(block, frame.count)
  const { rowOfEdge } = frame.table
  const rate = bandsOf(frame)[band]!.rate.start
  const above = lengths[band]!
  const below = lengths[band + 1]!
  let atStart = 0
  let atEnd = 0
  for (let g = first; g < end; g++) {
    const w = rate[rowOfEdge[g]!]!
    atStart += above[g]! * w
    atEnd += below[g]! * w
  }
  out.start[block] = atStart
  out.end[block] = atEnd
}

/**
 * Volume of a sound plain body drawn at its top, mm³. Its area changes evenly faster or slower within a band, so that
 * the rates at both ends give the integral without placing a corner. `area`: of the drawing, mm².
 */
export function plainVolume(frame: Frame, area: number, rates: readonly AreaRates[]): number {
  let volume = 0
  let above = area
  bandsOf(frame).forEach(({ from, to }, i) => {
    const h = to - from
    const start = sum(rates[i]!.start)
    const end = sum(rates[i]!.end)
    volume += h * (above + (h / 6) * (2 * start + end))
    above += (h / 2) * (start + end)
  })
  return volume
}

function sum(column: Float64Array): number {
  let total = 0
  for (let i = 0; i < column.length; i++) total += column[i]!
  return total
}
