import express, { type Request, type RequestHandler, type Response } from 'express'
import multer from 'multer'
import * as z from 'zod'
import type { Route } from '../../shared/api/route.ts'
import type { RouteName } from '../../shared/api/routes.ts'
import { Refusal } from './refusal.ts'

const MEGABYTE = 1024 * 1024
const UPLOAD_LIMIT = 25 * MEGABYTE

/** Whole profiles with a wall per edge go through these. */
const LARGE_BODIES: ReadonlySet<RouteName> = new Set(['evaluate', 'saveSetup'])

const json = express.json({ limit: MEGABYTE })
const largeJson = express.json({ limit: 5 * MEGABYTE })
const uploads = multer({
  storage: multer.memoryStorage(),
  // The name is kept as sent: UTF-8.
  defParamCharset: 'utf8',
  limits: { fileSize: UPLOAD_LIMIT, files: 1, fields: 0, parts: 2, headerPairs: 20, fieldNameSize: 100 },
})

const nothing = z.strictObject({})
const MOST_ISSUES = 20

/** Takes the body off the wire, within its limit. */
export async function receiveBody(name: RouteName, route: Route, req: Request, res: Response): Promise<void> {
  if (route.upload !== undefined) {
    await run(uploads.single(route.upload), req, res)
    if (!req.file) throw new Refusal('invalid-request', `Send one file in the field "${route.upload}".`)
  } else if (route.body) {
    if (!req.is('application/json')) {
      throw new Refusal('not-json', 'Send the body as JSON, with Content-Type: application/json.')
    }
    await run(LARGE_BODIES.has(name) ? largeJson : json, req, res)
  }
}

/** The version in If-Match, which must be one strong tag: `"3"`. */
export function readIfMatch(header: string | undefined): number {
  if (header === undefined) {
    throw new Refusal(
      'version-missing',
      'Send If-Match with the version that you have seen, for example "3".',
    )
  }
  const match = /^"([1-9]\d{0,8})"$/.exec(header.trim())
  if (!match) throw new Refusal('invalid-request', 'If-Match must be one version in quotes, for example "3".')
  return Number(match[1])
}

/** Path, query and body by their schemas; anything that has none must be empty. */
export function readInputs(route: Route, req: Request): { params: unknown; query: unknown; body: unknown } {
  return {
    params: read(route.params ?? nothing, { ...req.params }, 'path'),
    query: read(route.query ?? nothing, { ...req.query }, 'query'),
    body: route.body ? read(route.body, req.body, 'body') : undefined,
  }
}

export function read(schema: z.ZodType, value: unknown, place: string): unknown {
  const result = schema.safeParse(value)
  if (result.success) return result.data
  const issues = result.error.issues
    .slice(0, MOST_ISSUES)
    .map((issue) => ({ path: [place, ...issue.path.map(String)].join('.'), message: issue.message }))
  const first = issues[0]
  const where = first ? ` (${first.path}: ${first.message})` : ''
  throw new Refusal('invalid-request', `The request is not as described${where}.`, { details: { issues } })
}

/** Waits for a middleware to call back. */
export async function run(middleware: RequestHandler, req: Request, res: Response): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    const next = (error?: unknown) =>
      error === undefined || error === null ? resolve() : reject(asError(error))
    void middleware(req, res, next)
  })
}

function asError(error: unknown): Error {
  return error instanceof Error ? error : new Error(String(error))
}
