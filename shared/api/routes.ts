import * as z from 'zod'
import { evaluationRequestSchema, evaluationSchema } from '../evaluate/schema.ts'
import { idParams } from './common.ts'
import * as heads from './heads.ts'
import * as parts from './parts.ts'
import * as people from './people.ts'
import * as record from './record.ts'
import * as setups from './setups.ts'

/**
 * Every route, once: the server mounts handlers by these names, the pages call them by these names, and the
 * OpenAPI file is made from them. Who may call a route stands in `policy.ts`.
 */
export interface Route {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete'
  readonly path: string
  readonly summary: string
  readonly params?: z.ZodType
  readonly query?: z.ZodType
  readonly body?: z.ZodType
  /** A multipart upload with one file in this field instead of a JSON body. */
  readonly upload?: string
  /** The write needs `If-Match` with the row's version: 428 without, 412 when stale. */
  readonly ifMatch?: true
  readonly status: 200 | 201 | 204
  /** JSON answer, or the media type of a download. */
  readonly answer?: z.ZodType | string
}

export const aboutSchema = z.strictObject({
  name: z.string(),
  demo: z.boolean().describe('demo accounts exist'),
  demoAccounts: z.array(z.strictObject({ email: z.string(), role: z.string() })),
})

const openApiDocument = z.record(z.string(), z.unknown())

