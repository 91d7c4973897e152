import { CornerMode } from '../contours/frame.ts'
import type { Level } from './level.ts'

/** The way of the axis along one edge, at the top face: from the corner where it starts to the one where it ends. */
export interface AxisEdge {
  g: number
  arc: boolean
  /** Length along the edge, mm; negative where the corners have passed each other. */
  length: number
  /** Line: start, unit direction, step across per length (0 unless the wall blends). */
  x: number
  y: number
  ux: number
  uy: number
  /** Arc: centre, heading of the start, signed sweep, radius at the start, its sign of growth outward. */
  cx: number
  cy: number
  heading: number
  sweep: number
  radius: number
  grow: number
  /** Outward slope of the square jet at the start and at the end. */
  slopeStart: number
  slopeEnd: number
  /** Along-slope of the seam jet at the start and at the end. */
  alongStart: number
  alongEnd: number
  /** How far the end stands off the start's line (or circle), outward: 0 unless the wall blends. */
  rise: number
}

export function makeAxisEdge(): AxisEdge {
  return {
    g: -1,
    arc: false,
    length: 0,
    x: 0,
    y: 0,
    ux: 0,
    uy: 0,
    cx: 0,
    cy: 0,
    heading: 0,
    sweep: 0,
    radius: 0,
    grow: 0,
    slopeStart: 0,
    slopeEnd: 0,
    alongStart: 0,
    alongEnd: 0,
    rise: 0,
  }
}

/** Reads an edge's axis out of a level into `out`, which is used again and again. */
export function readAxisEdge(level: Level, g: number, out: AxisEdge): AxisEdge {
  const { frame, axis, figure, next, x, y, p, q } = level
  const h = next[g]!
  const f = figure[g]!
  out.g = g
  out.slopeStart = axis.start.slope[f]!
  out.slopeEnd = axis.end.slope[f]!
  out.arc = frame.arc[g] === 1
  out.ux = frame.ux[g]!
  out.uy = frame.uy[g]!
  let sx = x[g]!
  let sy = y[g]!
  if (level.mode[g] === CornerMode.step) {
    const o = axis.start.axis[f]!
    sx = frame.px[g]! + o * frame.mx[g]!
    sy = frame.py[g]! + o * frame.my[g]!
  }
  out.x = sx
  out.y = sy
  if (out.arc) {
    readArc(level, g, h, sx, sy, out)
    return out
  }
  const dx = x[h]! - sx
  const dy = y[h]! - sy
  out.length = dx * out.ux + dy * out.uy
  out.rise = axis.start === axis.end ? 0 : dx * out.uy - dy * out.ux
  out.alongStart = p[g]! * out.ux + q[g]! * out.uy
  out.alongEnd = p[h]! * out.ux + q[h]! * out.uy
  return out
}

function readArc(level: Level, g: number, h: number, sx: number, sy: number, out: AxisEdge): void {
  const { frame, axis, figure, x, y, p, q } = level
  const f = figure[g]!
  const e = frame.next[g]!
  const cx = frame.cx[g]!
  const cy = frame.cy[g]!
  const way = Math.sign(frame.sweep[g]!)
  out.cx = cx
  out.cy = cy
  out.grow = way
  out.radius = frame.radius[g]! + way * axis.start.axis[f]!
  out.rise = way * (axis.end.axis[f]! - axis.start.axis[f]!)
  out.heading = Math.atan2(sy - cy, sx - cx)
  // The corners' own turn about the centre, added to the drawn sweep: less than half a turn each.
  out.sweep =
    frame.sweep[g]! -
    turnAbout(frame.px[g]! - cx, frame.py[g]! - cy, sx - cx, sy - cy) +
    turnAbout(frame.px[e]! - cx, frame.py[e]! - cy, x[h]! - cx, y[h]! - cy)
  out.length = out.radius * out.sweep * way
  const end = out.heading + out.sweep
  out.alongStart = way * (q[g]! * Math.cos(out.heading) - p[g]! * Math.sin(out.heading))
  out.alongEnd = way * (q[h]! * Math.cos(end) - p[h]! * Math.sin(end))
}

function turnAbout(ax: number, ay: number, bx: number, by: number): number {
  return Math.atan2(ax * by - ay * bx, ax * bx + ay * by)
}
