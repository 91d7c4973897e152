import { sweepAt } from '../contours/frame.ts'
import type { JetLine } from './jet-at.ts'
import { visitEdgesNear, type Room } from './room.ts'
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
  to: { readonly x: number; readonly y: number },
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
const TAPER_PIECES = 6

function wallIsClear(
  room: Room,
  g: number,
  from: JetLine,
  to: { readonly x: number; readonly y: number },
  half: (depth: number) => number,
  margin: number,
): boolean {
  const { frame, depths, offsets } = room
  const chords = frame.arc[g] ? Math.ceil(Math.abs(frame.sweep[g]!) / ARC_PIECE) + 1 : 1
  for (let k = 1; k < depths.length; k++) {
    const [above, below] = [depths[k - 1]!, depths[k]!]
    const radius = frame.arc[g]
      ? Math.max(
          frame.radius[g]! + Math.sign(frame.sweep[g]!) * offsets[k - 1]!.start[g]!,
          frame.radius[g]! + Math.sign(frame.sweep[g]!) * offsets[k]!.start[g]!,
        )
      : 0
    const pad = radius * (1 - Math.cos(ARC_PIECE / 2))
    const slices = half(above) === half(below) ? 1 : TAPER_PIECES
    for (let s = 0; s < slices; s++) {
      const [a, b] = [s / slices, (s + 1) / slices]
      const deepA = above + a * (below - above)
      const deepB = above + b * (below - above)
      const need = Math.min(half(deepA), half(deepB)) * (1 - TOUCH) + margin + pad
      for (let c = 0; c < chords; c++) {
        const quad = patch(room, g, k, a, b, c / chords, (c + 1) / chords, from, deepA, deepB)
        if (distanceToPatch(from.x, from.y, to.x, to.y, quad) < need) return false
      }
    }
  }
  return true
}

const quadOut = new Float64Array(8)

/** The patch that a chord of wall g sweeps in a slice of a band, seen along the jet: start and end above, then end and start below. */
function patch(
  room: Room,
  g: number,
  band: number,
  a: number,
  b: number,
  chordFrom: number,
  chordTo: number,
  { p, q }: JetLine,
  deepA: number,
  deepB: number,
): Float64Array {
  pointOnWall(room, g, band, a, chordFrom, 0, p, q, deepA)
  pointOnWall(room, g, band, a, chordTo, 2, p, q, deepA)
  pointOnWall(room, g, band, b, chordTo, 4, p, q, deepB)
  pointOnWall(room, g, band, b, chordFrom, 6, p, q, deepB)
  return quadOut
}

function pointOnWall(
  { frame, places, offsets }: Room,
  g: number,
  band: number,
  part: number,
  along: number,
  at: number,
  p: number,
  q: number,
  depth: number,
): void {
  const mix = (above: Float64Array, below: Float64Array) => above[g]! + part * (below[g]! - above[g]!)
  const [upper, lower] = [places[band - 1]!, places[band]!]
  let x: number
  let y: number
  if (frame.arc[g]) {
    const way = Math.sign(frame.sweep[g]!)
    const radius = frame.radius[g]! + way * mix(offsets[band - 1]!.start, offsets[band]!.start)
    const headingAbove = Math.atan2(upper.sy[g]! - frame.cy[g]!, upper.sx[g]! - frame.cx[g]!)
    let headingBelow = Math.atan2(lower.sy[g]! - frame.cy[g]!, lower.sx[g]! - frame.cx[g]!)
    headingBelow -= 2 * Math.PI * Math.round((headingBelow - headingAbove) / (2 * Math.PI))
    const sweep = sweepAt(frame, g, upper) * (1 - part) + sweepAt(frame, g, lower) * part
    const heading = headingAbove + part * (headingBelow - headingAbove) + along * sweep
    x = frame.cx[g]! + radius * Math.cos(heading)
    y = frame.cy[g]! + radius * Math.sin(heading)
  } else {
    const [sx, sy] = [mix(upper.sx, lower.sx), mix(upper.sy, lower.sy)]
    x = sx + along * (mix(upper.ex, lower.ex) - sx)
    y = sy + along * (mix(upper.ey, lower.ey) - sy)
  }
  quadOut[at] = x - depth * p
  quadOut[at + 1] = y - depth * q
}

/** Distance of a stretch from a four-cornered patch, 0 where they share a point. */
function distanceToPatch(ax: number, ay: number, bx: number, by: number, quad: Float64Array): number {
  let inside = false
  let least = Infinity
  for (let i = 0; i < 8; i += 2) {
    const j = (i + 2) % 8
    const [px, py, qx, qy] = [quad[i]!, quad[i + 1]!, quad[j]!, quad[j + 1]!]
    if (py > ay !== qy > ay && ax < px + ((ay - py) / (qy - py)) * (qx - px)) inside = !inside
    least = Math.min(least, distanceBetween(ax, ay, bx, by, px, py, qx, qy))
  }
  return inside ? 0 : least
}

function distanceBetween(
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
  return Math.hypot(x - ax - part * ux, y - ay - part * uy)
}
