import type { JetPath } from '../passes/types.ts'

/**
 * Length and speed of the axis at a depth along one move. The move's parameter u runs from 0 to 1. In the frame that
 * turns with a round move the axis lies at Z(u) = Z₀ + u·ΔZ (ΔZ also of a straight one, that does not turn), so its
 * velocity per u is ΔZ + i·s·Z(u) with s the sweep: V₀ + u·B, even in u. Therefore its size is convex in u, and as
 * Z is even in depth also convex in depth: the fastest point of a jet within a plate is at the top or the bottom, at
 * one end of the move (derived).
 */
export interface AxisRun {
  /** mm */
  length: number
  /** Greatest speed, mm per u. */
  fastest: number
}

/** Written in place: there may be a hundred thousand moves. */
export function runAtDepth(path: JetPath, i: number, depth: number, out: AxisRun): void {
  const { x, y, p, q } = path
  const sweep = path.sweep[i]!
  const j = i + 1
  const ax = x[i]! + depth * p[i]!
  const ay = y[i]! + depth * q[i]!
  const bx = x[j]! + depth * p[j]!
  const by = y[j]! + depth * q[j]!
  if (sweep === 0) {
    out.length = out.fastest = size(bx - ax, by - ay)
    return
  }
  runRound(path, i, depth, sweep, out)
}

function runRound(
  { x, y, p, q, cx, cy }: JetPath,
  i: number,
  depth: number,
  sweep: number,
  out: AxisRun,
): void {
  const j = i + 1
  const mx = cx[i]!
  const my = cy[i]!
  const heading = Math.atan2(y[i]! - my, x[i]! - mx)
  // Distance from the centre and the slope's parts go evenly: turn both ends back on to the x axis.
  const c0 = Math.cos(heading)
  const s0 = Math.sin(heading)
  const c1 = Math.cos(heading + sweep)
  const s1 = Math.sin(heading + sweep)
  const zx0 = size(x[i]! - mx, y[i]! - my) + depth * (p[i]! * c0 + q[i]! * s0)
  const zy0 = depth * (q[i]! * c0 - p[i]! * s0)
  const zx1 = size(x[j]! - mx, y[j]! - my) + depth * (p[j]! * c1 + q[j]! * s1)
  const zy1 = depth * (q[j]! * c1 - p[j]! * s1)
  const dx = zx1 - zx0
  const dy = zy1 - zy0
  const vx = dx - sweep * zy0
  const vy = dy + sweep * zx0
  const bx = -sweep * dy
  const by = sweep * dx
  out.length = meanSize(vx, vy, bx, by)
  out.fastest = Math.max(size(vx, vy), size(vx + bx, vy + by))
}

/** Below this share of |V| the change is small enough for three Gauss points (next term under 1e-14); above, the closed form keeps its digits. */
const SMALL_CHANGE = 0.01

/** ∫₀¹ |V + u·B| du. */
export function meanSize(vx: number, vy: number, bx: number, by: number): number {
  const change = size(bx, by)
  const speed = size(vx, vy)
  if (change <= SMALL_CHANGE * speed) {
    if (change === 0) return speed
    const at = (u: number) => size(vx + u * bx, vy + u * by)
    return (5 * at(0.5 - GAUSS) + 8 * at(0.5) + 5 * at(0.5 + GAUSS)) / 18
  }
  // Along B the velocity goes from w to w + |B|, across it stays: ∫√(w² + c²) dw = ½(w√(w² + c²) + c²·asinh(w/c)).
  const from = (vx * bx + vy * by) / change
  const across = Math.abs(vx * by - vy * bx) / change
  return (areaUnder(from + change, across) - areaUnder(from, across)) / change
}

const GAUSS = Math.sqrt(0.15)

function areaUnder(w: number, c: number): number {
  if (c * c === 0) return (w * Math.abs(w)) / 2
  return (w * size(w, c) + c * c * Math.asinh(w / c)) / 2
}

/** Lengths in a plate neither overflow nor underflow, so the plain root does; Math.hypot takes many times as long. */
function size(x: number, y: number): number {
  return Math.sqrt(x * x + y * y)
}
