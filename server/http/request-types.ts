import type { CurrentUser } from '../../shared/api/people.ts'

/** What passport keeps of a signed-in person: always fresh from the users table, never from the cookie. */
export interface SessionUser extends CurrentUser {
  readonly epoch: number
  readonly userAgent: string
}

declare module 'express-session' {
  interface SessionData {
    passport?: { user?: SessionUser }
    /** When the row was last marked as seen, ms. */
    seenAt?: number
  }
}

declare global {
  // The names are Express's own; augmenting them is the documented way.
  // eslint-disable-next-line @typescript-eslint/no-namespace
  namespace Express {
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type
    interface User extends SessionUser {}
    interface Request {
      requestId: string
      /** Name in the table of routes, once known. */
      routeName?: string
    }
  }
}
