import { radiusAt } from '../contours/frame.ts'
import type { Point } from '../geometry/types.ts'
import type { JetLine } from './jet-at.ts'
import { edgeAt, visitEdgesNear, type Room } from './room.ts'
import type { Jet } from './types.ts'

/**
 * Whether a straight move of the jet that keeps its slope is clear of the walls at every depth. Seen along the
 * jet the move stands still and the walls glide: within a band of depth a line's corners go evenly, so the wall
 * sweeps the four-cornered patch between its edges at both ends of the band, and the distance of the move from
 * that patch is a lower bound of every distance on the way (exact where the wall does not turn).
 */

/** Chords that stand for an arc wall turn by no more than this, radians; their sagitta is added to the room asked for. */
const ARC_PIECE = Math.PI / 24

/** Share of the jet's own width that may go lost to rounding before two walls that just touch the jet count as hit. */
const TOUCH = 1e-6

/**
 * Distance is asked against jet half-width plus `margin`, mm, the jet narrowing down each band by its taper.
 * `from` and `to` lie at the top face and share the slope of `from`; walls of edges in `own` are left out.
 */
export function moveIsClear(
  room: Room,
  jet: Jet,
  from: JetLine,
  to: Point,
  margin: number,
  own: readonly number[],
): boolean {
  const thickness = room.depths.at(-1)!
  const length = Math.sqrt(1 + from.p * from.p + from.q * from.q)
  const half = (depth: number) => (jet.kerf / 2 - depth * length * Math.tan(jet.taper)) * length
  const widest = Math.max(half(0), half(thickness)) + margin
  const [dx, dy] = [from.p * thickness, from.q * thickness]
  return visitEdgesNear(
    room,
    Math.min(from.x, to.x, from.x + dx, to.x + dx) - widest,
    Math.min(from.y, to.y, from.y + dy, to.y + dy) - widest,
    Math.max(from.x, to.x, from.x + dx, to.x + dx) + widest,
    Math.max(from.y, to.y, from.y + dy, to.y + dy) + widest,
    (g) => own.includes(g) || wallIsClear(room, g, from, to, half, margin),
  )
}

/** Pieces into which a band is cut where the jet narrows, so that each asks for little more than it needs. */
const TAPER_PIECES = 12

function wallIsClear(
  room: Room,
  g: number,
  from: JetLine,
  to: Point,
  half: (depth: number) => number,
  margin: number,
): boolean {
  const { frame, depths, offsets } = room
  const chords = frame.arc[g] ? Math.ceil(Math.abs(frame.sweep[g]!) / ARC_PIECE) + 1 : 1
  for (let k = 1; k < depths.length; k++) {
    const [above, below] = [depths[k - 1]!, depths[k]!]
    const wall = bandOf(room, g, k)
    const widest = Math.max(
      radiusAt(frame, g, offsets[k - 1]!.start[g]!),
      radiusAt(frame, g, offsets[k]!.start[g]!),
    )
    const pad = widest * (1 - Math.cos(ARC_PIECE / 2))
    const slices = half(above) === half(below) ? 1 : TAPER_PIECES
    for (let s = 0; s < slices; s++) {
      const [a, b] = [s / slices, (s + 1) / slices]
      const deepA = above + a * (below - above)
      const deepB = above + b * (below - above)
      const need = Math.min(half(deepA), half(deepB)) * (1 - TOUCH) + margin + pad
      for (let c = 0; c < chords; c++) {
        pointOnWall(wall, a, c / chords, from, deepA, 0)
        pointOnWall(wall, a, (c + 1) / chords, from, deepA, 2)
        pointOnWall(wall, b, (c + 1) / chords, from, deepB, 4)
        pointOnWall(wall, b, c / chords, from, deepB, 6)
        if (distanceToPatch(from.x, from.y, to.x, to.y, patch) < need) return false
      }
    }
  }
  return true
}

/** A wall over a band of depth: a line by its ends, an arc by its polar ends; both above and below. */
interface WallBand {
  readonly arc: boolean
  readonly cx: number
  readonly cy: number
  /** Line: x and y of start and end. Arc: radius, heading of the start, sweep. */
  readonly above: readonly number[]
  readonly below: readonly number[]
}

