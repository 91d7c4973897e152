import * as z from 'zod'

/**
 * A finding is a value: what, where, the number, the limit, what would cure it. Text is for people; code is
 * for programs and never changes its meaning.
 */

export const findingCodes = [
  // the head
  'edge-over-mechanical-limit',
  'edge-over-working-limit',
  'corner-over-mechanical-limit',
  'corner-over-working-limit',
  'nozzle-touches-plate',
  'head-touches-plate',
  'axis-out-of-travel',
  // the part
  'wall-vanishes',
  'contour-splits',
  'walls-break-through',
  'facets-cut-into-part',
  'smooth-step',
  'concave-fillet',
  'hole-smaller-than-kerf',
  'profile-crosses-itself',
  'loop-outside-part',
  // the way of the jet
  'kerf-closes',
  'corner-without-way-round',
  'corner-choice-refused',
  'no-room-to-pierce',
  'detail-finer-than-jet',
  'hole-too-small-for-tilt',
  'seam-bends',
  'loose-before-last-pass',
  'jet-cuts-wall',
  'jet-may-graze',
  'jet-clearance-unknown',
  // the way out
  'part-trapped',
  'slug-trapped',
] as const

export const findingSeverities = ['stop', 'warning', 'note'] as const

export const cureSchema = z.strictObject({
  message: z.string(),
  /** What is one click: the tilt to give to one facet of these edges. */
  set: z
    .strictObject({
      edges: z.array(z.strictObject({ loop: z.int(), edge: z.int() })),
      facet: z.int().describe('index of the facet, from the top'),
      tilt: z.number().describe('degrees from vertical, positive outward; rounded to the safe side'),
      endTilt: z
        .number()
        .optional()
        .describe("the tilt at the edge's end, where the wall is to blend; else it does not"),
      most: z.number().optional().describe('the largest tilt allowed there, unrounded'),
    })
    .optional(),
  /** The stand-off to set instead, mm. */
  standoff: z.number().optional(),
})

export const findingSchema = z.strictObject({
  code: z.enum(findingCodes),
  severity: z
    .enum(findingSeverities)
    .describe('stop: it cannot be cut or submitted so; warning: a person must decide; note: good to know'),
  loop: z.int().optional(),
  edge: z.int().optional(),
  vertex: z.int().optional(),
  value: z.number().optional().describe('degrees, or mm where the code speaks of a length'),
  limit: z.number().optional(),
  message: z.string(),
  cure: cureSchema.optional(),
})

export type FindingCode = (typeof findingCodes)[number]
export type FindingSeverity = (typeof findingSeverities)[number]
export type Cure = z.infer<typeof cureSchema>
export type Finding = z.infer<typeof findingSchema>
