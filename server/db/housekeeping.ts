import { LessThan } from 'typeorm'
import type { Services } from '../services.ts'
import { IdempotencyKey } from './entities/idempotency-key.ts'
import { Session } from './entities/session.ts'
import { SignInAttempt } from './entities/sign-in-attempt.ts'

const HOUR = 3_600_000
const DAY = 24 * HOUR

/** Removes what has run out, now and every hour; returns how to stop. */
export function keepHouse({ dataSource, log }: Services): () => void {
  const sweep = async () => {
    const now = Date.now()
    try {
      await dataSource.manager.delete(Session, { expiresAt: LessThan(new Date(now)) })
      await dataSource.manager.delete(SignInAttempt, { windowStart: LessThan(new Date(now - DAY)) })
      await dataSource.manager.delete(IdempotencyKey, { createdAt: LessThan(new Date(now - DAY)) })
    } catch (error) {
      log.warn({ err: error }, 'housekeeping failed; it is tried again in an hour')
    }
  }
  void sweep()
  const timer = setInterval(() => void sweep(), HOUR)
  timer.unref()
  return () => clearInterval(timer)
}
