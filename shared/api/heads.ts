import * as z from 'zod'
import { jetSchema } from '../evaluate/schema.ts'
import { idParams, instant, pageOf, pageQuery, personSchema, version } from './common.ts'
import type { Route } from './route.ts'

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

/** Heads and their limits. */
export const headRoutes = {
  listHeads: {
    method: 'get',
    path: '/api/heads',
    summary: 'Heads',
    query: headsQuery,
    status: 200,
    answer: headsPage,
  },
  getHead: {
    method: 'get',
    path: '/api/heads/:id',
    summary: 'A head',
    params: idParams,
    status: 200,
    answer: headSchema,
  },
  createHead: {
    method: 'post',
    path: '/api/heads',
    summary: 'Add a head',
    body: createHeadBody,
    status: 201,
    answer: headSchema,
  },
  updateHead: {
    method: 'patch',
    path: '/api/heads/:id',
    summary: 'Change a head',
    params: idParams,
    body: updateHeadBody,
    ifMatch: true,
    status: 200,
    answer: headSchema,
  },
  setWorkingLimit: {
    method: 'put',
    path: '/api/heads/:id/working-limit',
    summary: "Approve a head's working limit",
    params: idParams,
    body: workingLimitBody,
    ifMatch: true,
    status: 200,
    answer: headSchema,
  },
} as const satisfies Record<string, Route>
