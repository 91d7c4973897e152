import type { Point } from '../geometry/types.ts'
import type { JetLine } from './jet-at.ts'
import { edgeAt, edgesNear, radiusOf, type Box, type Room } from './room.ts'
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

/** A question: the move's ends at the top face, the first with the slope of both, and what it asks of the walls. */
interface Question {
  readonly from: JetLine
  readonly to: Point
  readonly jet: Jet
  readonly margin: number
  /** Length of the jet per mm of depth. */
  readonly length: number
}

/** Half the jet's width across a level plane at a depth, along its lean, where it is widest. */
function halfAt({ jet, length }: Question, depth: number): number {
  return (jet.kerf / 2 - depth * length * Math.tan(jet.taper)) * length
}

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
  const asked = { from, to, jet, margin, length: Math.sqrt(1 + from.p * from.p + from.q * from.q) }
  const widest = Math.max(halfAt(asked, 0), halfAt(asked, thickness)) + margin
  const dx = from.p * thickness
  const dy = from.q * thickness
  const box = {
    minX: Math.min(from.x, to.x) + Math.min(0, dx) - widest,
    minY: Math.min(from.y, to.y) + Math.min(0, dy) - widest,
    maxX: Math.max(from.x, to.x) + Math.max(0, dx) + widest,
    maxY: Math.max(from.y, to.y) + Math.max(0, dy) + widest,
  }
  for (const g of edgesNear(room, box)) {
    if (own.includes(g)) continue
    for (let k = 1; k < room.depths.length; k++) if (!wallIsClear(room, g, k, asked, box)) return false
  }
  return true
}

/** Pieces into which a band is cut where the jet narrows, so that each asks for little more than it needs. */
const TAPER_PIECES = 12

/** One wall, from the depth of index k − 1 to that of index k. */
function wallIsClear(room: Room, g: number, k: number, asked: Question, box: Box): boolean {
  const { frame, depths } = room
  const [above, below] = [depths[k - 1]!, depths[k]!]
  const wall = bandOf(room, g, k)
  if (!wall.arc && passesBy(wall, box)) return true
  const chords = wall.arc ? Math.ceil(Math.abs(frame.sweep[g]!) / ARC_PIECE) + 1 : 1
  const pad = Math.max(radiusOf(room, g, k - 1), radiusOf(room, g, k)) * (1 - Math.cos(ARC_PIECE / 2))
  // First as if the jet kept its greatest width: mostly that is clear already.
  if (bandIsClear(wall, chords, 1, above, below, pad, asked)) return true
  return asked.jet.taper !== 0 && bandIsClear(wall, chords, TAPER_PIECES, above, below, pad, asked)
}

/** Whether a line's corners, which go evenly, all stay on one side of a box. */
function passesBy({ above: a, below: b }: WallBand, box: Box): boolean {
  return (
    Math.max(a[0]!, a[2]!, b[0]!, b[2]!) < box.minX ||
    Math.min(a[0]!, a[2]!, b[0]!, b[2]!) > box.maxX ||
    Math.max(a[1]!, a[3]!, b[1]!, b[3]!) < box.minY ||
    Math.min(a[1]!, a[3]!, b[1]!, b[3]!) > box.maxY
  )
}

function bandIsClear(
  wall: WallBand,
  chords: number,
  slices: number,
  above: number,
  below: number,
  pad: number,
  asked: Question,
): boolean {
  const { from, to, margin } = asked
  for (let s = 0; s < slices; s++) {
    const [a, b] = [s / slices, (s + 1) / slices]
    const deepA = above + a * (below - above)
    const deepB = above + b * (below - above)
    const widest =
      slices === 1
        ? Math.max(halfAt(asked, deepA), halfAt(asked, deepB))
        : Math.min(halfAt(asked, deepA), halfAt(asked, deepB))
    const need = widest * (1 - TOUCH) + margin + pad
    for (let c = 0; c < chords; c++) {
      pointOnWall(wall, a, c / chords, from, deepA, 0)
      pointOnWall(wall, a, (c + 1) / chords, from, deepA, 2)
      pointOnWall(wall, b, (c + 1) / chords, from, deepB, 4)
      pointOnWall(wall, b, c / chords, from, deepB, 6)
      if (distanceToPatch(from.x, from.y, to.x, to.y, patch) < need) return false
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
  const { frame } = room
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
    return [radiusOf(room, g, level), heading, sweep]
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
  const a = mixed(wall, 0, part)
  const b = mixed(wall, 1, part)
  const c = mixed(wall, 2, part)
  let x: number
  let y: number
  if (wall.arc) {
    const heading = b + along * c
    x = wall.cx + a * Math.cos(heading)
    y = wall.cy + a * Math.sin(heading)
  } else {
    x = a + along * (c - a)
    y = b + along * (mixed(wall, 3, part) - b)
  }
  patch[at] = x - depth * p
  patch[at + 1] = y - depth * q
}

function mixed({ above, below }: WallBand, i: number, part: number): number {
  return above[i]! + part * (below[i]! - above[i]!)
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

/** Twice the area of the triangle u, v, (x, y): positive where that point lies to the left of u → v. */
function side(ux: number, uy: number, vx: number, vy: number, x: number, y: number): number {
  return (vx - ux) * (y - uy) - (vy - uy) * (x - ux)
}

function pointToStretch(x: number, y: number, ax: number, ay: number, bx: number, by: number): number {
  const [ux, uy] = [bx - ax, by - ay]
  const square = ux * ux + uy * uy
  const part = square === 0 ? 0 : Math.min(1, Math.max(0, ((x - ax) * ux + (y - ay) * uy) / square))
  const dx = x - ax - part * ux
  const dy = y - ay - part * uy
  return dx * dx + dy * dy
}
