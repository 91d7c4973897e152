import { QueryFailedError } from 'typeorm'

/** What went wrong in the database, by MariaDB's error numbers and mysql2's codes. */

const DUPLICATE = 1062
/** 1020 the row moved on since the snapshot, 1205 lock wait, 1213 deadlock. */
const TRANSIENT = new Set([1020, 1205, 1213])
/** 1040 too many connections, 1053 shutting down, 1927 connection killed. */
const AWAY_NUMBERS = new Set([1040, 1053, 1927])
const AWAY_CODES = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'ENOENT',
  'EPIPE',
  'ETIMEDOUT',
  'ENOTFOUND',
  'PROTOCOL_CONNECTION_LOST',
  'PROTOCOL_ENQUEUE_AFTER_FATAL_ERROR',
  'PROTOCOL_ENQUEUE_AFTER_QUIT',
])

interface Failure {
  readonly code: string | undefined
  readonly errno: number | undefined
}

function failureOf(error: unknown): Failure {
  const inner: unknown = error instanceof QueryFailedError ? error.driverError : error
  const { code, errno } = (typeof inner === 'object' && inner !== null ? inner : {}) as Record<
    string,
    unknown
  >
  return {
    code: typeof code === 'string' ? code : undefined,
    errno: typeof errno === 'number' ? errno : undefined,
  }
}

export function isDuplicate(error: unknown): boolean {
  return failureOf(error).errno === DUPLICATE
}

export function isTransient(error: unknown): boolean {
  const { errno } = failureOf(error)
  return errno !== undefined && TRANSIENT.has(errno)
}

export function isDatabaseAway(error: unknown): boolean {
  const { code, errno } = failureOf(error)
  if (errno !== undefined && AWAY_NUMBERS.has(errno)) return true
  if (code !== undefined && AWAY_CODES.has(code)) return true
  return error instanceof Error && /Queue limit reached|closed state|Pool is closed/.test(error.message)
}
