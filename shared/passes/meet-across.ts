import { CornerMode } from '../contours/frame.ts'
import { directionAfter, directionBefore } from './corner-moves.ts'
import { seamLength } from './jet-lines.ts'
import type { Level } from './level.ts'

/** Lines that turn by less than this do not meet, radians: a hundred million times rounding, far below a drawing's straight. */
const PARALLEL = 1e-7

/**
 * Lets edge p meet edge h, between which edges have gone, at corner h: fills its jet, turn and mode. False where
 * they run against each other and do not meet.
 */
export function meetAcross(level: Level, p: number, h: number): boolean {
  const { frame } = level
  if (frame.arc[p] || frame.arc[h]) return meetArcs(level, p, h)
  return meetLines(level, p, h)
}

function meetLines(level: Level, p: number, h: number): boolean {
  const { frame, axis, figure } = level
  const [ux, uy, vx, vy] = [frame.ux[p]!, frame.uy[p]!, frame.ux[h]!, frame.uy[h]!]
  const sin = ux * vy - uy * vx
  const cos = ux * vx + uy * vy
  const [f1, f2] = [figure[p]!, figure[h]!]
  const [before, after] = [axis.end, axis.start]
  level.turnSin[h] = sin
  level.turnCos[h] = cos
  if (Math.abs(sin) < PARALLEL) {
    if (cos < 0) return false
    // In line again, past a notch: the way goes over half way between.
    const e = frame.next[p]!
    const o = before.axis[f1]!
    level.x[h] = (frame.px[e]! + frame.px[h]!) / 2 + o * uy
    level.y[h] = (frame.py[e]! + frame.py[h]!) / 2 - o * ux
    level.p[h] = before.slope[f1]! * uy
    level.q[h] = -before.slope[f1]! * ux
    level.unfit[h] = 0
    level.mode[h] = CornerMode.smooth
    return true
  }
  // What has a along n₁ and b along n₂, the outward normals (uy, −ux) and (vy, −vx).
  const meetX = (a: number, b: number) => (b * ux - a * vx) / sin
  const meetY = (a: number, b: number) => (b * uy - a * vy) / sin
  const a = frame.px[p]! * uy - frame.py[p]! * ux + before.axis[f1]!
  const b = frame.px[h]! * vy - frame.py[h]! * vx + after.axis[f2]!
  level.x[h] = meetX(a, b)
  level.y[h] = meetY(a, b)
  const [wx, wy] = [meetX(before.tan[f1]!, after.tan[f2]!), meetY(before.tan[f1]!, after.tan[f2]!)]
  const [cx, cy] = [meetX(before.sec[f1]!, after.sec[f2]!), meetY(before.sec[f1]!, after.sec[f2]!)]
  const lean = Math.sin(level.jet.taper)
  const length = lean === 0 ? 1 : seamLength(lean, wx, wy, cx, cy)
  level.unfit[h] = Number.isNaN(length) ? 1 : 0
  const taken = level.unfit[h] ? 0 : lean * length
  level.p[h] = wx - taken * cx
  level.q[h] = wy - taken * cy
  level.mode[h] = CornerMode.mitre
  return true
}

/** With an arc: where the axes' curves cross nearest to the corner that was drawn, at the top face and at the bottom. */
function meetArcs(level: Level, p: number, h: number): boolean {
  const { frame, axis, figure } = level
  const t = frame.body.thickness
  const [f1, f2] = [figure[p]!, figure[h]!]
  const near = {
    x: (frame.px[frame.next[p]!]! + frame.px[h]!) / 2,
    y: (frame.py[frame.next[p]!]! + frame.py[h]!) / 2,
  }
  const [o1, o2] = [axis.end.axis[f1]!, axis.start.axis[f2]!]
  const top = crossing(level, p, o1, h, o2, near)
  const bottom = crossing(level, p, o1 + t * axis.end.slope[f1]!, h, o2 + t * axis.start.slope[f2]!, near)
  if (!top || !bottom) return false
  level.x[h] = top.x
  level.y[h] = top.y
  level.p[h] = (bottom.x - top.x) / t
  level.q[h] = (bottom.y - top.y) / t
  level.unfit[h] = 0
  level.mode[h] = CornerMode.mitre
  const [u, v] = [directionBefore(level, h), directionAfter(level, h)]
  level.turnSin[h] = u.x * v.y - u.y * v.x
  level.turnCos[h] = u.x * v.x + u.y * v.y
  return true
}

interface Place {
  readonly x: number
  readonly y: number
}

/** Where edge p moved out by o1 and edge h moved out by o2 cross, nearest to `near`; null where they do not. */
function crossing({ frame }: Level, p: number, o1: number, h: number, o2: number, near: Place): Place | null {
  if (!frame.arc[p]) return lineAndArc(frame, p, o1, h, o2, near)
  if (!frame.arc[h]) return lineAndArc(frame, h, o2, p, o1, near)
  const [r1, r2] = [radiusOut(frame, p, o1), radiusOut(frame, h, o2)]
  const [dx, dy] = [frame.cx[h]! - frame.cx[p]!, frame.cy[h]! - frame.cy[p]!]
  const apart = Math.hypot(dx, dy)
  if (apart === 0) return null
  const along = (r1 * r1 - r2 * r2 + apart * apart) / (2 * apart)
  return nearer(frame.cx[p]!, frame.cy[p]!, dx / apart, dy / apart, along, r1, near)
}

function lineAndArc(
  frame: Level['frame'],
  line: number,
  o1: number,
  arc: number,
  o2: number,
  near: Place,
): Place | null {
  const [nx, ny] = [frame.uy[line]!, -frame.ux[line]!]
  const along = (frame.px[line]! - frame.cx[arc]!) * nx + (frame.py[line]! - frame.cy[arc]!) * ny + o1
  return nearer(frame.cx[arc]!, frame.cy[arc]!, nx, ny, along, radiusOut(frame, arc, o2), near)
}

function radiusOut(frame: Level['frame'], g: number, offset: number): number {
  return frame.radius[g]! + Math.sign(frame.sweep[g]!) * offset
}

/** The point of a circle at `along` the axis (ax, ay) from its centre, on the side nearer to `near`. */
function nearer(
  cx: number,
  cy: number,
  ax: number,
  ay: number,
  along: number,
  radius: number,
  near: Place,
): Place | null {
  const square = (radius - along) * (radius + along)
  if (!(radius > 0 && square >= 0)) return null
  const side = Math.sign(ax * (near.y - cy) - ay * (near.x - cx)) || 1
  const across = side * Math.sqrt(square)
  return { x: cx + ax * along - ay * across, y: cy + ay * along + ax * across }
}
