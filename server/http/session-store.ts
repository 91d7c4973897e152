import { createHash } from 'node:crypto'
import session from 'express-session'
import type { DataSource } from 'typeorm'
import { Session } from '../db/entities/session.ts'
import { User } from '../db/entities/user.ts'
import { isDatabaseAway } from '../db/failures.ts'
import { within } from './deadline.ts'
import { databaseAway } from './refusal.ts'
import type { SessionUser } from './request-types.ts'

const MINUTE = 60_000
const HOUR = 60 * MINUTE

/** Signed out after so long without a request, and so long after sign-in whatever happens. */
export const SESSION_IDLE = 2 * HOUR
export const SESSION_LIFE = 12 * HOUR
/** The mark "seen" is moved at most so often: ordinary requests write nothing. */
const SEEN_STEP = 5 * MINUTE
/** A database that hangs is reported within five seconds. */
const READ_DEADLINE = 4_500

type Done = (error?: unknown) => void

/** The table's key for a session's id; a person sees it as the handle of the session. */
export function sessionHandle(sid: string): string {
  return createHash('sha256').update(sid).digest('hex')
}

/**
 * Sessions in MariaDB. A row says who and since when; the person's role and epoch are read with it each time,
 * so that disabling someone or changing a role acts on the next request.
 */
export class SessionStore extends session.Store {
  readonly #dataSource: DataSource

  constructor(dataSource: DataSource) {
    super()
    this.#dataSource = dataSource
  }

  override get(sid: string, done: (error: unknown, data?: session.SessionData | null) => void): void {
    within(READ_DEADLINE, this.#read(sid), databaseAway).then(
      (data) => done(null, data),
      // express-session takes ENOENT (a socket that is gone) for "no session"; it means no database.
      (error: unknown) => done(isDatabaseAway(error) ? databaseAway() : error),
    )
  }

  override set(sid: string, data: session.SessionData, done: Done = () => undefined): void {
    this.#write(sid, data.passport?.user).then(() => done(), done)
  }

  override destroy(sid: string, done: Done = () => undefined): void {
    this.#dataSource
      .getRepository(Session)
      .delete({ id: sessionHandle(sid) })
      .then(() => done(), done)
  }

  override touch(sid: string, data: session.SessionData, done: Done = () => undefined): void {
    const now = new Date()
    if (data.seenAt === undefined || now.getTime() - data.seenAt < SEEN_STEP) {
      done()
      return
    }
    this.#dataSource
      .getRepository(Session)
      .update({ id: sessionHandle(sid) }, { seenAt: now })
      .then(() => done(), done)
  }

  async #read(sid: string): Promise<session.SessionData | null> {
    const now = Date.now()
    const row = await this.#dataSource
      .createQueryBuilder(Session, 's')
      .innerJoin(User, 'u', 'u.id = s.user_id AND u.epoch = s.epoch AND u.disabled = 0')
      .select(['u.id AS id', 'u.email AS email', 'u.name AS name', 'u.role AS role', 'u.epoch AS epoch'])
      .addSelect(['s.user_agent AS userAgent', 's.seen_at AS seenAt', 's.expires_at AS expiresAt'])
      .where('s.id = :id', { id: sessionHandle(sid) })
      .getRawOne<SessionUser & { seenAt: Date; expiresAt: Date }>()
    if (!row) return null
    const { seenAt, expiresAt, ...user } = row
    if (now >= expiresAt.getTime() || now >= seenAt.getTime() + SESSION_IDLE) return null
    return {
      cookie: { originalMaxAge: SESSION_LIFE, expires: expiresAt },
      passport: { user },
      seenAt: seenAt.getTime(),
    }
  }

  async #write(sid: string, user: SessionUser | undefined): Promise<void> {
    if (!user) {
      await this.#dataSource.getRepository(Session).delete({ id: sessionHandle(sid) })
      return
    }
    const now = new Date()
    const row = {
      id: sessionHandle(sid),
      userId: user.id,
      epoch: user.epoch,
      userAgent: user.userAgent.slice(0, 300),
      createdAt: now,
      seenAt: now,
      expiresAt: new Date(now.getTime() + SESSION_LIFE),
    }
    await this.#dataSource.createQueryBuilder().insert().into(Session).values(row).orIgnore().execute()
  }
}
