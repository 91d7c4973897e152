import type { LengthUnit } from './schema.ts'

/** Exact by definition of the units. */
export const MILLIMETRES: Readonly<Record<LengthUnit, number>> = {
  mm: 1,
  cm: 10,
  m: 1000,
  in: 25.4,
  ft: 304.8,
}

const NAMES: Readonly<Record<LengthUnit, string>> = {
  mm: 'millimetres',
  cm: 'centimetres',
  m: 'metres',
  in: 'inches',
  ft: 'feet',
}

/**
 * Sizes (longest side, mm) that a flat part is likely to have; common practice, no source. Inches end at 1 m:
 * templates declare them for drawings made in millimetres, and those come out 25 times too large.
 */
const LIKELY: readonly [number, number] = [10, 12_000]
const LIKELY_INCHES: readonly [number, number] = [10, 1_000]
const LIKELY_OTHER: readonly [number, number] = [10, 3_000]

/**
 * The unit to ask about when a longest side of `size` drawing units is unlikely in the unit used; null when the
 * size is likely, or no unit makes it so. `hint` is the unit that the file leans towards without declaring it.
 */
export function suggestUnit(size: number, used: LengthUnit, hint: LengthUnit | null): LengthUnit | null {
  const likely = (unit: LengthUnit, [low, high]: readonly [number, number]) =>
    size * MILLIMETRES[unit] >= low && size * MILLIMETRES[unit] <= high
  if (hint !== null && hint !== used && likely(hint, hint === 'in' ? LIKELY_INCHES : LIKELY)) return hint
  if (likely(used, used === 'in' ? LIKELY_INCHES : LIKELY)) return null
  const order: readonly LengthUnit[] = ['mm', 'in', 'cm', 'm', 'ft']
  return order.find((unit) => unit !== used && likely(unit, LIKELY_OTHER)) ?? null
}

/** The question, with both sizes. */
export function unitQuestion(size: number, used: LengthUnit, suggested: LengthUnit): string {
  const inMillimetres = (unit: LengthUnit) => `${(size * MILLIMETRES[unit]).toFixed(1)} mm`
  return (
    `Read in ${NAMES[used]} the drawing is ${inMillimetres(used)} long; in ${NAMES[suggested]} it is ` +
    `${inMillimetres(suggested)}. Check which is right and choose the unit.`
  )
}
