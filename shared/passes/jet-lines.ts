import type { Point } from '../geometry/types.ts'

/**
 * Jets that leave a wall: the jet is a cone that narrows by the taper τ on each side, and its near side lies on
 * a facet of tilt β (outward normal N) exactly when its axis a, unit and downward, has a·N = −sin τ. mm, radians.
 * Slopes are sideways travel per mm of depth. All derived; tests hold them against the planes themselves.
 */

/**
 * Slope square to the edge, outward, of a jet that leans along the edge by slope `along`. With `side` = s:
 * s·cos β − sin β = −sin τ·√(1 + s² + along²), a quadratic of which the root with the sign of τ is meant. Without
 * a lean it is tan(β − τ). Needs |β| + |τ| below a quarter turn.
 */
export function sideSlope(tilt: number, taper: number, along: number): number {
  const sin = Math.sin(taper)
  const c = Math.cos(tilt)
  const b = Math.sin(tilt)
  const narrow = c * c - sin * sin
  return (b * c - sin * Math.sqrt(b * b + narrow * (1 + along * along))) / narrow
}

/** How `sideSlope` changes with `along`. */
export function sideSlopeRate(tilt: number, taper: number, along: number): number {
  const sin = Math.sin(taper)
  const c = Math.cos(tilt)
  const b = Math.sin(tilt)
  return (-sin * along) / Math.sqrt(b * b + (c * c - sin * sin) * (1 + along * along))
}

/**
 * Length of the axis per mm of depth, √(1 + |v|²), of the jet that leaves both walls at a corner. Its slope v
 * has v·nᵢ = tan βᵢ − sin τ·√(1 + |v|²)/cos βᵢ for both, so v = A − sin τ·length·B, where A meets the tangents and
 * B the secants as a corner meets offsets; |v|² then gives a quadratic. NaN when no cone of this taper fits
 * between the walls (a corner sharper than twice the taper).
 */
export function seamLength(sin: number, ax: number, ay: number, bx: number, by: number): number {
  const fit = 1 - sin * sin * (bx * bx + by * by)
  if (!(fit > 0)) return NaN
  const mixed = sin * (ax * bx + ay * by)
  return (Math.sqrt(mixed * mixed + fit * (1 + ax * ax + ay * ay)) - mixed) / fit
}

/** Meets two figures at a corner of edges that turn by `turn`: what has v·n₁ = first and v·n₂ = second, as (v·n₁, v·u₁). */
function meet(first: number, second: number, turn: number): Point {
  const unlike = second === first ? 0 : (second - first) / Math.sin(turn)
  return { x: first, y: first * Math.tan(turn / 2) + unlike }
}

/**
 * Whole tilt of the jet that lies along the seam of two walls whose edges turn by `turn`, taper taken out of
 * both. Null where there is no such jet: unlike walls without a turn, or a corner sharper than twice the taper.
 */
export function seamJetTilt(
  tiltBefore: number,
  tiltAfter: number,
  turn: number,
  taper: number,
): number | null {
  const a = meet(Math.tan(tiltBefore), Math.tan(tiltAfter), turn)
  const b = meet(1 / Math.cos(tiltBefore), 1 / Math.cos(tiltAfter), turn)
  const length = seamLength(Math.sin(taper), a.x, a.y, b.x, b.y)
  if (!Number.isFinite(length)) return null
  const sin = Math.sin(taper)
  return Math.atan(Math.hypot(a.x - sin * length * b.x, a.y - sin * length * b.y))
}
