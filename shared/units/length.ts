/** Millimetres are stored and computed with; the display unit exists on screens and in printed text only. */

export const displayUnits = ['mm', 'in'] as const
export type DisplayUnit = (typeof displayUnits)[number]

/** Exact by definition (international yard and pound agreement, 1959). */
export const MM_PER_INCH = 25.4

export function millimetres(inches: number): number {
  return inches * MM_PER_INCH
}

export function inches(millimetres: number): number {
  return millimetres / MM_PER_INCH
}
