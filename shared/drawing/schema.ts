import * as z from 'zod'
import { boundsSchema, vertexLoopSchema } from '../geometry/schema.ts'

/** What reading a drawing is told, and what it answers. Everything in millimetres once the unit is chosen. */

export const lengthUnits = ['mm', 'cm', 'm', 'in', 'ft'] as const

export const readingOptionsSchema = z.strictObject({
  unit: z.enum(lengthUnits).optional().describe("the drawing's unit; absent: as the file declares, else mm"),
  joinTolerance: z.number().min(0).max(5).default(0.01).describe('largest gap that is joined, mm'),
  recogniseArcs: z.boolean().default(true),
  arcTolerance: z
    .number()
    .min(0.0001)
    .max(1)
    .default(0.01)
    .describe('largest distance of a run of lines from the arc it is taken for, mm'),
  layers: z
    .array(z.string().max(255))
    .max(1_000)
    .optional()
    .describe('layers to read; absent: all that draw geometry'),
})

const place = z.strictObject({ x: z.number(), y: z.number() })

export const noticeCodes = [
  'unit-undeclared',
  'unit-improbable',
  'entity-ignored',
  'layer-left-out',
  'duplicate-dropped',
  'zero-length-dropped',
  'gap-joined',
  'chain-open',
  'chain-branched',
  'arc-recognised',
  'spline-approximated',
  'ellipse-approximated',
  'block-expanded',
  'block-missing',
  'outside-any-part',
  'loop-crosses',
  'lines-overlap',
  'count-corrected',
  'extrusion-mirrored',
  'not-planar',
  'origin-moved',
] as const

export const noticeSchema = z.strictObject({
  code: z.enum(noticeCodes),
  severity: z.enum(['error', 'warning', 'note']),
  message: z.string().describe('what happened and what to do about it'),
  count: z.int().min(1),
  layer: z.string().optional(),
  entity: z.string().optional(),
  /** Up to 200 places on the picture. */
  places: z.array(place).max(200),
})

export const readLoopSchema = z.strictObject({
  vertices: vertexLoopSchema,
  area: z.number().describe('mm², positive'),
  length: z.number().describe('mm'),
  bounds: boundsSchema,
  layer: z.string(),
  role: z.enum(['outer', 'hole']),
  parent: z.int().nullable().describe('index of the loop right around this one'),
})

export const readPartSchema = z.strictObject({
  outer: z.int().describe('index into loops'),
  holes: z.array(z.int()),
  area: z.number().describe('mm² less holes'),
  bounds: boundsSchema,
})

export const readingSchema = z.strictObject({
  unit: z.strictObject({
    declared: z.enum(lengthUnits).nullable(),
    used: z.enum(lengthUnits),
    suggested: z.enum(lengthUnits).nullable().describe('set when the size is improbable in the unit used'),
  }),
  bounds: boundsSchema.nullable().describe('null when nothing was read'),
  layers: z.array(z.strictObject({ name: z.string(), entities: z.int(), read: z.boolean() })),
  entities: z.array(z.strictObject({ type: z.string(), read: z.int(), ignored: z.int() })),
  loops: z.array(readLoopSchema),
  parts: z.array(readPartSchema).describe('largest first'),
  /** Chains that do not close, as polylines for the picture. */
  open: z.array(z.strictObject({ points: z.array(place), branched: z.boolean(), layer: z.string() })),
  notices: z.array(noticeSchema),
})

export type LengthUnit = (typeof lengthUnits)[number]
export type ReadingOptions = z.input<typeof readingOptionsSchema>
export type Reading = z.infer<typeof readingSchema>
export type ReadLoop = z.infer<typeof readLoopSchema>
export type ReadPart = z.infer<typeof readPartSchema>
export type Notice = z.infer<typeof noticeSchema>
export type NoticeCode = (typeof noticeCodes)[number]
