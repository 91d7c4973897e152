/** Kerf taper: what a coupon says about it, and how the jet leans to take it out of the part. mm and radians. */

/** A straight cut through a coupon, measured at both faces. */
export interface Coupon {
  readonly widthTop: number
  readonly widthBottom: number
  /** The jet's path through the metal: the coupon's thickness when it was cut square. */
  readonly path: number
}

/** Taper per side, positive where the kerf narrows downward: atan((W_top − W_bottom)/(2h)). */
export function taperFromCoupon({ widthTop, widthBottom, path }: Coupon): number {
  return Math.atan((widthTop - widthBottom) / (2 * path))
}

/** The tilt to command so that the part's wall stands at `tilt`; the waste side takes twice the taper. */
export function jetTilt(tilt: number, taper: number): number {
  return tilt - taper
}

/** The wall that a commanded tilt leaves on the part. */
export function wallTilt(commanded: number, taper: number): number {
  return commanded + taper
}
