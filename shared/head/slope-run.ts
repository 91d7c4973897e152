import type { JetPath } from '../passes/types.ts'

/**
 * How a jet's slope goes during one move. In the frame that turns with a round move (also of a straight one, that does
 * not turn) the slope goes evenly along a straight line in the plane of slopes, whose origin is the vertical jet; so
 * its size is convex along the move: steepest at an end, and flattest where the line passes the origin (derived).
 */
export interface SlopeRun {
  /** Length of that line, mm per mm. */
  change: number
  /** Part of the move, 0 to 1, at which the jet is flattest, and its slope there. */
  part: number
  flattest: number
  /** Distance of the whole line from the origin, and the part at which it is nearest: where `part` is inside the move they are the same. */
  offset: number
  foot: number
}

export function makeSlopeRun(): SlopeRun {
  return { change: 0, part: 0, flattest: 0, offset: 0, foot: 0 }
}

/** Written in place: there may be a hundred thousand moves. */
export function slopeRun({ p, q, sweep }: JetPath, i: number, out: SlopeRun): void {
  const p0 = p[i]!
  const q0 = q[i]!
  let p1 = p[i + 1]!
  let q1 = q[i + 1]!
  const turn = sweep[i]!
  if (turn !== 0) {
    const c = Math.cos(turn)
    const s = Math.sin(turn)
    const back = p1 * c + q1 * s
    q1 = q1 * c - p1 * s
    p1 = back
  }
  const dp = p1 - p0
  const dq = q1 - q0
  const square = dp * dp + dq * dq
  const foot = square === 0 ? 0 : -(p0 * dp + q0 * dq) / square
  const part = Math.min(1, Math.max(0, foot))
  const pm = p0 + part * dp
  const qm = q0 + part * dq
  out.change = Math.sqrt(square)
  out.foot = foot
  out.offset = square === 0 ? Math.sqrt(p0 * p0 + q0 * q0) : Math.abs(p0 * dq - q0 * dp) / out.change
  out.part = part
  out.flattest = Math.sqrt(pm * pm + qm * qm)
}

/** A straight move along which the jet keeps its direction. */
export function isSteady({ p, q, sweep }: JetPath, i: number): boolean {
  return sweep[i] === 0 && p[i] === p[i + 1] && q[i] === q[i + 1]
}
