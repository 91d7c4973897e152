import * as z from 'zod'
import { readingOptionsSchema, readingSchema } from '../drawing/schema.ts'
import { boundsSchema, vertexLoopsSchema } from '../geometry/schema.ts'
import { idParams, instant, pageOf, pageQuery, personSchema, version } from './common.ts'
import type { Route } from './route.ts'

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

/** Drawings and parts. */
export const partRoutes = {
  uploadDrawing: {
    method: 'post',
    path: '/api/drawings',
    summary: 'Upload a DXF and read it',
    upload: 'file',
    status: 201,
    answer: drawingReadSchema,
  },
  readDrawing: {
    method: 'post',
    path: '/api/drawings/:id/reading',
    summary: 'Read a stored drawing again with other options',
    params: idParams,
    body: readDrawingBody,
    status: 200,
    answer: drawingReadSchema,
  },
  drawingFile: {
    method: 'get',
    path: '/api/drawings/:id/file',
    summary: 'The drawing as uploaded',
    params: idParams,
    status: 200,
    answer: 'application/dxf',
  },
  listParts: {
    method: 'get',
    path: '/api/parts',
    summary: 'Parts',
    query: partsQuery,
    status: 200,
    answer: partsPage,
  },
  createPart: {
    method: 'post',
    path: '/api/parts',
    summary: 'Make a part of a drawing',
    body: createPartBody,
    status: 201,
    answer: partSchema,
  },
  getPart: {
    method: 'get',
    path: '/api/parts/:id',
    summary: 'A part',
    params: idParams,
    status: 200,
    answer: partSchema,
  },
  updatePart: {
    method: 'patch',
    path: '/api/parts/:id',
    summary: 'Rename a part',
    params: idParams,
    body: updatePartBody,
    ifMatch: true,
    status: 200,
    answer: partSchema,
  },
} as const satisfies Record<string, Route>
