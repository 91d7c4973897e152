import type { Band } from '../units/band.ts'

/** Is a measured value inside its band? */

export interface Judgement {
  readonly verdict: 'in' | 'over' | 'under'
  /** How far outside the band, in the unit measured; 0 inside. */
  readonly by: number
  readonly lowest: number
  readonly highest: number
}

/** Far below any gauge's division: only keeps 3.1 − 3 from counting as more than 0.1. */
const ROUNDING = 1e-9

export function judge(measured: number, nominal: number, band: Band): Judgement {
  const lowest = nominal - band.minus
  const highest = nominal + band.plus
  if (measured > highest + ROUNDING) return { verdict: 'over', by: measured - highest, lowest, highest }
  if (measured < lowest - ROUNDING) return { verdict: 'under', by: lowest - measured, lowest, highest }
  return { verdict: 'in', by: 0, lowest, highest }
}