export const routes = {
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

  signIn: {
    method: 'post',
    path: '/api/session',
    summary: 'Sign in',
    body: people.signInBody,
    status: 200,
    answer: people.sessionSchema,
  },
  whoAmI: {
    method: 'get',
    path: '/api/session',
    summary: 'Who is signed in',
    status: 200,
    answer: people.sessionSchema,
  },
  signOut: { method: 'delete', path: '/api/session', summary: 'Sign out', status: 204 },
  ownSessions: {
    method: 'get',
    path: '/api/sessions',
    summary: 'Own sessions',
    status: 200,
    answer: people.ownSessionsSchema,
  },
  endSession: {
    method: 'delete',
    path: '/api/sessions/:id',
    summary: 'End one of the own sessions',
    params: people.sessionIdParams,
    status: 204,
  },
  changePassword: {
    method: 'post',
    path: '/api/session/password',
    summary: 'Change the own password',
    body: people.changePasswordBody,
    status: 204,
  },

  listUsers: {
    method: 'get',
    path: '/api/users',
    summary: 'People',
    query: people.usersQuery,
    status: 200,
    answer: people.usersPage,
  },
  createUser: {
    method: 'post',
    path: '/api/users',
    summary: 'Add a person',
    body: people.createUserBody,
    status: 201,
    answer: people.userSchema,
  },
  updateUser: {
    method: 'patch',
    path: '/api/users/:id',
    summary: 'Change a person',
    params: idParams,
    body: people.updateUserBody,
    ifMatch: true,
    status: 200,
    answer: people.userSchema,
  },

  listHeads: {
    method: 'get',
    path: '/api/heads',
    summary: 'Heads',
    query: heads.headsQuery,
    status: 200,
    answer: heads.headsPage,
  },
  getHead: {
    method: 'get',
    path: '/api/heads/:id',
    summary: 'A head',
    params: idParams,
    status: 200,
    answer: heads.headSchema,
  },
  createHead: {
    method: 'post',
    path: '/api/heads',
    summary: 'Add a head',
    body: heads.createHeadBody,
    status: 201,
    answer: heads.headSchema,
  },
  updateHead: {
    method: 'patch',
    path: '/api/heads/:id',
    summary: 'Change a head',
    params: idParams,
    body: heads.updateHeadBody,
    ifMatch: true,
    status: 200,
    answer: heads.headSchema,
  },
  setWorkingLimit: {
    method: 'put',
    path: '/api/heads/:id/working-limit',
    summary: "Approve a head's working limit",
    params: idParams,
    body: heads.workingLimitBody,
    ifMatch: true,
    status: 200,
    answer: heads.headSchema,
  },

  uploadDrawing: {
    method: 'post',
    path: '/api/drawings',
    summary: 'Upload a DXF and read it',
    upload: 'file',
    status: 201,
    answer: parts.drawingReadSchema,
  },
  readDrawing: {
    method: 'post',
    path: '/api/drawings/:id/reading',
    summary: 'Read a stored drawing again with other options',
    params: idParams,
    body: parts.readDrawingBody,
    status: 200,
    answer: parts.drawingReadSchema,
  },
  drawingFile: {
    method: 'get',
    path: '/api/drawings/:id/file',
    summary: 'The drawing as uploaded',
    params: idParams,
    status: 200,
    answer: 'application/dxf',
  },

  listParts: {
    method: 'get',
    path: '/api/parts',
    summary: 'Parts',
    query: parts.partsQuery,
    status: 200,
    answer: parts.partsPage,
  },
  createPart: {
    method: 'post',
    path: '/api/parts',
    summary: 'Make a part of a drawing',
    body: parts.createPartBody,
    status: 201,
    answer: parts.partSchema,
  },
  getPart: {
    method: 'get',
    path: '/api/parts/:id',
    summary: 'A part',
    params: idParams,
    status: 200,
    answer: parts.partSchema,
  },
  updatePart: {
    method: 'patch',
    path: '/api/parts/:id',
    summary: 'Rename a part',
    params: idParams,
    body: parts.updatePartBody,
    ifMatch: true,
    status: 200,
    answer: parts.partSchema,
  },

  listSetups: {
    method: 'get',
    path: '/api/setups',
    summary: 'Set-ups',
    query: setups.setupsQuery,
    status: 200,
    answer: setups.setupsPage,
  },
  createSetup: {
    method: 'post',
    path: '/api/setups',
    summary: 'Start a set-up',
    body: setups.createSetupBody,
    status: 201,
    answer: setups.setupSchema,
  },
  getSetup: {
    method: 'get',
    path: '/api/setups/:id',
    summary: 'A set-up with its newest revision',
    params: idParams,
    status: 200,
    answer: setups.setupSchema,
  },
  saveSetup: {
    method: 'put',
    path: '/api/setups/:id',
    summary: 'Save a new revision',
    params: idParams,
    body: setups.saveSetupBody,
    ifMatch: true,
    status: 200,
    answer: setups.setupSchema,
  },
  submitSetup: {
    method: 'post',
    path: '/api/setups/:id/submit',
    summary: 'Ask for approval',
    params: idParams,
    body: setups.submitBody,
    ifMatch: true,
    status: 200,
    answer: setups.setupSchema,
  },
  approveSetup: {
    method: 'post',
    path: '/api/setups/:id/approve',
    summary: 'Approve what was submitted',
    params: idParams,
    body: setups.approveBody,
    ifMatch: true,
    status: 200,
    answer: setups.setupSchema,
  },
  returnSetup: {
    method: 'post',
    path: '/api/setups/:id/return',
    summary: 'Send back with a reason',
    params: idParams,
    body: setups.returnBody,
    ifMatch: true,
    status: 200,
    answer: setups.setupSchema,
  },
  listRevisions: {
    method: 'get',
    path: '/api/setups/:id/revisions',
    summary: 'Every revision',
    params: idParams,
    status: 200,
    answer: setups.revisionsPage,
  },
  getRevision: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision',
    summary: 'One revision',
    params: setups.revisionParams,
    status: 200,
    answer: setups.revisionSchema,
  },
  revisionContent: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/content',
    summary: 'The bytes that were hashed',
    params: setups.revisionParams,
    status: 200,
    answer: 'application/json',
  },
  revisionEvaluation: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/evaluation',
    summary: "The server's own evaluation",
    params: setups.revisionParams,
    status: 200,
    answer: setups.revisionEvaluationSchema,
  },
  revisionContours: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/contours.dxf',
    summary: 'Contours at every level on named layers',
    params: setups.revisionParams,
    status: 200,
    answer: 'application/dxf',
  },
  revisionEdges: {
    method: 'get',
    path: '/api/setups/:id/revisions/:revision/edges.csv',
    summary: 'The edges as a table',
    params: setups.revisionParams,
    status: 200,
    answer: 'text/csv',
  },

  evaluate: {
    method: 'post',
    path: '/api/evaluations',
    summary: 'Evaluate a bevelled plate; nothing is stored',
    body: evaluationRequestSchema,
    status: 200,
    answer: evaluationSchema,
  },

  listAudit: {
    method: 'get',
    path: '/api/audit',
    summary: 'The record',
    query: record.auditQuery,
    status: 200,
    answer: record.auditPage,
  },
} as const satisfies Record<string, Route>

export type RouteName = keyof typeof routes
