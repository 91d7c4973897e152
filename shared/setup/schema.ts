import * as z from 'zod'
import { datumSchema, wallSchema } from '../walls/schema.ts'
import { jetSchema, type EvaluationRequest } from '../evaluate/schema.ts'
import { vertexLoopsSchema } from '../geometry/schema.ts'

/**
 * The content of a set-up: everything an approval covers, in one self-contained value. Profile, plate, head
 * limits and joints are copied in, so that a later change elsewhere cannot change what was approved.
 */

const shortText = z.string().trim().max(120)

export const plateSchema = z.strictObject({
  material: shortText.describe('as the shop names it'),
  thickness: z.number().positive().max(1_000).describe('mm'),
})

/** The head as it stood when the revision was written; limits in degrees. */
export const headSnapshotSchema = z.strictObject({
  id: z.uuid(),
  name: shortText,
  mechanicalLimit: z.number().gt(0).max(90),
  workingLimit: z.number().gt(0).max(90).nullable(),
})

const band = z.strictObject({ plus: z.number().min(0).max(100), minus: z.number().min(0).max(100) })

/** How an edge's joint should fit; what the welder sees. mm and degrees. */
export const jointSchema = z.strictObject({
  loop: z.int().min(0).max(2_000),
  edge: z.int().min(0).max(20_000),
  label: shortText.describe('the joint number on the drawing'),
  rootOpening: z.number().min(0).max(100).describe('gap, mm'),
  mate: z.enum(['same', 'square']).describe('the other plate: the same prep mirrored, or a square edge'),
  tolerance: z
    .strictObject({ angle: band, rootOpening: band, rootFace: band })
    .optional()
    .describe('degrees and mm, from the welding procedure'),
})

export const setupContentSchema = z.strictObject({
  format: z.literal(1),
  part: z.strictObject({
    id: z.uuid(),
    number: shortText,
    name: shortText,
    drawingSha256: z.string().regex(/^[0-9a-f]{64}$/),
  }),
  plate: plateSchema,
  head: headSnapshotSchema,
  jet: jetSchema,
  datum: datumSchema,
  loops: vertexLoopsSchema,
  walls: z.array(wallSchema).max(50_000),
  joints: z.array(jointSchema).max(5_000),
  note: z.string().max(4_000),
})

export type SetupContent = z.infer<typeof setupContentSchema>
export type JointSpec = z.infer<typeof jointSchema>
export type HeadSnapshot = z.infer<typeof headSnapshotSchema>

/** The evaluation that a set-up asks for. */
export function evaluationRequestOf(content: SetupContent): EvaluationRequest {
  return {
    plate: { thickness: content.plate.thickness },
    loops: content.loops,
    datum: content.datum,
    walls: content.walls,
    jet: content.jet,
    head: { mechanicalLimit: content.head.mechanicalLimit, workingLimit: content.head.workingLimit },
  }
}
