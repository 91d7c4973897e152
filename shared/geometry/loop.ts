import { reverseSegment, segmentBounds, segmentLength } from './segment.ts'
import type { Bounds, Loop, Segment } from './types.ts'

/** Measures of a closed loop, arcs taken exactly. */

/** Signed area, mm²: positive counter-clockwise. Chords are summed about the first corner, then the caps of arcs added. */
export function signedArea(loop: Loop): number {
  const origin = loop[0]?.from
  if (!origin) return 0
  let twice = 0
  for (const segment of loop) {
    const ax = segment.from.x - origin.x
    const ay = segment.from.y - origin.y
    const bx = segment.to.x - origin.x
    const by = segment.to.y - origin.y
    twice += ax * by - ay * bx
    if (segment.kind === 'arc') twice += segment.radius * segment.radius * capFactor(segment.sweep)
  }
  return twice / 2
}

/**
 * sweep − sin(sweep): twice the area between an arc of unit radius and its chord. The series avoids the
 * cancellation of flat arcs; its first omitted term is below 1e-17 of the sum at the switch.
 */
export function capFactor(sweep: number): number {
  if (Math.abs(sweep) > 0.1) return sweep - Math.sin(sweep)
  const s2 = sweep * sweep
  return (
    ((sweep * s2) / 6) *
    (1 - (s2 / 20) * (1 - (s2 / 42) * (1 - (s2 / 72) * (1 - (s2 / 110) * (1 - s2 / 156)))))
  )
}

export function loopLength(loop: Loop): number {
  return loop.reduce((sum, segment) => sum + segmentLength(segment), 0)
}

/** Smallest box round the segments; of none, an inside-out box of infinities. */
export function boundsOf(segments: Iterable<Segment>): Bounds {
  let minX = Infinity
  let minY = Infinity
  let maxX = -Infinity
  let maxY = -Infinity
  for (const segment of segments) {
    const box = segmentBounds(segment)
    minX = Math.min(minX, box.minX)
    minY = Math.min(minY, box.minY)
    maxX = Math.max(maxX, box.maxX)
    maxY = Math.max(maxY, box.maxY)
  }
  return { minX, minY, maxX, maxY }
}

export function isCounterClockwise(loop: Loop): boolean {
  return signedArea(loop) > 0
}

/** The same loop walked the other way: edge i becomes edge n − 1 − i, corner i stays where edge i started. */
export function reverseLoop(loop: Loop): Loop {
  return [...loop].reverse().map(reverseSegment)
}
