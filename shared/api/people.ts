import * as z from 'zod'
import { instant, pageOf, pageQuery, roleSchema, version } from './common.ts'

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
