import passport from 'passport'
import { Strategy } from 'passport-local'
import { User } from '../../db/entities/user.ts'
import type { SessionUser } from '../../http/request-types.ts'
import type { Services } from '../../services.ts'
import { throttled } from '../people/throttle.ts'

/** A passport of its own that knows how a person proves who they are, and what of them a session carries. */
export function passwordSignIn(services: Services): passport.Authenticator {
  const authenticator = new passport.Passport()
  authenticator.use(
    new Strategy(
      { usernameField: 'email', passwordField: 'password', passReqToCallback: true },
      (req, email, password, done) => {
        const throttles = [
          { kind: 'account', value: email },
          { kind: 'address', value: req.ip ?? '' },
        ] as const
        throttled(services.dataSource, throttles, () => checkPassword(services, email, password)).then(
          (user) =>
            done(null, user ? { ...sessionUser(user), userAgent: req.get('user-agent') ?? '' } : false),
          done,
        )
      },
    ),
  )
  authenticator.serializeUser((user, done) => done(null, user))
  // The session store has just read this from the users table.
  authenticator.deserializeUser((user: SessionUser, done) => done(null, user))
  return authenticator
}

/** The same answer, after the same work, for someone unknown, a wrong password and a disabled account. */
async function checkPassword(services: Services, email: string, password: string): Promise<User | null> {
  const { dataSource, passwords } = services
  const users = dataSource.getRepository(User)
  const user = await users.findOneBy({ email: email.trim().toLowerCase() })
  if (!user) {
    await passwords.pretend(password)
    return null
  }
  const right = await passwords.matches(user.passwordHash, password)
  if (!right || user.disabled) return null
  if (passwords.isOutdated(user.passwordHash)) {
    await users.update({ id: user.id, epoch: user.epoch }, { passwordHash: await passwords.hash(password) })
  }
  return user
}

function sessionUser({ id, email, name, role, epoch }: User): Omit<SessionUser, 'userAgent'> {
  return { id, email, name, role, epoch }
}
