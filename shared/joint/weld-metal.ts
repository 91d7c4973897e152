/** Plain carbon steel, kg/m³: a round figure in common use; a procedure's own density takes its place. */
export const STEEL_DENSITY = 7850

/**
 * Weld metal to fill a groove, kg per metre of joint: area (mm²) × density (kg/m³). Bare groove: a cap and the
 * deposition efficiency come on top.
 */
export function weldMetalPerMetre(area: number, density: number = STEEL_DENSITY): number {
  return area * density * 1e-6
}
