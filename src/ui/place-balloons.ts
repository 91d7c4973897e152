import type { Point } from '../../shared/geometry/types.ts'

interface Box {
  readonly width: number
  readonly height: number
}

/** Rings round an anchor that are tried from the inside, in balloon radii; eight places on each. */
const RINGS = [2, 3.2, 4.8, 7] as const
const PLACES = 8

/**
 * Stands balloons of one radius near their anchors so that none covers another or leaves the box, all in one
 * unit with Y downward. Greedy, in order; where no place is free a balloon takes its first one.
 */
export function placeBalloons(anchors: readonly Point[], box: Box, radius: number): Point[] {
  const placed: Point[] = []
  for (const anchor of anchors) {
    const candidates = RINGS.flatMap((ring) =>
      Array.from({ length: PLACES }, (_, i) => {
        const angle = -Math.PI / 4 + (i * 2 * Math.PI) / PLACES
        return {
          x: anchor.x + ring * radius * Math.cos(angle),
          y: anchor.y + ring * radius * Math.sin(angle),
        }
      }),
    )
    const free = candidates.find(
      (spot) => inside(spot, box, radius) && placed.every((other) => apart(spot, other) >= 2 * radius),
    )
    placed.push(free ?? candidates[0]!)
  }
  return placed
}

const apart = (a: Point, b: Point) => Math.hypot(a.x - b.x, a.y - b.y)

const inside = ({ x, y }: Point, { width, height }: Box, radius: number) =>
  x >= radius && y >= radius && x <= width - radius && y <= height - radius
