import * as z from 'zod'

/** Wire form of profiles: millimetres, bulge as in DXF. */

const COORDINATE_LIMIT = 100_000
const coordinate = z.number().min(-COORDINATE_LIMIT).max(COORDINATE_LIMIT)

export const vertexSchema = z.strictObject({
  x: coordinate.describe('mm'),
  y: coordinate.describe('mm'),
  bulge: z
    .number()
    .min(-1e4)
    .max(1e4)
    .optional()
    .describe(
      'tan of a quarter of the included angle of the arc that starts here; positive counter-clockwise',
    ),
})

/** Two vertices suffice where both edges are arcs (a circle). */
export const vertexLoopSchema = z.array(vertexSchema).min(2).max(20_000)

export const vertexLoopsSchema = z
  .array(vertexLoopSchema)
  .min(1)
  .max(2_000)
  .describe('the outer loop first, then holes; orientation is put right on reading')

export const boundsSchema = z.strictObject({
  minX: z.number(),
  minY: z.number(),
  maxX: z.number(),
  maxY: z.number(),
})
