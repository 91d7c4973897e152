import type { Head } from '../../shared/api/heads.ts'
import { formatAngle } from '../../shared/units/format.ts'

export const headKindWords: Record<Head['kind'], string> = {
  turning: 'C turns, A tilts',
  'crossed-tilts': 'A and B tilt across each other',
}

/** `North gantry · 55° working, 60° mechanical`. */
export function headInWords({ name, workingLimit, mechanicalLimit }: Head): string {
  const working = workingLimit === null ? 'no working limit' : `${formatAngle(workingLimit)} working`
  return `${name} · ${working}, ${formatAngle(mechanicalLimit)} mechanical`
}
