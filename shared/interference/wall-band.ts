import { branchPoint, branchRange, branchStray, type Branch } from '../contours/branch.ts'
import { CornerMode, type Frame } from '../contours/frame.ts'
import { makePlaces, place, type Places } from '../contours/places.ts'
import { arcBounds } from '../geometry/segment.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'

/**
 * The walls between two levels, where no wall changes tilt: every offset is even in depth, and so is every
 * corner but those beside arcs (`branch`), which are worked out at each depth.
 */
export interface WallBand {
  readonly frame: Frame
  readonly top: number
  readonly bottom: number
  readonly offsets: readonly [EdgeEnds, EdgeEnds]
  readonly places: readonly [Places, Places]
}

export function wallBand(frame: Frame, top: number, bottom: number): WallBand {
  const at = (depth: number) => {
    const offsets = makeEdgeEnds(frame.table)
    fillOffsets(frame.table, depth, offsets)
    const places = makePlaces(frame.count)
    place(frame, offsets, places)
    return { offsets, places }
  }
  const [high, low] = [at(top), at(bottom)]
  return {
    frame,
    top,
    bottom,
    offsets: [high.offsets, low.offsets],
    places: [high.places, low.places],
  }
}

/** A line's wall is a plane unless it is blended along its edge. */
export function isPlane({ offsets: [high, low], frame }: WallBand, f: number): boolean {
  return frame.arc[f] === 0 && high.start[f] === high.end[f] && low.start[f] === low.end[f]
}

/** How fast the wall moves outward with depth at its start: the tangent of its tilt. */
export function rateOf({ offsets: [high, low], top, bottom }: WallBand, f: number): number {
  return (low.start[f]! - high.start[f]!) / (bottom - top)
}

/** Radius of an arc's wall at one of the band's levels. */
export function radiusOf({ frame, offsets }: WallBand, f: number, level: 0 | 1): number {
  return frame.radius[f]! + Math.sign(frame.sweep[f]!) * offsets[level].start[f]!
}

/** Corner g's branch where it is bent in this band; null where it moves evenly. */
export function bentCorner({ frame }: WallBand, g: number): Branch | null {
  return frame.mode[g] === CornerMode.branch ? frame.branches.get(g)! : null
}

/** Offsets on both sides of corner g over part of the band, s from 0 at its top to 1 at its bottom. */
function spansAt(band: WallBand, g: number, s0: number, s1: number) {
  const [high, low] = band.offsets
  const p = band.frame.previous[g]!
  const before = (s: number) => high.end[p]! + s * (low.end[p]! - high.end[p]!)
  const after = (s: number) => high.start[g]! + s * (low.start[g]! - high.start[g]!)
  return [
    [before(s0), before(s1)],
    [after(s0), after(s1)],
  ] as const
}

/** How far a bent corner strays, over part of the band, from where it is in the middle of it, mm. */
export function cornerStray(band: WallBand, g: number, s0: number, s1: number): number {
  const branch = bentCorner(band, g)
  if (!branch) return 0
  const [before, after] = spansAt(band, g, s0, s1)
  return branchStray(branch, before, after)
}

/** The level outline of one wall at a depth. Written in place. */
export interface WallLine {
  sx: number
  sy: number
  ex: number
  ey: number
  /** Arcs: radius, heading of the start from the centre, signed sweep. */
  radius: number
  heading: number
  sweep: number
}

export function makeWallLine(): WallLine {
  return { sx: 0, sy: 0, ex: 0, ey: 0, radius: 0, heading: 0, sweep: 0 }
}

/** Writes wall f's outline at s of the band, 0 at its top to 1 at its bottom. */
export function wallAt(band: WallBand, f: number, s: number, out: WallLine): void {
  const { frame } = band
  const [high, low] = band.places
  out.sx = high.sx[f]! + s * (low.sx[f]! - high.sx[f]!)
  out.sy = high.sy[f]! + s * (low.sy[f]! - high.sy[f]!)
  out.ex = high.ex[f]! + s * (low.ex[f]! - high.ex[f]!)
  out.ey = high.ey[f]! + s * (low.ey[f]! - high.ey[f]!)
  const next = frame.next[f]!
  const start = bentCorner(band, f)
  const end = bentCorner(band, next)
  if (start) {
    const [before, after] = spansAt(band, f, s, s)
    const at = branchPoint(start, before[0], after[0])
    out.sx = at.x
    out.sy = at.y
  }
  if (end) {
    const [before, after] = spansAt(band, next, s, s)
    const at = branchPoint(end, before[0], after[0])
    out.ex = at.x
    out.ey = at.y
  }
  if (!frame.arc[f]) return
  const [high0, low0] = [radiusOf(band, f, 0), radiusOf(band, f, 1)]
  out.radius = high0 + s * (low0 - high0)
  const [cx, cy] = [frame.cx[f]!, frame.cy[f]!]
  // Smooth ends keep the drawing's headings; bent ones have turned by less than half a turn.
  const [ax, ay] = [frame.px[f]! - cx, frame.py[f]! - cy]
  const [bx, by] = [frame.px[next]! - cx, frame.py[next]! - cy]
  const before = start ? turnFrom(ax, ay, out.sx - cx, out.sy - cy) : 0
  const after = end ? turnFrom(bx, by, out.ex - cx, out.ey - cy) : 0
  out.heading = Math.atan2(ay, ax) + before
  out.sweep = frame.sweep[f]! - before + after
}

function turnFrom(ax: number, ay: number, bx: number, by: number): number {
  return Math.atan2(ax * by - ay * bx, ax * bx + ay * by)
}

/** Widens the box at out[at…] by everywhere that wall f is at one level; with bent corners, anywhere in the band. */
export function coverWall(band: WallBand, f: number, level: 0 | 1, out: Float64Array, at: number): void {
  const { frame } = band
  const places = band.places[level]
  include(out, at, places.sx[f]!, places.sy[f]!)
  include(out, at, places.ex[f]!, places.ey[f]!)
  if (!frame.hasArcs) return
  const next = frame.next[f]!
  coverBent(band, f, out, at)
  coverBent(band, next, out, at)
  if (!frame.arc[f]) return
  const [cx, cy] = [frame.cx[f]!, frame.cy[f]!]
  const radius = radiusOf(band, f, level)
  if (bentCorner(band, f) || bentCorner(band, next)) {
    // The extent changes unevenly: the whole circle stands for it.
    include(out, at, cx - radius, cy - radius)
    include(out, at, cx + radius, cy + radius)
    return
  }
  const heading = Math.atan2(frame.py[f]! - cy, frame.px[f]! - cx)
  const box = arcBounds({ x: cx, y: cy }, radius, heading, frame.sweep[f]!)
  include(out, at, box.minX, box.minY)
  include(out, at, box.maxX, box.maxY)
}

function coverBent(band: WallBand, g: number, out: Float64Array, at: number): void {
  const branch = bentCorner(band, g)
  if (!branch) return
  const { radii, headings } = branchRange(branch, ...spansAt(band, g, 0, 1))
  for (const radius of radii) {
    const box = arcBounds(branch.centre, radius, headings[0], headings[1] - headings[0])
    include(out, at, box.minX, box.minY)
    include(out, at, box.maxX, box.maxY)
  }
}

function include(out: Float64Array, at: number, x: number, y: number): void {
  if (x < out[at]!) out[at] = x
  if (y < out[at + 1]!) out[at + 1] = y
  if (x > out[at + 2]!) out[at + 2] = x
  if (y > out[at + 3]!) out[at + 3] = y
}
