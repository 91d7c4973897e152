import * as z from 'zod'
import { jetSchema } from '../evaluate/schema.ts'
import { instant, pageOf, pageQuery, personSchema, version } from './common.ts'

const name = z.string().trim().min(1).max(120)
const limit = z.number().gt(0).max(90)

export const headKinds = ['crossed-tilts', 'turning'] as const

export const headSchema = z.strictObject({
  id: z.uuid(),
  name,
  kind: z
    .enum(headKinds)
    .describe('turning: C about Z carries A; crossed-tilts: A about X carries B about Y'),
  mechanicalLimit: limit.describe('degrees, never passed'),
  workingLimit: limit.nullable().describe('degrees, approved by an engineer; null until one is set'),
  workingLimitSet: z.strictObject({ by: personSchema, at: instant, reason: z.string() }).nullable(),
  jet: jetSchema.describe('starting values for a new set-up; the shop measures its own'),
  version,
})

export const headsQuery = z.strictObject({ ...pageQuery })
export const headsPage = pageOf(headSchema)
export const createHeadBody = z.strictObject({
  name,
  kind: z.enum(headKinds),
  mechanicalLimit: limit,
  jet: jetSchema,
})
export const updateHeadBody = z.strictObject({
  name: name.optional(),
  kind: z.enum(headKinds).optional(),
  mechanicalLimit: limit.optional(),
  jet: jetSchema.optional(),
})
export const workingLimitBody = z.strictObject({
  workingLimit: limit.nullable(),
  reason: z.string().trim().min(1).max(1_000),
})

export type Head = z.infer<typeof headSchema>
