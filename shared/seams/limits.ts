/**
 * The largest tilts that keep the seam at a corner within a limit. Radians. With φ = π − interior angle and
 * w = tan β, the square of the seam's slope is (w₁² + w₂² − 2·w₁·w₂·cos φ)/sin² φ; solved here for w₁ (derived).
 */

/** The tilts of one wall that keep the seam within the limit while the other keeps its tilt. */
export interface TiltRange {
  readonly lowest: number
  readonly highest: number
}

/** Null when the other wall passes the limit by itself. */
export function tiltsAllowedBeside(limit: number, other: number, interiorAngle: number): TiltRange | null {
  const w2 = Math.tan(other)
  const room = Math.tan(limit) ** 2 - w2 * w2
  if (room < 0) return null
  const middle = -w2 * Math.cos(interiorAngle)
  const half = Math.abs(Math.sin(interiorAngle)) * Math.sqrt(room)
  return { lowest: Math.atan(middle - half), highest: Math.atan(middle + half) }
}

/**
 * The smallest interior angle at which two walls of equal tilt stay within a limit; null when the walls
 * themselves pass it. Every larger angle up to a straight line is allowed too.
 */
export function smallestInteriorAngle(limit: number, tilt: number): number | null {
  const sine = Math.tan(Math.abs(tilt)) / Math.tan(limit)
  return sine > 1 ? null : 2 * Math.asin(sine)
}
