/** Where the jet's axis runs, and how far through the metal. mm and radians. */

/**
 * Distance of the axis outside the wall's line, measured at the top face: r·cos τ / cos β with r half the kerf
 * at the top. Derived: the near side of a jet that narrows by τ and leans by β − τ is the wall.
 */
export function axisOffset(kerf: number, tilt: number, taper: number): number {
  return ((kerf / 2) * Math.cos(taper)) / Math.cos(tilt)
}

/** The jet's whole angle from vertical when it leans to the side and ahead (or behind) at once. */
export function wholeTilt(side: number, lead: number): number {
  return Math.atan(Math.hypot(Math.tan(side), Math.tan(lead)))
}

/** Length of the jet inside a plate, for a whole tilt. Speed and taper follow this, not the thickness. */
export function metalPath(thickness: number, tilt: number): number {
  return thickness / Math.cos(tilt)
}
