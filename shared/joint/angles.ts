/**
 * One tilt said three ways. Confusing them is the trade's classic mistake, so they are always shown together.
 * All in degrees; a bevel angle is measured from a plane square to the plate's face, a groove angle is the
 * total of both plates.
 */
export interface AngleThreeWays {
  readonly fromVertical: number
  readonly fromPlateFace: number
  /** Included angle of both plates at this depth. */
  readonly grooveAngle: number
}

/** `mateTilt` is the tilt of the facing wall at the same depth: the same for a mirrored prep, 0 for a square edge. */
export function anglesThreeWays(tilt: number, mateTilt: number): AngleThreeWays {
  return {
    fromVertical: Math.abs(tilt),
    fromPlateFace: 90 - Math.abs(tilt),
    grooveAngle: Math.abs(tilt + mateTilt),
  }
}
