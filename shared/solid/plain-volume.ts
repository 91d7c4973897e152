import type { Frame } from '../contours/frame.ts'
import { bandsOf } from '../contours/slides.ts'

/**
 * Volume of a sound plain body drawn at its top, mm³. Area changes with depth by the sum of every edge's length times
 * the tangent of its tilt, evenly within a band, so that two sums a band give the integral without placing a corner.
 *
 * @param area of the drawing, mm²
 * @param lengths of the edges at every level (`plainLengths`)
 */
export function plainVolume(frame: Frame, area: number, lengths: readonly Float64Array[]): number {
  let volume = 0
  let above = area
  bandsOf(frame).forEach(({ from, to, rate }, i) => {
    const h = to - from
    const start = areaRate(frame, lengths[i]!, rate.start)
    const end = areaRate(frame, lengths[i + 1]!, rate.start)
    volume += h * (above + (h / 6) * (2 * start + end))
    above += (h / 2) * (start + end)
  })
  return volume
}

function areaRate({ count, table }: Frame, lengths: Float64Array, rate: ArrayLike<number>): number {
  const { rowOfEdge } = table
  let sum = 0
  for (let g = 0; g < count; g++) sum += lengths[g]! * rate[rowOfEdge[g]!]!
  return sum
}
