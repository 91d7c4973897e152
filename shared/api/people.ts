import * as z from 'zod'
import { idParams, instant, pageOf, pageQuery, roleSchema, version } from './common.ts'
import type { Route } from './route.ts'

export const passwordSchema = z.string().min(8).max(256)
export const emailSchema = z.email().max(254)

export const signInBody = z.strictObject({
  email: z.string().min(1).max(254),
  password: z.string().min(1).max(256),
})

export const userSchema = z.strictObject({
  id: z.uuid(),
  email: z.string(),
  name: z.string(),
  role: roleSchema,
  disabled: z.boolean(),
  version,
  createdAt: instant,
})

export const currentUserSchema = z.strictObject({
  id: z.uuid(),
  email: z.string(),
  name: z.string(),
  role: roleSchema,
})
export const sessionSchema = z.strictObject({ user: currentUserSchema })

export const ownSessionSchema = z.strictObject({
  id: z.string().describe('a handle, not the cookie'),
  current: z.boolean(),
  userAgent: z.string(),
  createdAt: instant,
  expiresAt: instant,
})
export const ownSessionsSchema = z.strictObject({ items: z.array(ownSessionSchema) })
export const sessionIdParams = z.strictObject({ id: z.string().regex(/^[0-9a-f]{16,64}$/) })

export const changePasswordBody = z.strictObject({
  current: z.string().min(1).max(256),
  next: passwordSchema,
})

export const usersQuery = z.strictObject({ ...pageQuery, role: roleSchema.optional() })
export const usersPage = pageOf(userSchema)
export const createUserBody = z.strictObject({
  email: emailSchema,
  name: z.string().trim().min(1).max(120),
  role: roleSchema,
  password: passwordSchema,
})
export const updateUserBody = z.strictObject({
  name: z.string().trim().min(1).max(120).optional(),
  role: roleSchema.optional(),
  disabled: z.boolean().optional(),
  password: passwordSchema.optional(),
})

export type User = z.infer<typeof userSchema>
export type CurrentUser = z.infer<typeof currentUserSchema>
export type OwnSession = z.infer<typeof ownSessionSchema>

/** Sessions and people. */
export const peopleRoutes = {
  signIn: {
    method: 'post',
    path: '/api/session',
    summary: 'Sign in',
    body: signInBody,
    status: 200,
    answer: sessionSchema,
  },
  whoAmI: {
    method: 'get',
    path: '/api/session',
    summary: 'Who is signed in',
    status: 200,
    answer: sessionSchema,
  },
  signOut: { method: 'delete', path: '/api/session', summary: 'Sign out', status: 204 },
  ownSessions: {
    method: 'get',
    path: '/api/sessions',
    summary: 'Own sessions',
    status: 200,
    answer: ownSessionsSchema,
  },
  endSession: {
    method: 'delete',
    path: '/api/sessions/:id',
    summary: 'End one of the own sessions',
    params: sessionIdParams,
    status: 204,
  },
  changePassword: {
    method: 'post',
    path: '/api/session/password',
    summary: 'Change the own password',
    body: changePasswordBody,
    status: 204,
  },
  listUsers: {
    method: 'get',
    path: '/api/users',
    summary: 'People',
    query: usersQuery,
    status: 200,
    answer: usersPage,
  },
  createUser: {
    method: 'post',
    path: '/api/users',
    summary: 'Add a person',
    body: createUserBody,
    status: 201,
    answer: userSchema,
  },
  updateUser: {
    method: 'patch',
    path: '/api/users/:id',
    summary: 'Change a person',
    params: idParams,
    body: updateUserBody,
    ifMatch: true,
    status: 200,
    answer: userSchema,
  },
} as const satisfies Record<string, Route>
