import * as z from 'zod'
import { drawingErrorCodes } from '../drawing/errors.ts'

/** The one error shape and its closed list of codes. */
export const errorCodes = [
  'invalid-request',
  'not-json',
  'too-large',
  'not-signed-in',
  'wrong-sign-in',
  'too-many-attempts',
  'too-many-requests',
  'forbidden',
  'cross-site',
  'not-found',
  'method-not-allowed',
  'version-missing',
  'version-stale',
  'wrong-state',
  'own-submission',
  'hash-mismatch',
  'wrong-password',
  'has-stop-findings',
  'name-taken',
  'unusable-geometry',
  'disk-full',
  'database-away',
  'internal',
  ...drawingErrorCodes,
] as const

export type ErrorCode = (typeof errorCodes)[number]

export const errorSchema = z.strictObject({
  error: z.strictObject({
    code: z.enum(errorCodes),
    message: z.string().describe('what went wrong and what to do'),
    requestId: z.string(),
    details: z.unknown().optional(),
  }),
})

export type ErrorBody = z.infer<typeof errorSchema>
