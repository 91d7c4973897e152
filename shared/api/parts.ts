import * as z from 'zod'
import { readingOptionsSchema, readingSchema } from '../drawing/schema.ts'
import { boundsSchema, vertexLoopsSchema } from '../geometry/schema.ts'
import { instant, pageOf, pageQuery, personSchema, version } from './common.ts'

export const drawingSchema = z.strictObject({
  id: z.uuid(),
  fileName: z.string(),
  size: z.int().describe('bytes'),
  sha256: z.string(),
  uploadedBy: personSchema,
  uploadedAt: instant,
})

export const drawingReadSchema = z.strictObject({ drawing: drawingSchema, reading: readingSchema })

export const readDrawingBody = readingOptionsSchema

const number = z.string().trim().min(1).max(60)
const name = z.string().trim().min(1).max(120)

export const partSchema = z.strictObject({
  id: z.uuid(),
  number,
  name,
  drawing: drawingSchema,
  reading: readingOptionsSchema.describe('as the drawing was read'),
  loops: vertexLoopsSchema.describe('mm; outer counter-clockwise first, holes clockwise'),
  area: z.number().describe('mm² less holes'),
  bounds: boundsSchema,
  createdBy: personSchema,
  createdAt: instant,
  version,
})

/** A row of the list: no profile beyond what a thumbnail draws. */
export const partRowSchema = partSchema.omit({ reading: true, drawing: true }).extend({
  setups: z.int(),
})

export const partsQuery = z.strictObject({
  ...pageQuery,
  sort: z.enum(['number', '-number', 'createdAt', '-createdAt']).optional(),
})
export const partsPage = pageOf(partRowSchema)

export const createPartBody = z.strictObject({
  drawingId: z.uuid(),
  reading: readingOptionsSchema,
  pick: z.int().min(0).max(5_000).describe('index into the parts of the reading'),
  number,
  name,
})
export const updatePartBody = z.strictObject({ number: number.optional(), name: name.optional() })

export type Drawing = z.infer<typeof drawingSchema>
export type Part = z.infer<typeof partSchema>
export type PartRow = z.infer<typeof partRowSchema>
