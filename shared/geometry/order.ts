import type { Point } from './types.ts'

/** Bits per axis of a place on the curve. */
const BITS = 15

/**
 * Indices of the points in an order in which neighbours lie near each other: along a Z-shaped curve that
 * fills their box (bits of x and y in turn; Morton 1966, from memory).
 */
export function nearbyOrder(points: readonly Point[]): number[] {
  const [minX, maxX] = axisRange(points, 'x')
  const [minY, maxY] = axisRange(points, 'y')
  const size = Math.max(maxX - minX, maxY - minY)
  const grid = size > 0 ? (2 ** BITS - 1) / size : 0
  const places = points.map(({ x, y }) => spreadBits((x - minX) * grid) + 2 * spreadBits((y - minY) * grid))
  return points.map((_, i) => i).sort((a, b) => places[a]! - places[b]! || a - b)
}

function axisRange(points: readonly Point[], axis: 'x' | 'y'): [number, number] {
  let low = Infinity
  let high = -Infinity
  for (const point of points) {
    low = Math.min(low, point[axis])
    high = Math.max(high, point[axis])
  }
  return [low, high]
}

/** The bits of a whole number, spread to every other place. */
function spreadBits(value: number): number {
  let spread = 0
  for (let bit = 0, whole = Math.floor(value); bit < BITS; bit++) spread += ((whole >> bit) & 1) * 4 ** bit
  return spread
}
