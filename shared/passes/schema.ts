import * as z from 'zod'
import { passReasons } from './types.ts'

/** Passes as requests and answers write them: mm, degrees. */

export const cornerMoveNames = ['none', 'lean', 'run-out', 'pivot', 'step'] as const
export type CornerMoveName = (typeof cornerMoveNames)[number]

/** What a person has settled about the passes; what is left out is chosen here. */
export const passChoicesSchema = z.strictObject({
  corners: z
    .array(
      z.strictObject({
        loop: z.int().min(0).max(2_000),
        vertex: z.int().min(0).max(20_000),
        move: z.enum(['lean', 'run-out', 'pivot']),
      }),
    )
    .max(50_000)
    .optional()
    .describe('ways round corners'),
  leadIn: z.number().gt(0).max(200).optional().describe('wished length of the leads in, mm'),
  leadOut: z.number().gt(0).max(200).optional().describe('wished length of the leads out, mm'),
  overlap: z
    .number()
    .min(0)
    .max(100)
    .optional()
    .describe('mm that a pass runs past its start, where it closes in the middle of an edge'),
})

export const evaluatedPassSchema = z.strictObject({
  loop: z.int(),
  level: z.int().describe('0 follows the root facets; negative: facets above them, positive: below'),
  closed: z.boolean().describe('goes all the way round its loop'),
  reasons: z.array(z.enum(passReasons)).describe('why it stands where it stands in the order'),
  pierce: z.strictObject({ x: z.number(), y: z.number() }).describe('on the top face'),
  length: z.number().describe('mm, of the axis on the top face, leads and all'),
  largestTilt: z.number().describe('degrees, of the jet anywhere in it'),
})

export type PassChoicesSpec = z.infer<typeof passChoicesSchema>
export type EvaluatedPass = z.infer<typeof evaluatedPassSchema>
