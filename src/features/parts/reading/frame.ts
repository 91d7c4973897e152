import type { Bounds } from '../../../../shared/geometry/types.ts'

/** Room round the drawing for balloons, and the tallest picture, CSS pixels. */
const MARGIN = 44
const TALLEST = 560
const SHORTEST = 220

/** The drawing's place on the screen: pixels per mm and where the drawing's origin stands. */
export interface Frame {
  readonly width: number
  readonly height: number
  readonly scale: number
  readonly originX: number
  readonly originY: number
}

export function frameOf(bounds: Bounds, width: number): Frame {
  const across = Math.max(bounds.maxX - bounds.minX, Number.MIN_VALUE)
  const up = Math.max(bounds.maxY - bounds.minY, Number.MIN_VALUE)
  const room = Math.max(width - 2 * MARGIN, 1)
  const height = Math.min(TALLEST, Math.max(SHORTEST, (room * up) / across + 2 * MARGIN))
  const scale = Math.min(room / across, (height - 2 * MARGIN) / up)
  return {
    width,
    height,
    scale,
    originX: width / 2 - (scale * (bounds.minX + bounds.maxX)) / 2,
    originY: height / 2 + (scale * (bounds.minY + bounds.maxY)) / 2,
  }
}
