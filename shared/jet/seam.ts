/**
 * The seam of two walls at a corner, and the largest tilts that keep it within a limit. Radians. With
 * φ = π − interior angle and w = tan β, |v|² = (w₁² + w₂² − 2·w₁·w₂·cos φ)/sin² φ is the square of the seam's
 * slope from vertical.
 */

/** Angle of the seam from vertical. The interior angle is not 0, π or 2π: a smooth corner has no such seam. */
export function seamTilt(tilt1: number, tilt2: number, interiorAngle: number): number {
  const w1 = Math.tan(tilt1)
  const w2 = Math.tan(tilt2)
  const cos = -Math.cos(interiorAngle)
  const square = w1 * w1 + w2 * w2 - 2 * w1 * w2 * cos
  return Math.atan(Math.sqrt(Math.max(0, square)) / Math.abs(Math.sin(interiorAngle)))
}

/** The largest tilt for two equal walls: atan(tan(limit)·sin(α/2)). */
export function largestEqualTilt(limit: number, interiorAngle: number): number {
  return Math.atan(Math.tan(limit) * Math.sin(interiorAngle / 2))
}

/**
 * The smallest interior angle at which two walls of equal tilt stay within a limit; null when the walls
 * themselves pass it. Every larger angle up to a straight line is allowed too.
 */
export function smallestInteriorAngle(limit: number, tilt: number): number | null {
  const sine = Math.tan(Math.abs(tilt)) / Math.tan(limit)
  return sine > 1 ? null : 2 * Math.asin(sine)
}

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
