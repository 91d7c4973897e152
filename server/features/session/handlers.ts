import { MoreThan, Not } from 'typeorm'
import { Session } from '../../db/entities/session.ts'
import { User } from '../../db/entities/user.ts'
import type { HandlersOf } from '../../http/call.ts'
import { Refusal } from '../../http/refusal.ts'
import { SESSION_IDLE } from '../../http/session-store.ts'
import { confirmPassword } from '../people/confirm.ts'
import { refuseGuessable } from '../people/passwords.ts'
import { appendToRecord } from '../record/audit.ts'

type Names = 'signIn' | 'whoAmI' | 'signOut' | 'ownSessions' | 'endSession' | 'changePassword'

export const sessionHandlers: HandlersOf<Names> = {
  signIn: async ({ session, body, write }) => {
    const user = await session.signIn(body.email, body.password)
    if (!user) throw new Refusal('wrong-sign-in', 'Email address or password is not right.')
    await write((manager) =>
      appendToRecord(manager, user, { action: 'session.start', subject: subjectOf(user) }),
    )
    return { user }
  },

  whoAmI: ({ user }) => Promise.resolve({ user }),

  signOut: async ({ session, user, write }) => {
    await session.signOut()
    await write((manager) =>
      appendToRecord(manager, user, { action: 'session.end', subject: subjectOf(user) }),
    )
  },

  ownSessions: async ({ services, user, session }) => {
    const now = Date.now()
    const rows = await services.dataSource.getRepository(Session).find({
      where: {
        userId: user.id,
        expiresAt: MoreThan(new Date(now)),
        seenAt: MoreThan(new Date(now - SESSION_IDLE)),
      },
      order: { createdAt: 'DESC' },
      take: 100,
    })
    return {
      items: rows.map(({ id, userAgent, createdAt, expiresAt }) => ({
        id,
        current: id === session.handle,
        userAgent,
        createdAt: createdAt.toISOString(),
        expiresAt: expiresAt.toISOString(),
      })),
    }
  },

  endSession: async ({ user, params, write }) => {
    await write(async (manager) => {
      const { affected } = await manager.delete(Session, { id: params.id, userId: user.id })
      if (affected !== 1) throw new Refusal('not-found', 'This session has ended already.')
      const details = { other: true }
      await appendToRecord(manager, user, { action: 'session.end', subject: subjectOf(user), details })
    })
  },

  changePassword: async ({ services, user, body, session, write }) => {
    await confirmPassword(services, user, body.current)
    refuseGuessable(body.next, user)
    const passwordHash = await services.passwords.hash(body.next)
    await write(async (manager) => {
      await manager.update(User, { id: user.id }, { passwordHash })
      await manager.delete(Session, { userId: user.id, id: Not(session.handle ?? '') })
      await appendToRecord(manager, user, { action: 'user.change-password', subject: subjectOf(user) })
    })
  },
}

function subjectOf(user: { readonly id: string; readonly email: string }) {
  return { kind: 'user', id: user.id, label: user.email }
}
