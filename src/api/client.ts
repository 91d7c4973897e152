import type * as z from 'zod'
import { errorCodes, type ErrorBody, type ErrorCode } from '../../shared/api/errors.ts'
import type { Route } from '../../shared/api/route.ts'
import { routes, type RouteName } from '../../shared/api/routes.ts'
import { ApiError, NetworkError } from './errors.ts'
import { askToSignIn } from './sign-in-gate.ts'

type RouteOf<N extends RouteName> = (typeof routes)[N]
type Loose<T> = { [K in keyof T]: T[K] | number }

type ParamsOf<N extends RouteName> =
  RouteOf<N> extends { params: infer P extends z.ZodType } ? { params: Loose<z.input<P>> } : unknown
type QueryOf<N extends RouteName> =
  RouteOf<N> extends { query: infer Q extends z.ZodType } ? { query?: Loose<z.input<Q>> } : unknown
type BodyOf<N extends RouteName> = RouteOf<N> extends { body: z.ZodType } ? { body: Body<N> } : unknown
type FileOf<N extends RouteName> = RouteOf<N> extends { upload: string } ? { file: File } : unknown
type MatchOf<N extends RouteName> = RouteOf<N> extends { ifMatch: true } ? { ifMatch: number } : unknown

/** The JSON that a route takes. */
export type Body<N extends RouteName> =
  RouteOf<N> extends { body: infer B extends z.ZodType } ? z.input<B> : never

/** What a route must be given, as its schemas say: params, query, body, a file, the version it changes. */
export type Arguments<N extends RouteName> = ParamsOf<N> &
  QueryOf<N> &
  BodyOf<N> &
  FileOf<N> &
  MatchOf<N> & { signal?: AbortSignal }

/** What a route answers: parsed JSON, a Blob for a download, nothing for 204. */
export type Answer<N extends RouteName> =
  RouteOf<N> extends { answer: infer A }
    ? A extends z.ZodType
      ? z.output<A>
      : A extends string
        ? Blob
        : undefined
    : undefined

interface Given {
  readonly params?: Record<string, unknown>
  readonly query?: Record<string, unknown>
  readonly body?: unknown
  readonly file?: File
  readonly ifMatch?: number
  readonly signal?: AbortSignal
}

/** The address of a route, for `fetch` and for download links. */
export function urlOf<N extends RouteName>(name: N, given: ParamsOf<N> & QueryOf<N>): string {
  const { params = {}, query = {} } = given as Given
  const path = routes[name].path.replace(/:(\w+)/g, (_, key: string) => {
    const value = params[key]
    if (value === undefined) throw new Error(`${name} needs the parameter ${key}`)
    return encodeURIComponent(String(value))
  })
  const search = new URLSearchParams()
  for (const [key, value] of Object.entries(query))
    if (value !== undefined && value !== '') search.set(key, String(value))
  return search.size === 0 ? path : `${path}?${search}`
}

/**
 * Calls a route by its name. Throws `ApiError` for a refusal, `NetworkError` when no proper answer came. A
 * session that has ended asks the person to sign in where they are, and then repeats the call once: a 401
 * has changed nothing, so nothing is done twice.
 */
export async function call<N extends RouteName>(name: N, given: Arguments<N>): Promise<Answer<N>> {
  const key = isDoneOnce(routes[name]) ? newKey() : undefined
  try {
    return await callOnce(name, given, key)
  } catch (error) {
    const again =
      error instanceof NetworkError ? key !== undefined : lapsed(name, error) && (await askToSignIn())
    if (!again) throw error
    return await callOnce(name, given, key)
  }
}

const lapsed = (name: RouteName, error: unknown) =>
  error instanceof ApiError && error.code === 'not-signed-in' && name !== 'whoAmI'

/** Writes that the server does once for a key, so that one without an answer may be sent again. */
function isDoneOnce(route: Route): boolean {
  return route.method === 'post' && (route.status === 201 || route.ifMatch === true)
}

/** 128 random bits; `crypto.randomUUID` is missing where the pages come over plain HTTP. */
export function newKey(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(16)), (byte) =>
    byte.toString(16).padStart(2, '0'),
  ).join('')
}

async function callOnce<N extends RouteName>(
  name: N,
  given: Arguments<N>,
  key: string | undefined,
): Promise<Answer<N>> {
  const route: Route = routes[name]
  const response = await send(urlOf(name, given), requestOf(route, given as Given, key))
  if (!response.ok) throw refusalOf(response.status, await response.json().catch(() => null))
  if (response.status === 204 || route.answer === undefined) return undefined as Answer<N>
  if (typeof route.answer === 'string') return (await response.blob()) as unknown as Answer<N>
  return (await jsonOf(response)) as Answer<N>
}

function requestOf(
  route: Route,
  { body, file, ifMatch, signal }: Given,
  key: string | undefined,
): RequestInit {
  const headers: Record<string, string> = { accept: 'application/json, */*;q=0.5' }
  if (ifMatch !== undefined) headers['if-match'] = `"${ifMatch}"`
  if (key !== undefined) headers['idempotency-key'] = key
  const request: RequestInit = { method: route.method.toUpperCase(), headers, credentials: 'same-origin' }
  if (signal !== undefined) request.signal = signal
  if (route.upload !== undefined && file !== undefined) {
    const form = new FormData()
    form.set(route.upload, file, file.name)
    request.body = form
  } else if (body !== undefined) {
    headers['content-type'] = 'application/json'
    request.body = JSON.stringify(body)
  }
  return request
}

async function send(url: string, request: RequestInit): Promise<Response> {
  try {
    return await fetch(url, request)
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error
    throw new NetworkError()
  }
}

async function jsonOf(response: Response): Promise<unknown> {
  try {
    return await response.json()
  } catch {
    throw new NetworkError('The answer could not be read. Check the connection, then try again.')
  }
}

/** A refusal as the server wrote it; anything else in its place counts as no answer. */
export function refusalOf(status: number, body: unknown): ApiError | NetworkError {
  if (!isErrorBody(body))
    return new NetworkError(`The server could not answer (${status}). Try again in a moment.`)
  const { code, message, requestId, details } = body.error
  return new ApiError(status, code, message, requestId, details)
}

function isErrorBody(body: unknown): body is ErrorBody {
  if (typeof body !== 'object' || body === null || !('error' in body)) return false
  const error = body.error as Partial<ErrorBody['error']> | null
  return (
    typeof error === 'object' &&
    error !== null &&
    typeof error.message === 'string' &&
    errorCodes.includes(error.code as ErrorCode)
  )
}
