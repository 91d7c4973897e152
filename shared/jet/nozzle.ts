/** Does the tilted nozzle's low rim clear the plate? mm and radians. */

export interface Nozzle {
  /** Outside. */
  readonly diameter: number
  /** Tip to plate along the axis. */
  readonly standoff: number
}

/** Height of the nozzle's low rim above the plate; negative when it would touch: s·cos A − (D/2)·sin A. */
export function rimClearance({ diameter, standoff }: Nozzle, tilt: number): number {
  const lean = Math.abs(tilt)
  return standoff * Math.cos(lean) - (diameter / 2) * Math.sin(lean)
}

/** The stand-off that leaves a clearance under the low rim: (c + (D/2)·sin A)/cos A. */
export function standoffFor(diameter: number, tilt: number, clearance: number): number {
  const lean = Math.abs(tilt)
  return (clearance + (diameter / 2) * Math.sin(lean)) / Math.cos(lean)
}
