import type { ErrorRequestHandler, RequestHandler } from 'express'
import multer from 'multer'
import type { ErrorBody } from '../../shared/api/errors.ts'
import { DrawingError } from '../../shared/drawing/errors.ts'
import { isDatabaseAway } from '../db/failures.ts'
import type { Logger } from '../log.ts'
import { databaseAway, Refusal } from './refusal.ts'

/** The one exit for everything that went wrong: one shape, a code, the request's id, never a stack. */
export function errorAnswer(log: Logger): ErrorRequestHandler {
  // Express knows an error handler by its four parameters.
  // eslint-disable-next-line @typescript-eslint/no-unused-vars
  return (error: unknown, req, res, _next) => {
    const refusal = refusalOf(error)
    if (refusal.code === 'internal') log.error({ err: error, requestId: req.requestId }, 'request failed')
    else if (refusal.code === 'database-away') {
      const cause = error instanceof Error ? error.message : String(error)
      log.warn({ cause, requestId: req.requestId }, 'database away')
    }
    if (res.headersSent) {
      res.destroy()
      return
    }
    const { details, retryAfterSeconds, allow } = refusal.extras
    if (retryAfterSeconds !== undefined) res.setHeader('Retry-After', String(retryAfterSeconds))
    if (allow !== undefined) res.setHeader('Allow', allow)
    const body: ErrorBody = {
      error: {
        code: refusal.code,
        message: refusal.message,
        requestId: req.requestId,
        ...(details === undefined ? {} : { details }),
      },
    }
    res.status(refusal.status).json(body)
  }
}

export const noSuchRoute: RequestHandler = (req) => {
  throw new Refusal('not-found', `There is nothing at ${(req.baseUrl + req.path).slice(0, 200)}.`)
}

function refusalOf(error: unknown): Refusal {
  if (error instanceof Refusal) return error
  if (error instanceof DrawingError) {
    return new Refusal(
      error.code,
      error.message,
      error.line === undefined ? {} : { details: { line: error.line } },
    )
  }
  if (error instanceof multer.MulterError) return uploadRefusal(error)
  if (isDatabaseAway(error)) return databaseAway()
  return (
    parserRefusal(error) ??
    new Refusal(
      'internal',
      'Something went wrong here. Try again; if it stays, tell who runs this server the request id.',
    )
  )
}

function uploadRefusal(error: multer.MulterError): Refusal {
  if (error.code === 'LIMIT_FILE_SIZE') {
    return new Refusal('too-large', 'The file is larger than 25 MB. Save only the part you need.')
  }
  return new Refusal('invalid-request', 'Send one DXF file in the field "file", and nothing else.')
}

/** Errors of body-parser, multipart parsing and path decoding carry a status and often a type. */
function parserRefusal(error: unknown): Refusal | null {
  if (!(error instanceof Error)) return null
  const { type, status } = error as Error & { type?: unknown; status?: unknown }
  if (type === 'entity.too.large') return new Refusal('too-large', 'The request is too large.')
  if (type === 'entity.parse.failed' || type === 'charset.unsupported' || type === 'encoding.unsupported') {
    return new Refusal('not-json', 'The body is not JSON in UTF-8.')
  }
  if (/Unexpected end of form|Malformed part header|Multipart: Boundary not found/.test(error.message)) {
    return new Refusal('invalid-request', 'The upload is cut off or malformed. Send it again.')
  }
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new Refusal('invalid-request', 'The request could not be read.')
  }
  return null
}
