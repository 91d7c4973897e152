import type { Bounds } from '../../shared/geometry/types.ts'
import { formatLength } from '../../shared/units/format.ts'
import type { DisplayUnit } from '../../shared/units/length.ts'

/** `320 × 180 mm`: width then height of what the bounds hold. */
export function formatSize(bounds: Bounds, unit: DisplayUnit): string {
  const width = formatLength(bounds.maxX - bounds.minX, unit, { bare: true })
  return `${width} × ${formatLength(bounds.maxY - bounds.minY, unit)}`
}

/** `outline, 2 holes`: the loops of a part. */
export function loopsInWords(holes: number): string {
  if (holes === 0) return 'outline only'
  return `outline, ${holes} ${holes === 1 ? 'hole' : 'holes'}`
}
