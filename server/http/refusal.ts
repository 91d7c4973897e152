import type { ErrorCode } from '../../shared/api/errors.ts'

const STATUS: Readonly<Record<ErrorCode, number>> = {
  'invalid-request': 400,
  'not-json': 400,
  'too-large': 413,
  'not-signed-in': 401,
  'wrong-sign-in': 401,
  'too-many-attempts': 429,
  'too-many-requests': 429,
  forbidden: 403,
  'cross-site': 403,
  'not-found': 404,
  'method-not-allowed': 405,
  'version-missing': 428,
  'version-stale': 412,
  'wrong-state': 409,
  'own-submission': 403,
  'hash-mismatch': 409,
  'wrong-password': 403,
  'has-stop-findings': 409,
  'name-taken': 409,
  'unusable-geometry': 400,
  'disk-full': 507,
  'database-away': 503,
  internal: 500,
  'drawing-empty': 400,
  'drawing-too-large': 413,
  'drawing-binary': 400,
  'drawing-compressed': 400,
  'drawing-not-dxf': 400,
  'drawing-truncated': 400,
  'drawing-malformed': 400,
  'drawing-number': 400,
  'drawing-too-many-entities': 400,
  'drawing-block-recursion': 400,
  'drawing-lost-vertices': 400,
  'drawing-too-slow': 400,
  'drawing-no-geometry': 400,
}

export interface RefusalExtras {
  readonly details?: unknown
  readonly retryAfterSeconds?: number
  /** Methods that the path does know. */
  readonly allow?: string
}

/** An expected "no": a code for programs, a sentence for people that says what to do. */
export class Refusal extends Error {
  readonly code: ErrorCode
  readonly extras: RefusalExtras

  constructor(code: ErrorCode, message: string, extras: RefusalExtras = {}) {
    super(message)
    this.name = 'Refusal'
    this.code = code
    this.extras = extras
  }

  get status(): number {
    return STATUS[this.code]
  }
}

export function notFound(what: string): Refusal {
  return new Refusal('not-found', `${what} was not found. It may have been removed, or the link is wrong.`)
}

export function databaseAway(): Refusal {
  return new Refusal('database-away', 'The database does not answer. Try again in a moment.', {
    retryAfterSeconds: 5,
  })
}
