import type { ErrorCode } from '../../shared/api/errors.ts'

/** A refusal that the server put into words: `message` says what went wrong and what to do. */
export class ApiError extends Error {
  readonly status: number
  readonly code: ErrorCode
  readonly requestId: string
  readonly details: unknown

  constructor(status: number, code: ErrorCode, message: string, requestId: string, details?: unknown) {
    super(message)
    this.name = 'ApiError'
    this.status = status
    this.code = code
    this.requestId = requestId
    this.details = details
  }
}

/** No answer came at all, or one that the product did not write (a proxy, say). Nothing is known to be saved. */
export class NetworkError extends Error {
  constructor(message = 'No answer from the server. Check the connection, then try again.') {
    super(message)
    this.name = 'NetworkError'
  }
}

export function isCode(error: unknown, ...codes: ErrorCode[]): error is ApiError {
  return error instanceof ApiError && codes.includes(error.code)
}

/** What to show a person for any failure. */
export function messageOf(error: unknown): string {
  if (error instanceof ApiError || error instanceof NetworkError) return error.message
  return 'Something went wrong in this page. Load it again; if it stays, tell whoever runs Undercant here.'
}

/** The part of an answer that only whoever reads the logs needs. */
export function requestIdOf(error: unknown): string | null {
  return error instanceof ApiError && error.requestId !== '' ? error.requestId : null
}
