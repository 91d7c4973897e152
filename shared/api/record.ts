import * as z from 'zod'
import { instant, pageOf, pageQuery, personSchema } from './common.ts'
import type { Route } from './route.ts'

/** The audit record: append-only, each entry bound to the one before by its hash. */
export const auditEntrySchema = z.strictObject({
  id: z.int(),
  at: instant,
  actor: personSchema.nullable().describe('null for the system'),
  action: z.string().describe('for example setup.approve'),
  subject: z.strictObject({ kind: z.string(), id: z.string(), label: z.string() }),
  details: z.record(z.string(), z.unknown()),
  previousHash: z.string(),
  hash: z.string(),
})
export const auditQuery = z.strictObject({
  ...pageQuery,
  subjectId: z.string().max(64).optional(),
  action: z.string().max(60).optional(),
})
export const auditPage = pageOf(auditEntrySchema)

export type AuditEntry = z.infer<typeof auditEntrySchema>

/** The record. */
export const recordRoutes = {
  listAudit: {
    method: 'get',
    path: '/api/audit',
    summary: 'The record',
    query: auditQuery,
    status: 200,
    answer: auditPage,
  },
} as const satisfies Record<string, Route>
