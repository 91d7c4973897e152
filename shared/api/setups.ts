import * as z from 'zod'
import { evaluationSchema } from '../evaluate/schema.ts'
import { setupContentSchema } from '../setup/schema.ts'
import { idParams, instant, pageOf, pageQuery, personSchema, version } from './common.ts'
import type { Route } from './route.ts'

/**
 * A set-up belongs to a part; each save writes an immutable revision. The state is that of the newest
 * revision: draft → submitted → approved or returned; a save after that starts a new draft revision.
 */
export const setupStates = ['draft', 'submitted', 'approved', 'returned'] as const
export const setupStateSchema = z.enum(setupStates)

export const decisionSchema = z.strictObject({
  kind: z.enum(['submitted', 'approved', 'returned', 'withdrawn']),
  by: personSchema,
  at: instant,
  reason: z.string().describe('why it was returned; a remark otherwise'),
  hash: z.string().describe('SHA-256 of the content decided on, hex'),
})

export const revisionRowSchema = z.strictObject({
  number: z.int().min(1),
  state: z.enum([...setupStates, 'superseded']),
  hash: z.string().describe('SHA-256 of the content as stored, hex'),
  savedBy: personSchema,
  savedAt: instant,
  decisions: z.array(decisionSchema),
})

export const revisionSchema = revisionRowSchema.extend({ content: setupContentSchema })

export const setupSchema = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  partId: z.uuid(),
  state: setupStateSchema,
  revision: revisionSchema.describe('the newest'),
  approvedRevision: z.int().nullable().describe('number of the newest approved revision'),
  version,
})

export const setupRowSchema = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  partId: z.uuid(),
  partNumber: z.string(),
  partName: z.string(),
  state: setupStateSchema,
  revision: z.int(),
  approvedRevision: z.int().nullable(),
  thickness: z.number(),
  material: z.string(),
  headName: z.string(),
  savedBy: personSchema,
  savedAt: instant,
  submittedBy: personSchema.nullable(),
  submittedAt: instant.nullable(),
  version,
})

export const setupsQuery = z.strictObject({
  ...pageQuery,
  partId: z.uuid().optional(),
  state: setupStateSchema.optional(),
  sort: z.enum(['savedAt', '-savedAt', 'name', '-name']).optional(),
})
export const setupsPage = pageOf(setupRowSchema)

const name = z.string().trim().min(1).max(120)

/** The server fills the content in from the part and the head: square walls, datum top. */
export const createSetupBody = z.strictObject({
  partId: z.uuid(),
  headId: z.uuid(),
  name,
  plate: z.strictObject({
    material: z.string().trim().min(1).max(120),
    thickness: z.number().positive().max(1_000),
  }),
})

/**
 * What a person may change. Part, profile and the head's limits are the server's to write: it copies them
 * from their own records on every save.
 */
export const saveSetupBody = z.strictObject({
  name,
  headId: z.uuid(),
  plate: setupContentSchema.shape.plate,
  jet: setupContentSchema.shape.jet,
  datum: setupContentSchema.shape.datum,
  walls: setupContentSchema.shape.walls,
  joints: setupContentSchema.shape.joints,
  note: setupContentSchema.shape.note,
})

export const submitBody = z.strictObject({ hash: z.string(), remark: z.string().max(1_000).optional() })
export const approveBody = z.strictObject({
  hash: z.string().describe('of the content that the engineer saw; 409 when it is another'),
  password: z.string().min(1).max(256),
  remark: z.string().max(1_000).optional(),
})
export const returnBody = z.strictObject({ hash: z.string(), reason: z.string().trim().min(1).max(1_000) })

export const revisionParams = z.strictObject({
  id: z.uuid(),
  revision: z
    .string()
    .regex(/^[1-9]\d{0,5}$/)
    .transform(Number),
})
export const revisionsPage = z.strictObject({ items: z.array(revisionRowSchema) })
export const revisionEvaluationSchema = z.strictObject({ hash: z.string(), evaluation: evaluationSchema })

export type SetupState = z.infer<typeof setupStateSchema>
export type Setup = z.infer<typeof setupSchema>
export type SetupRow = z.infer<typeof setupRowSchema>
export type Revision = z.infer<typeof revisionSchema>
export type RevisionRow = z.infer<typeof revisionRowSchema>
export type SaveSetup = z.infer<typeof saveSetupBody>
export type Decision = z.infer<typeof decisionSchema>

/** Set-ups, revisions, decisions, downloads. */
export const setupRoutes = {
  listSetups: {
    method: 'get',
    path: '/api/setups',
    summary: 'Set-ups',
    query: setupsQuery,
    status: 200,
    answer: setupsPage,
  },
  createSetup: {
    method: 'post',
    path: '/api/setups',
    summary: 'Start a set-up',
    body: createSetupBody,
    status: 201,
    answer: setupSchema,
  },
  getSetup: {
    method: 'get',
    path: '/api/setups/:id',
    summary: 'A set-up with its newest revision',
    params: idParams,
    status: 200,
    answer: setupSchema,
  },
  saveSetup: {
    method: 'put',
    path: '/api/setups/:id',
    summary: 'Save a new revision',
    params: idParams,
    body: saveSetupBody,
    ifMatch: true,
    status: 200,
    answer: setupSchema,
  },
  submitSetup: {
    method: 'post',
    path: '/api/setups/:id/submit',
    summary: 'Ask for approval',
    params: idParams,
    body: submitBody,
    ifMatch: true,
    status: 200,
    answer: setupSchema,
  },
  approveSetup: {
    method: 'post',
    path: '/api/setups/:id/approve',
    summary: 'Approve what was submitted',
    params: idParams,
    body: approveBody,
    ifMatch: true,
    status: 200,
    answer: setupSchema,
  },
  returnSetup: {
    method: 'post',
    path: '/api/setups/:id/return',
    summary: 'Send back with a reason',
    params: idParams,
    body: returnBody,
    ifMatch: true,
    status: 200,
    answer: setupSchema,
  },
  listRevisions: {
    method: 'get',
    path: '/api/setups/:id/revisions',
    summary: 'Every revision',
    params: idParams,
    status: 200,
    answer: revisionsPage,
  },
  getRevision: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision',
    summary: 'One revision',
    params: revisionParams,
    status: 200,
    answer: revisionSchema,
  },
  revisionContent: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/content',
    summary: 'The bytes that were hashed',
    params: revisionParams,
    status: 200,
    answer: 'application/json',
  },
  revisionEvaluation: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/evaluation',
    summary: "The server's own evaluation",
    params: revisionParams,
    status: 200,
    answer: revisionEvaluationSchema,
  },
  revisionContours: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/contours.dxf',
    summary: 'Contours at every level on named layers',
    params: revisionParams,
    status: 200,
    answer: 'application/dxf',
  },
  revisionEdges: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/edges.csv',
    summary: 'The edges as a table',
    params: revisionParams,
    status: 200,
    answer: 'text/csv',
  },
} as const satisfies Record<string, Route>
