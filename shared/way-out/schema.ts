import * as z from 'zod'

/** The way out as answers write it: degrees. */

const wayOutSchema = z.strictObject({
  verdict: z.enum(['lifts', 'drops', 'slides', 'trapped']),
  upward: z.boolean().nullable().describe('null where it is trapped'),
  angle: z.number().nullable().describe('degrees from vertical'),
  heading: z.number().nullable().describe('degrees from X, counter-clockwise; null straight up or down'),
})

export const pieceWayOutSchema = z.strictObject({
  loop: z.int().describe('0: the part out of its sheet; otherwise the hole whose slug it is'),
  free: wayOutSchema.describe('touching no wall'),
  withinKerf: wayOutSchema.describe('with the room that the kerf leaves'),
})

export type EvaluatedWayOut = z.infer<typeof wayOutSchema>
export type EvaluatedPiece = z.infer<typeof pieceWayOutSchema>
