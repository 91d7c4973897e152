import type { JetPath } from '../passes/types.ts'
import { fallBeside, type JetCone } from './jet-cone.ts'
import { BITE_TOLERANCE } from './types.ts'

/** A straight move beside an endless plane. */

/** A proof has two sides, the jet's and the wall's: each may miss by half of what counts, mm. */
export const HALF = BITE_TOLERANCE / 2

/** Turning moves are looked at this often and no oftener before the search takes over. */
const MOST_LOOKS = 400

/** The bound of the second derivative holds where sin²τ·L² is below this: its root then stays near that of 1 + c². */
const LEAST_ROOT = 0.1

/**
 * Whether a straight move keeps outside a plane of level normal n, which stands at height h0 along n at depth z0
 * and at h1 at z1. Against an endless plane the deepest bite at a depth is cos τ·r − sin τ·L·d − κ·gap; with a steady
 * slope that is even in d and along the move, so the four corners tell.
 */
export function outsidePlane(
  cone: JetCone,
  path: JetPath,
  i: number,
  nx: number,
  ny: number,
  z0: number,
  h0: number,
  z1: number,
  h1: number,
): boolean {
  const { x, y, p, q } = path
  const j = i + 1
  const [p0, q0, p1, q1] = [p[i]!, q[i]!, p[j]!, q[j]!]
  const a0 = x[i]! * nx + y[i]! * ny
  const a1 = x[j]! * nx + y[j]! * ny
  const c0 = p0 * nx + q0 * ny
  const c1 = p1 * nx + q1 * ny
  // Quickly out: the axis itself is behind the plane.
  if (a0 + z0 * c0 < h0 || a0 + z1 * c0 < h1 || a1 + z0 * c1 < h0 || a1 + z1 * c1 < h1) return false
  const square0 = 1 + p0 * p0 + q0 * q0
  const square1 = 1 + p1 * p1 + q1 * q1
  if (!(planeBite(cone, a0 + z0 * c0 - h0, c0, square0, z0) <= HALF)) return false
  if (!(planeBite(cone, a0 + z1 * c0 - h1, c0, square0, z1) <= HALF)) return false
  if (!(planeBite(cone, a1 + z0 * c1 - h0, c1, square1, z0) <= HALF)) return false
  if (!(planeBite(cone, a1 + z1 * c1 - h1, c1, square1, z1) <= HALF)) return false
  if (p0 === p1 && q0 === q1) return true
  if (cone.sin === 0) {
    return (
      staysOutside(cone.radius, a0 + z0 * c0 - h0, a1 + z0 * c1 - h0, c0, c1) &&
      staysOutside(cone.radius, a0 + z1 * c0 - h1, a1 + z1 * c1 - h1, c0, c1)
    )
  }
  if (cone.sin * cone.sin * Math.max(square0, square1) > LEAST_ROOT) return false
  return (
    turnsOutside(cone, z0, a0 + z0 * c0 - h0, a1 + z0 * c1 - h0, p0, q0, p1, q1, c0, c1) &&
    turnsOutside(cone, z1, a0 + z1 * c0 - h1, a1 + z1 * c1 - h1, p0, q0, p1, q1, c0, c1)
  )
}

/** The deepest bite into all that lies behind a plane, at a depth where the axis is `gap` in front of it. */
function planeBite(cone: JetCone, gap: number, c: number, square: number, depth: number): number {
  if (cone.sin === 0) return cone.radius - gap / Math.sqrt(1 + c * c)
  return cone.cos * cone.radius - cone.sin * Math.sqrt(square) * depth - fallBeside(cone, c, square) * gap
}

/**
 * A jet without taper that turns evenly: gap and c are even in u, and gap ≥ r·√(1 + c²) is a quadratic not
 * falling below zero (gaps are positive at both ends, as the axis was looked at first).
 */
function staysOutside(radius: number, g0: number, g1: number, c0: number, c1: number): boolean {
  const r = radius - BITE_TOLERANCE
  const [g, c] = [g1 - g0, c1 - c0]
  const a = g * g - r * r * c * c
  if (a <= 0) return true // least at an end, and both ends are clear
  const half = g0 * g - r * r * c0 * c
  const u = -half / a
  if (u <= 0 || u >= 1) return true
  return g0 * g0 - r * r * (1 + c0 * c0) + half * u >= 0
}

/**
 * The same with taper: between two looks a step apart the bite passes the higher one by at most bend·step²/8, bend a
 * bound of its second derivative along the move; steps are halved where that is not enough.
 */
function turnsOutside(
  cone: JetCone,
  depth: number,
  g0: number,
  g1: number,
  p0: number,
  q0: number,
  p1: number,
  q1: number,
  c0: number,
  c1: number,
): boolean {
  const sin = Math.abs(cone.sin)
  const turn = Math.hypot(p1 - p0, q1 - q0)
  const closing = Math.abs(c1 - c0)
  const bend =
    depth * sin * turn * turn +
    2 * Math.abs(g1 - g0) * (closing + sin * turn) +
    Math.max(g0, g1) * (2 * closing * closing + 4 * sin * turn * turn)
  let looks = 0
  const biteOf = (u: number) => {
    const p = p0 + u * (p1 - p0)
    const q = q0 + u * (q1 - q0)
    return planeBite(cone, g0 + u * (g1 - g0), c0 + u * (c1 - c0), 1 + p * p + q * q, depth)
  }
  const isBelow = (u0: number, f0: number, u1: number, f1: number): boolean => {
    const step = u1 - u0
    if (Math.max(f0, f1) + (bend * step * step) / 8 <= BITE_TOLERANCE) return true
    if (++looks > MOST_LOOKS) return false
    const u = (u0 + u1) / 2
    const f = biteOf(u)
    return f <= BITE_TOLERANCE && isBelow(u0, f0, u, f) && isBelow(u, f, u1, f1)
  }
  return isBelow(0, biteOf(0), 1, biteOf(1))
}
