import { boundsOf } from '../geometry/loop.ts'
import { arcFraction } from '../geometry/segment.ts'
import type { Loop, Point } from '../geometry/types.ts'

/** Loops of more segments are judged by their box alone: the check is quadratic. */
const MOST_SEGMENTS = 200

/**
 * An upper bound of the widest circle that fits a loop, mm: its smallest width across any of its own edges, and
 * across X and Y. A loop narrower than the kerf by this measure certainly cannot be cut.
 */
export function narrowestWidth(loop: Loop): number {
  const box = boundsOf(loop)
  let width = Math.min(box.maxX - box.minX, box.maxY - box.minY)
  if (loop.length > MOST_SEGMENTS) return width
  for (const { from, to } of loop) {
    const length = Math.hypot(to.x - from.x, to.y - from.y)
    if (length === 0) continue
    const across = { x: (to.y - from.y) / length, y: (from.x - to.x) / length }
    width = Math.min(width, widthAcross(loop, across))
  }
  return width
}

function widthAcross(loop: Loop, across: Point): number {
  let lowest = Infinity
  let highest = -Infinity
  const heading = Math.atan2(across.y, across.x)
  for (const segment of loop) {
    const at = segment.from.x * across.x + segment.from.y * across.y
    lowest = Math.min(lowest, at)
    highest = Math.max(highest, at)
    if (segment.kind !== 'arc') continue
    const middle = segment.centre.x * across.x + segment.centre.y * across.y
    if (arcFraction(segment, heading) < 1) highest = Math.max(highest, middle + segment.radius)
    if (arcFraction(segment, heading + Math.PI) < 1) lowest = Math.min(lowest, middle - segment.radius)
  }
  return highest - lowest
}
