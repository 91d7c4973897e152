import type * as z from 'zod'
import { readingOptionsSchema, type LengthUnit } from '../../../../shared/drawing/schema.ts'
import type { Bounds } from '../../../../shared/geometry/types.ts'
import { MM_PER_INCH } from '../../../../shared/units/length.ts'

export type Options = z.output<typeof readingOptionsSchema>

/** How a drawing is read at first: as the file says. */
export const startOptions: Options = readingOptionsSchema.parse({})

const MM_PER: Record<LengthUnit, number> = { mm: 1, cm: 10, m: 1_000, in: MM_PER_INCH, ft: 12 * MM_PER_INCH }

export const unitWords: Record<LengthUnit, string> = {
  mm: 'millimetres',
  cm: 'centimetres',
  m: 'metres',
  in: 'inches',
  ft: 'feet',
}

/** The bounds in mm as they would be, had the drawing been read in another unit. */
export function boundsIn(bounds: Bounds, used: LengthUnit, other: LengthUnit): Bounds {
  const scale = MM_PER[other] / MM_PER[used]
  return {
    minX: bounds.minX * scale,
    minY: bounds.minY * scale,
    maxX: bounds.maxX * scale,
    maxY: bounds.maxY * scale,
  }
}

/** The layers that are read once one is ticked or unticked; all of them again means no choice at all. */
export function withLayer(
  layers: readonly { readonly name: string; readonly read: boolean }[],
  name: string,
  read: boolean,
): string[] | undefined {
  const chosen = layers
    .filter((layer) => (layer.name === name ? read : layer.read))
    .map((layer) => layer.name)
  return chosen.length === layers.length ? undefined : chosen
}
