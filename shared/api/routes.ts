import * as z from 'zod'
import { evaluationRequestSchema, evaluationSchema } from '../evaluate/schema.ts'
import { draftRoutes } from './drafts.ts'
import { headRoutes } from './heads.ts'
import { partRoutes } from './parts.ts'
import { peopleRoutes } from './people.ts'
import { recordRoutes } from './record.ts'
import type { Route } from './route.ts'
import { setupRoutes } from './setups.ts'

export const aboutSchema = z.strictObject({
  name: z.string(),
  demo: z.boolean().describe('demo accounts exist'),
  demoAccounts: z.array(z.strictObject({ email: z.string(), role: z.string() })),
})

const openApiDocument = z.record(z.string(), z.unknown())

const systemRoutes = {
  about: {
    method: 'get',
    path: '/api/about',
    summary: 'What this installation is',
    status: 200,
    answer: aboutSchema,
  },
  openapi: {
    method: 'get',
    path: '/api/openapi.json',
    summary: 'This description',
    status: 200,
    answer: openApiDocument,
  },
  evaluate: {
    method: 'post',
    path: '/api/evaluations',
    summary: 'Evaluate a bevelled plate; nothing is stored',
    body: evaluationRequestSchema,
    status: 200,
    answer: evaluationSchema,
  },
} as const satisfies Record<string, Route>

/**
 * Every route, once: the server mounts handlers by these names, the pages call them by these names, and the
 * OpenAPI file is made from them. Each resource's routes stand beside its schemas.
 */
export const routes = {
  ...systemRoutes,
  ...peopleRoutes,
  ...headRoutes,
  ...partRoutes,
  ...setupRoutes,
  ...draftRoutes,
  ...recordRoutes,
} as const satisfies Record<string, Route>

export type RouteName = keyof typeof routes
