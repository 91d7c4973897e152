import * as z from 'zod'
import { idParams, instant, version } from './common.ts'
import type { Route } from './route.ts'
import { saveSetupBody } from './setups.ts'

/**
 * What a person has on the bench and has not saved. One for each person and set-up, seen by nobody else, in no
 * record: a draft decides nothing.
 */
export const keepDraftBody = z.strictObject({
  revision: z.int().min(1).describe('the revision that it was begun on'),
  version: version.describe('of the set-up that it was begun on: what a save must name'),
  content: saveSetupBody,
})
export const draftSchema = keepDraftBody.extend({ keptAt: instant })
export const ownDraftSchema = z.strictObject({ draft: draftSchema.nullable() })
export const keptDraftSchema = z.strictObject({ keptAt: instant })

export type ServerDraft = z.infer<typeof draftSchema>

export const draftRoutes = {
  getDraft: {
    method: 'get',
    path: '/api/setups/:id/draft',
    summary: 'One’s own unsaved changes',
    params: idParams,
    status: 200,
    answer: ownDraftSchema,
  },
  keepDraft: {
    method: 'put',
    path: '/api/setups/:id/draft',
    summary: 'Keep one’s own unsaved changes',
    params: idParams,
    body: keepDraftBody,
    status: 200,
    answer: keptDraftSchema,
  },
  dropDraft: {
    method: 'delete',
    path: '/api/setups/:id/draft',
    summary: 'Forget one’s own unsaved changes',
    params: idParams,
    status: 204,
  },
} as const satisfies Record<string, Route>
