import type { Band } from '../../shared/units/band.ts'
import type { JointSpec } from '../../shared/setup/schema.ts'
import { formatAngle, formatLength } from '../../shared/units/format.ts'
import type { DisplayUnit } from '../../shared/units/length.ts'
import type { SectionTolerances } from './types.ts'

/** `+1.6 −3.2 mm`, or `±1.6 mm` where both are the same. */
export function bandText({ plus, minus }: Band, format: (value: number, bare: boolean) => string): string {
  if (plus === minus) return `±${format(plus, false)}`
  return `+${format(plus, true)} −${format(minus, false)}`
}

export function sectionTolerances(joint: JointSpec | null, unit: DisplayUnit): SectionTolerances | undefined {
  if (!joint?.tolerance) return undefined
  const { angle, rootOpening, rootFace } = joint.tolerance
  const length = (value: number, bare: boolean) => formatLength(value, unit, { bare })
  return {
    includedAngle: bandText(angle, (value, bare) => formatAngle(value, { bare })),
    rootOpening: bandText(rootOpening, length),
    rootFace: bandText(rootFace, length),
  }
}
