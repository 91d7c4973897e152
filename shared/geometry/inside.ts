import { arcFraction } from './segment.ts'
import type { Loop, Point, Segment } from './types.ts'

/** Where a point lies to a loop, whichever way the loop runs; arcs are exact. */
export type Side = 'inside' | 'outside' | 'on'

/**
 * Even–odd rule with a ray to +x. `onWithin` (mm) is how near to a segment still counts as on it; a negative
 * value asks for no such answer, and is quicker.
 */
export function sideOfLoop(loop: Loop, point: Point, onWithin = 0): Side {
  let inside = false
  for (const segment of loop) {
    if (onWithin >= 0 && distanceToSegment(segment, point) <= onWithin) return 'on'
    if (rayCrossings(segment, point) % 2 === 1) inside = !inside
  }
  return inside ? 'inside' : 'outside'
}

/** True inside the outer loop and outside every hole. */
export function pointInProfile(loops: readonly Loop[], point: Point): boolean {
  return loops.every((loop, i) => (sideOfLoop(loop, point, -1) === 'inside') === (i === 0))
}

export function distanceToSegment(segment: Segment, { x, y }: Point): number {
  const { from, to } = segment
  if (segment.kind === 'arc') {
    const dx = x - segment.centre.x
    const dy = y - segment.centre.y
    if (arcFraction(segment, Math.atan2(dy, dx)) <= 1) return Math.abs(Math.hypot(dx, dy) - segment.radius)
    return Math.min(Math.hypot(x - from.x, y - from.y), Math.hypot(x - to.x, y - to.y))
  }
  const ux = to.x - from.x
  const uy = to.y - from.y
  const square = ux * ux + uy * uy
  const along = square === 0 ? 0 : ((x - from.x) * ux + (y - from.y) * uy) / square
  const t = Math.min(1, Math.max(0, along))
  return Math.hypot(x - from.x - t * ux, y - from.y - t * uy)
}

/**
 * How often a ray to +x crosses the segment. A crossing is counted where y passes from below-or-at to above
 * the ray (half-open), so that two segments meeting on the ray count once between them.
 */
export function rayCrossings(segment: Segment, { x, y }: Point): number {
  const { from, to } = segment
  if (segment.kind === 'line') {
    if (from.y > y === to.y > y) return 0
    return x < from.x + ((y - from.y) / (to.y - from.y)) * (to.x - from.x) ? 1 : 0
  }
  // Cut the arc where its tangent is level; each piece is monotone in y and crosses as a chord would.
  const { centre, radius, sweep } = segment
  const start = Math.atan2(from.y - centre.y, from.x - centre.x)
  const way = Math.sign(sweep)
  const cuts = [0]
  for (const level of [-Math.PI / 2, Math.PI / 2]) {
    let turn = (level - start) * way
    turn -= 2 * Math.PI * Math.floor(turn / (2 * Math.PI))
    if (turn > 0 && turn < Math.abs(sweep)) cuts.push(turn)
  }
  cuts.sort((a, b) => a - b)
  cuts.push(Math.abs(sweep))
  const heightAt = (turn: number) =>
    turn === 0 ? from.y : turn === Math.abs(sweep) ? to.y : centre.y + radius * Math.sin(start + way * turn)
  let crossings = 0
  for (let i = 1; i < cuts.length; i++) {
    const a = cuts[i - 1] ?? 0
    const b = cuts[i] ?? 0
    if (heightAt(a) > y === heightAt(b) > y) continue
    const rise = y - centre.y
    const half = Math.sqrt(Math.max(0, radius * radius - rise * rise))
    const right = Math.cos(start + (way * (a + b)) / 2) > 0
    if (x < centre.x + (right ? half : -half)) crossings++
  }
  return crossings
}
