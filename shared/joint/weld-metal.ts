import type { JointSection } from './section.ts'

/** Plain carbon steel, kg/m³: a round figure in common use; a procedure's own density takes its place. */
export const STEEL_DENSITY = 7850

/**
 * Weld metal to fill a groove, kg per metre of joint: area (mm²) × density (kg/m³). Bare groove: a cap and the
 * deposition efficiency come on top (`weldMetal`).
 */
export function weldMetalPerMetre(area: number, density: number = STEEL_DENSITY): number {
  return area * density * 1e-6
}

/** What the user sets about the weld: all of it from the welding procedure, none of it known here. */
export interface Fill {
  /** kg/m³ */
  readonly density?: number
  /** Height of the cap over the top face and under the bottom face, mm. */
  readonly capTop?: number
  readonly capBottom?: number
  /** How far each cap runs on to the plates beside the groove, mm on each side. */
  readonly capOverlap?: number
  /** Share of the filler bought that ends up in the joint, above 0 and up to 1. */
  readonly efficiency?: number
}

export type WeldMetal =
  | {
      readonly kind: 'weld-metal'
      /** mm² */
      readonly grooveArea: number
      readonly capArea: number
      /** In the joint, kg per metre. */
      readonly deposited: number
      /** To buy: deposited over efficiency, kg per metre. */
      readonly filler: number
    }
  | { readonly kind: 'error'; readonly code: 'efficiency' | 'density' | 'cap'; readonly message: string }

/** Weld metal of a whole joint with its caps, as the user sets them; a bare groove where nothing is set. */
export function weldMetal(section: JointSection, fill: Fill = {}): WeldMetal {
  const { density = STEEL_DENSITY, capTop = 0, capBottom = 0, capOverlap = 0, efficiency = 1 } = fill
  if (!(efficiency > 0 && efficiency <= 1))
    return refused('efficiency', 'Deposition efficiency is more than 0 and at most 100 %. Type another.')
  if (!(density > 0 && density < Infinity))
    return refused('density', 'Density is more than 0 kg/m³. Type another.')
  const caps = [
    { height: capTop, width: section.widthTop + 2 * capOverlap },
    { height: capBottom, width: section.widthBottom + 2 * capOverlap },
  ]
  // A cap higher than half its width would hang over: no circular segment, and no weld either.
  if (!(capOverlap >= 0) || caps.some(({ height, width }) => !(height >= 0 && height <= width / 2)))
    return refused('cap', 'A cap is at most half as high as it is wide. Make it lower or wider.')
  const area = caps.reduce((sum, { width, height }) => sum + capArea(width, height), 0)
  const deposited = weldMetalPerMetre(section.area + area, density)
  return {
    kind: 'weld-metal',
    grooveArea: section.area,
    capArea: area,
    deposited,
    filler: deposited / efficiency,
  }
}

/**
 * Area of a cap as a circular segment, mm²; height at most half the width (derived). Below a thousandth of the width
 * the closed form loses its digits and two thirds of the rectangle is as exact.
 */
export function capArea(width: number, height: number): number {
  if (!(width > 0) || !(height > 0)) return 0
  if (height < FLAT_CAP * width) return (2 / 3) * width * height
  const radius = (width * width) / (8 * height) + height / 2
  return radius * radius * Math.asin(width / (2 * radius)) - (width / 2) * (radius - height)
}

/** The parabola's error is (4/5)(h/w)² of the area: under a millionth here. */
const FLAT_CAP = 1e-3

function refused(code: 'efficiency' | 'density' | 'cap', message: string): WeldMetal {
  return { kind: 'error', code, message }
}
