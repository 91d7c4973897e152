import type { Role } from './common.ts'
import type { RouteName } from './routes.ts'

/** Who may call a route: anyone, anyone signed in, or the roles named. */
export type Access = 'anyone' | 'signed-in' | readonly Role[]

/** Role × route, one line each; the compiler and a test see to it that none is missing. */
export const policy: Readonly<Record<RouteName, Access>> = {
  about: 'anyone',
  openapi: 'anyone',
  signIn: 'anyone',

  whoAmI: 'signed-in',
  signOut: 'signed-in',
  ownSessions: 'signed-in',
  endSession: 'signed-in',
  changePassword: 'signed-in',

  listUsers: ['administrator'],
  createUser: ['administrator'],
  updateUser: ['administrator'],

  listHeads: 'signed-in',
  getHead: 'signed-in',
  createHead: ['administrator', 'engineer'],
  updateHead: ['administrator', 'engineer'],
  setWorkingLimit: ['engineer'],

  uploadDrawing: ['programmer', 'engineer'],
  readDrawing: ['programmer', 'engineer'],
  drawingFile: ['programmer', 'engineer', 'administrator'],

  listParts: 'signed-in',
  createPart: ['programmer', 'engineer'],
  getPart: 'signed-in',
  updatePart: ['programmer', 'engineer'],

  listSetups: 'signed-in',
  createSetup: ['programmer', 'engineer'],
  getSetup: 'signed-in',
  saveSetup: ['programmer', 'engineer'],
  submitSetup: ['programmer', 'engineer'],
  approveSetup: ['engineer'],
  returnSetup: ['engineer'],
  listRevisions: 'signed-in',
  getRevision: 'signed-in',
  revisionContent: 'signed-in',
  revisionEvaluation: 'signed-in',
  revisionContours: ['programmer', 'engineer', 'administrator'],
  revisionEdges: ['programmer', 'engineer', 'administrator'],

  getDraft: ['programmer', 'engineer'],
  keepDraft: ['programmer', 'engineer'],
  dropDraft: ['programmer', 'engineer'],

  evaluate: 'signed-in',

  listAudit: ['engineer', 'administrator'],
}

export function mayCall(role: Role | null, route: RouteName): boolean {
  const access = policy[route]
  if (access === 'anyone') return true
  if (role === null) return false
  return access === 'signed-in' || access.includes(role)
}
