import { createHash } from 'node:crypto'
import type { DataSource } from 'typeorm'
import { SignInAttempt } from '../../db/entities/sign-in-attempt.ts'
import { Refusal } from '../../http/refusal.ts'

const WINDOW = 15 * 60_000

/** Failures within fifteen minutes after which an account, or an address, has to wait. */
const LIMITS = { account: 10, address: 60, confirmation: 10 } as const

export interface Throttled {
  readonly kind: keyof typeof LIMITS
  readonly value: string
}

const keyOf = ({ kind, value }: Throttled) =>
  createHash('sha256').update(`${kind}:${value.toLowerCase()}`).digest('hex')

/**
 * Runs a password check under the throttles named. The attempt is counted before the check, so that many at
 * once cannot slip through, and taken back when it succeeds. Kept in the database: a restart forgets nothing.
 */
export async function throttled<T>(
  dataSource: DataSource,
  throttles: readonly Throttled[],
  check: () => Promise<T | null>,
): Promise<T | null> {
  for (const throttle of throttles) await countAttempt(dataSource, throttle)
  const result = await check()
  if (result !== null) {
    for (const throttle of throttles) await takeBack(dataSource, throttle)
  }
  return result
}

async function countAttempt(dataSource: DataSource, throttle: Throttled): Promise<void> {
  const now = new Date()
  const oldest = new Date(now.getTime() - WINDOW)
  // One statement counts and tells, so that each of many at once learns its own place in the row. The
  // assignments run from left to right: failures looks at the window before it is moved.
  const rows: { failures: number; windowStart: Date }[] = await dataSource.query(
    `INSERT INTO sign_in_attempts (id, failures, window_start) VALUES (?, 1, ?)
     ON DUPLICATE KEY UPDATE failures = IF(window_start < ?, 1, failures + 1),
       window_start = IF(window_start < ?, VALUES(window_start), window_start)
     RETURNING failures, window_start AS windowStart`,
    [keyOf(throttle), now, oldest, oldest],
  )
  const row = rows[0]
  if (!row) throw new Error('The attempt was not counted')
  if (row.failures > LIMITS[throttle.kind]) {
    const wait = Math.max(1, Math.ceil((row.windowStart.getTime() + WINDOW - now.getTime()) / 1000))
    throw new Refusal('too-many-attempts', `Too many attempts. Wait ${Math.ceil(wait / 60)} minutes.`, {
      retryAfterSeconds: wait,
    })
  }
}

/** An account starts afresh after a right password; an address only loses the attempt that succeeded. */
async function takeBack(dataSource: DataSource, throttle: Throttled): Promise<void> {
  if (throttle.kind === 'address') {
    await dataSource.query('UPDATE sign_in_attempts SET failures = GREATEST(failures - 1, 0) WHERE id = ?', [
      keyOf(throttle),
    ])
  } else {
    await dataSource.getRepository(SignInAttempt).delete({ id: keyOf(throttle) })
  }
}