function bandOf(room: Room, g: number, k: number): WallBand {
  const { frame, offsets } = room
  const [cx, cy] = [frame.cx[g]!, frame.cy[g]!]
  const arc = frame.arc[g] === 1
  const ends = [k - 1, k].map((level) => {
    const [start, end] = edgeAt(room, g, level)
    if (!arc) return [start.x, start.y, end.x, end.y]
    const heading = Math.atan2(start.y - cy, start.x - cx)
    const h = frame.next[g]!
    const turned = (x: number, y: number, at: Point) =>
      Math.atan2(
        (x - cx) * (at.y - cy) - (y - cy) * (at.x - cx),
        (x - cx) * (at.x - cx) + (y - cy) * (at.y - cy),
      )
    const sweep =
      frame.sweep[g]! - turned(frame.px[g]!, frame.py[g]!, start) + turned(frame.px[h]!, frame.py[h]!, end)
    return [radiusAt(frame, g, offsets[level]!.start[g]!), heading, sweep]
  })
  const [above, below] = [ends[0]!, ends[1]!]
  if (arc) below[1]! -= 2 * Math.PI * Math.round((below[1]! - above[1]!) / (2 * Math.PI))
  return { arc, cx, cy, above, below }
}

/** The patch that a chord of a wall sweeps in a slice of a band, seen along the jet. */
const patch = new Float64Array(8)

function pointOnWall(
  wall: WallBand,
  part: number,
  along: number,
  { p, q }: JetLine,
  depth: number,
  at: number,
): void {
  const mix = (i: number) => wall.above[i]! + part * (wall.below[i]! - wall.above[i]!)
  let x: number
  let y: number
  if (wall.arc) {
    const heading = mix(1) + along * mix(2)
    x = wall.cx + mix(0) * Math.cos(heading)
    y = wall.cy + mix(0) * Math.sin(heading)
  } else {
    x = mix(0) + along * (mix(2) - mix(0))
    y = mix(1) + along * (mix(3) - mix(1))
  }
  patch[at] = x - depth * p
  patch[at + 1] = y - depth * q
}

/** Distance of a stretch from a four-cornered patch, 0 where they share a point. */
function distanceToPatch(ax: number, ay: number, bx: number, by: number, quad: Float64Array): number {
  let inside = false
  let least = Infinity
  for (let i = 0; i < 8; i += 2) {
    const j = (i + 2) % 8
    const [px, py, qx, qy] = [quad[i]!, quad[i + 1]!, quad[j]!, quad[j + 1]!]
    if (py > ay !== qy > ay && ax < px + ((ay - py) / (qy - py)) * (qx - px)) inside = !inside
    least = Math.min(least, squareBetween(ax, ay, bx, by, px, py, qx, qy))
  }
  return inside ? 0 : Math.sqrt(least)
}

/** Square of the distance between two stretches. */
function squareBetween(
  ax: number,
  ay: number,
  bx: number,
  by: number,
  px: number,
  py: number,
  qx: number,
  qy: number,
): number {
  const side = (ux: number, uy: number, vx: number, vy: number, x: number, y: number) =>
    (vx - ux) * (y - uy) - (vy - uy) * (x - ux)
  if (
    side(ax, ay, bx, by, px, py) * side(ax, ay, bx, by, qx, qy) < 0 &&
    side(px, py, qx, qy, ax, ay) * side(px, py, qx, qy, bx, by) < 0
  ) {
    return 0
  }
  return Math.min(
    pointToStretch(px, py, ax, ay, bx, by),
    pointToStretch(qx, qy, ax, ay, bx, by),
    pointToStretch(ax, ay, px, py, qx, qy),
    pointToStretch(bx, by, px, py, qx, qy),
  )
}

function pointToStretch(x: number, y: number, ax: number, ay: number, bx: number, by: number): number {
  const [ux, uy] = [bx - ax, by - ay]
  const square = ux * ux + uy * uy
  const part = square === 0 ? 0 : Math.min(1, Math.max(0, ((x - ax) * ux + (y - ay) * uy) / square))
  const dx = x - ax - part * ux
  const dy = y - ay - part * uy
  return dx * dx + dy * dy
}
