import * as z from 'zod'
import { findingSchema } from '../findings/schema.ts'
import { vertexLoopsSchema } from '../geometry/schema.ts'
import { headMotionSchema } from '../head/schema.ts'
import { cornerMoveNames, evaluatedPassSchema, passChoicesSchema } from '../passes/schema.ts'
import { datumSchema, wallSchema } from '../walls/schema.ts'
import { pieceWayOutSchema } from '../way-out/schema.ts'

/** The front door's request and answer: mm, degrees from vertical, positive outward. */

export const jetSchema = z.strictObject({
  kerf: z.number().positive().max(10).describe('width at the top face, mm'),
  taper: z.number().min(-10).max(10).describe('degrees per side; positive when the kerf narrows downward'),
  standoff: z.number().positive().max(100).describe('nozzle tip to plate along the axis, mm'),
  nozzleDiameter: z.number().positive().max(100).describe('outside, mm'),
})

export const headLimitsSchema = z.strictObject({
  mechanicalLimit: z.number().gt(0).max(90).describe('degrees from vertical, never passed'),
  workingLimit: z.number().gt(0).max(90).nullable().optional().describe('degrees, approved by an engineer'),
  motion: headMotionSchema.optional().describe('axes, travel and speeds; left out, they are not looked at'),
})

export const evaluationRequestSchema = z.strictObject({
  plate: z.strictObject({ thickness: z.number().positive().max(1_000).describe('mm') }),
  loops: vertexLoopsSchema,
  datum: datumSchema.default('top'),
  walls: z.array(wallSchema).max(50_000).describe('unnamed edges are square'),
  jet: jetSchema.partial().optional(),
  head: headLimitsSchema.optional(),
  passes: passChoicesSchema.optional().describe('what a person has settled about the way of the jet'),
})

const vertexOut = z.strictObject({ x: z.number(), y: z.number(), bulge: z.number().optional() })
const edgeRef = z.strictObject({ loop: z.int(), edge: z.int() })

export const evaluatedEdgeSchema = z.strictObject({
  loop: z.int(),
  edge: z.int(),
  topLength: z.number().nullable().describe('mm at depth 0; null where the contour is not sound there'),
  bottomLength: z.number().nullable().describe('mm at the bottom; null below the first event'),
  bottomOffset: z.number().describe('mm that the bottom edge stands outside the top edge'),
  jetTilts: z.array(z.number()).describe('degrees commanded per facet, taper tilted away'),
  wholeTilt: z.number().describe('largest whole jet tilt along the edge, degrees'),
  metalPath: z.number().describe('longest jet path through the plate, mm'),
})

export const evaluatedCornerSchema = z.strictObject({
  loop: z.int(),
  vertex: z.int(),
  kind: z.enum(['convex', 'concave', 'smooth']),
  interiorAngle: z.number().describe('degrees'),
  seamTilt: z
    .number()
    .nullable()
    .describe('largest angle of the seam from vertical, degrees; null at a step'),
  jetTilt: z.number().nullable().describe('the same for the jet, taper tilted away'),
  move: z
    .enum(cornerMoveNames)
    .nullable()
    .describe('how the freeing pass goes round it; null where there are no passes'),
  offers: z.array(z.enum(cornerMoveNames)).describe('the ways round that work there'),
})

export const evaluatedContourSchema = z.strictObject({
  depth: z.number(),
  loops: z.array(z.array(vertexOut)),
})

export const firstEventSchema = z.strictObject({
  kind: z.enum(['vanish', 'split', 'break-through']),
  depth: z.number(),
  loop: z.int(),
  edge: z.int(),
  at: z.strictObject({ x: z.number(), y: z.number() }),
  other: edgeRef.nullable(),
})

export const evaluationSchema = z.strictObject({
  edges: z.array(evaluatedEdgeSchema),
  corners: z.array(evaluatedCornerSchema),
  contours: z
    .array(evaluatedContourSchema)
    .describe('at 0, at every facet end and at the bottom; none below the first event'),
  firstEvent: firstEventSchema.nullable(),
  volume: z.number().nullable().describe('mm³; null when an event lies above the bottom'),
  neededTilt: z
    .strictObject({
      tilt: z.number(),
      at: z.union([
        z.strictObject({ loop: z.int(), edge: z.int() }),
        z.strictObject({ loop: z.int(), vertex: z.int() }),
      ]),
    })
    .nullable()
    .describe('the largest jet tilt anywhere, and where'),
  passes: z
    .array(evaluatedPassSchema)
    .nullable()
    .describe('in the order of cutting; null without a kerf or where the walls are not sound'),
  wayOut: z
    .array(pieceWayOutSchema)
    .nullable()
    .describe('the part, then each slug; null where the walls are not sound'),
  findings: z.array(findingSchema),
})

export type JetSpec = z.infer<typeof jetSchema>
export type HeadLimits = z.infer<typeof headLimitsSchema>
/** What a caller may write (datum may be left out). */
export type EvaluationRequest = z.input<typeof evaluationRequestSchema>
export type Evaluation = z.infer<typeof evaluationSchema>
export type EvaluatedEdge = z.infer<typeof evaluatedEdgeSchema>
export type EvaluatedCorner = z.infer<typeof evaluatedCornerSchema>
export type EvaluatedContour = z.infer<typeof evaluatedContourSchema>
export type FirstEvent = z.infer<typeof firstEventSchema>
