import { type Frame } from '../../contours/frame.ts'
import { makePlaces, place, radiusAt, sweepAt } from '../../contours/places.ts'
import { distanceToSegment, sideOfLoop } from '../../geometry/inside.ts'
import { boundsOf } from '../../geometry/loop.ts'
import type { Loop, Point } from '../../geometry/types.ts'
import { fillOffsets, makeEdgeEnds } from '../../walls/wall-table.ts'

/** Where the moat round a part runs, and where the core of a slug is. */

/** Arcs are taken as polygons outside them with sides of at most this, radians: 0.4 % of the radius outside. */
const ARC_SIDE = Math.PI / 18

/** Round corners of the moat have so many sides to a full turn, outside the true circle by at most 2 %. */
const MOAT_SIDES = 16

/**
 * Inner side of the moat round a part: the convex outline round its contours at all the depths given, grown by
 * `ring`. Counter-clockwise. Convex because that is short to cut, holds the least doubt, and every line that
 * starts within meets it once.
 */
export function moatRound(frame: Frame, depths: readonly number[], ring: number): Point[] {
  const points: Point[] = []
  const offsets = makeEdgeEnds(frame.table)
  const places = makePlaces(frame.count)
  for (const depth of depths) {
    fillOffsets(frame.table, depth, offsets)
    place(frame, offsets, places)
    for (let g = 0; g < frame.loopStart[1]!; g++) {
      points.push({ x: places.sx[g]!, y: places.sy[g]! }, { x: places.ex[g]!, y: places.ey[g]! })
      if (frame.arc[g] === 0) continue
      const sweep = sweepAt(frame, g, places)
      const sides = Math.ceil(Math.abs(sweep) / ARC_SIDE)
      const start = Math.atan2(places.sy[g]! - frame.cy[g]!, places.sx[g]! - frame.cx[g]!)
      const outer =
        Math.sign(sweep) * Math.max(Math.sign(sweep) * offsets.start[g]!, Math.sign(sweep) * offsets.end[g]!)
      const far = radiusAt(frame, g, outer) / Math.cos(sweep / sides / 2)
      for (let k = 0; k < sides; k++) {
        const heading = start + (sweep * (k + 0.5)) / sides
        points.push({ x: frame.cx[g]! + far * Math.cos(heading), y: frame.cy[g]! + far * Math.sin(heading) })
      }
    }
  }
  const corner = ring / Math.cos(Math.PI / MOAT_SIDES)
  return hull(
    hull(points).flatMap(({ x, y }) =>
      Array.from({ length: MOAT_SIDES }, (_, k) => {
        const heading = (2 * Math.PI * (k + 0.5)) / MOAT_SIDES
        return { x: x + corner * Math.cos(heading), y: y + corner * Math.sin(heading) }
      }),
    ),
  )
}

/** Convex outline, counter-clockwise (lower and upper chains over the points sorted by x). */
export function hull(points: readonly Point[]): Point[] {
  const sorted = [...points].sort((a, b) => a.x - b.x || a.y - b.y)
  const chain = (run: readonly Point[]) => {
    const out: Point[] = []
    for (const c of run) {
      for (;;) {
        const [a, b] = [out.at(-2), out.at(-1)]
        if (!a || !b || (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x) > 0) break
        out.pop()
      }
      out.push(c)
    }
    out.pop()
    return out
  }
  return [...chain(sorted), ...chain(sorted.reverse())]
}

/** How far along a ray a convex outline is left, mm; Infinity where it never is. `along` is a unit vector. */
export function exitOf(outline: readonly Point[], from: Point, along: Point): number {
  let exit = Infinity
  for (const [i, a] of outline.entries()) {
    const b = outline[(i + 1) % outline.length]!
    // Outward normal of the side, to the right of travel.
    const nx = b.y - a.y
    const ny = a.x - b.x
    const out = nx * along.x + ny * along.y
    if (out > 0) exit = Math.min(exit, (nx * (a.x - from.x) + ny * (a.y - from.y)) / out)
  }
  return exit
}

/** Places tried per side of the net in which a core's middle is looked for, and how often the net is narrowed. */
const CORE_NET = 12
const CORE_ROUNDS = 5

export interface Core {
  readonly centre: Point
  readonly radius: number
}

/** A large circle inside all of a hole's contours, near enough to the largest for a core; null where none fits. */
export function coreOf(contours: readonly Loop[]): Core | null {
  let { minX, minY, maxX, maxY } = boundsOf(contours[0]!)
  let best: Core | null = null
  for (let round = 0; round < CORE_ROUNDS; round++) {
    for (let i = 0; i < CORE_NET * CORE_NET; i++) {
      const x = minX + ((maxX - minX) * ((i % CORE_NET) + 0.5)) / CORE_NET
      const y = minY + ((maxY - minY) * (Math.floor(i / CORE_NET) + 0.5)) / CORE_NET
      const radius = roomAt(contours, { x, y }, best?.radius ?? 0)
      if (radius > (best?.radius ?? 0)) best = { centre: { x, y }, radius }
    }
    if (!best) return null
    const [w, h] = [(1.5 * (maxX - minX)) / CORE_NET, (1.5 * (maxY - minY)) / CORE_NET]
    minX = best.centre.x - w
    maxX = best.centre.x + w
    minY = best.centre.y - h
    maxY = best.centre.y + h
  }
  return best
}

/** Distance to the nearest contour, 0 outside any; gives up once it falls below `enough`. */
function roomAt(contours: readonly Loop[], at: Point, enough: number): number {
  let room = Infinity
  for (const loop of contours) {
    for (const segment of loop) {
      room = Math.min(room, distanceToSegment(segment, at))
      if (room <= enough) return 0
    }
    if (sideOfLoop(loop, at, -1) !== 'inside') return 0
  }
  return room
}
