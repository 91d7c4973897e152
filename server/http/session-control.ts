import type { Request, Response } from 'express'
import type passport from 'passport'
import type { CurrentUser } from '../../shared/api/people.ts'
import type { SessionControl } from './call.ts'
import type { SessionUser } from './request-types.ts'
import { sessionHandle } from './session-store.ts'

export const SESSION_COOKIE = 'undercant'

/** Signing in and out on the request's own session; a new id at every sign-in. */
export function sessionControl(
  authenticator: passport.Authenticator,
  req: Request,
  res: Response,
): SessionControl {
  return {
    get handle() {
      return req.user ? sessionHandle(req.sessionID) : null
    },
    signIn: async () => {
      const user = await checkSignIn(authenticator, req, res)
      if (!user) return null
      await new Promise<void>((resolve, reject) => {
        req.logIn(user, (error: unknown) => (error ? reject(error as Error) : resolve()))
      })
      return { id: user.id, email: user.email, name: user.name, role: user.role } satisfies CurrentUser
    },
    signOut: async () => {
      await new Promise<void>((resolve, reject) => {
        req.session.destroy((error: unknown) => (error ? reject(error as Error) : resolve()))
      })
      res.clearCookie(SESSION_COOKIE, { path: '/', httpOnly: true, sameSite: 'lax' })
    },
  }
}

/** Asks passport's local strategy; it reads email and password from the validated body. */
function checkSignIn(
  authenticator: passport.Authenticator,
  req: Request,
  res: Response,
): Promise<SessionUser | null> {
  return new Promise((resolve, reject) => {
    const decide = (error: unknown, user: SessionUser | false | null | undefined) => {
      if (error) reject(error as Error)
      else resolve(user || null)
    }
    const authenticate = authenticator.authenticate('local', decide) as (
      req: Request,
      res: Response,
      next: (error?: unknown) => void,
    ) => void
    authenticate(req, res, (error) => reject(error as Error))
  })
}
