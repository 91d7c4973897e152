import type { Body } from './types.ts'

/** Volume, mm³; null when an event lies within the plate. */
export function volumeOf(_body: Body): number | null {
  return null
}
