/** What moves a bottom edge: how much each uncertainty of the set-up shifts it. mm and radians. */

export interface Uncertainty {
  /** Plate thicker or thinner than nominal. */
  readonly thickness: number
  /** Top face higher or lower than the head believes; shifts the whole wall. */
  readonly height: number
  /** Angle of the head. */
  readonly tilt: number
}

export interface ErrorBudget {
  readonly fromThickness: number
  readonly fromHeight: number
  readonly fromTilt: number
  /** Root sum square: the three are taken as independent. */
  readonly together: number
}

/** To first order: δt·tan β, δz·tan β, t·δβ/cos² β. */
export function bottomEdgeErrors(thickness: number, tilt: number, uncertainty: Uncertainty): ErrorBudget {
  const slope = Math.abs(Math.tan(tilt))
  const fromThickness = Math.abs(uncertainty.thickness) * slope
  const fromHeight = Math.abs(uncertainty.height) * slope
  const fromTilt = (thickness * Math.abs(uncertainty.tilt)) / Math.cos(tilt) ** 2
  return { fromThickness, fromHeight, fromTilt, together: Math.hypot(fromThickness, fromHeight, fromTilt) }
}
