import * as z from 'zod'
import { errorSchema, type ErrorCode } from '../../shared/api/errors.ts'
import { policy } from '../../shared/api/policy.ts'
import type { Route } from '../../shared/api/route.ts'
import { routes, type RouteName } from '../../shared/api/routes.ts'
import { SESSION_COOKIE } from './session-control.ts'

/** OpenAPI 3.1, made of the same table and schemas that validate. */

type Json = Record<string, unknown>

/** A 30° bevel on one edge of a square plate, so that a reader can try the service at once. */
export const evaluationExample = {
  plate: { thickness: 20 },
  loops: [
    [
      { x: 0, y: 0 },
      { x: 200, y: 0 },
      { x: 200, y: 100 },
      { x: 0, y: 100 },
    ],
  ],
  datum: 'top',
  walls: [{ loop: 0, edge: 0, facets: [{ depth: 20, tilt: -30 }] }],
  jet: { kerf: 1, taper: 0.5, standoff: 3, nozzleDiameter: 7 },
  head: { mechanicalLimit: 60, workingLimit: 47 },
} as const

let made: Json | undefined

/** Made once, when it is first asked for. */
export function openApiDocument(): Json {
  made ??= describe()
  return made
}

function describe(): Json {
  return {
    openapi: '3.1.0',
    info: {
      title: 'Undercant',
      version: '1',
      description:
        'Bevelled plate for five-axis abrasive waterjet. Lengths in millimetres, angles in degrees from vertical, ' +
        'positive outward. Writes that name a version send it in If-Match and get 412 with the current row when it is stale; ' +
        'a POST may carry an Idempotency-Key and is then done once. Results are aids to planning: local codes, the welding ' +
        'procedure and licensed practice decide.',
    },
    servers: [{ url: '/' }],
    paths: paths(),
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: SESSION_COOKIE } },
      schemas: { Error: jsonSchema(errorSchema, 'output') },
    },
  }
}

function paths(): Json {
  const found: Record<string, Json> = {}
  for (const [name, route] of Object.entries(routes) as [RouteName, Route][]) {
    const path = route.path.replace(/:(\w+)/g, '{$1}')
    found[path] = { ...found[path], [route.method]: operation(name, route) }
  }
  return found
}

function operation(name: RouteName, route: Route): Json {
  const parameters = [
    ...parametersOf(route.params, 'path'),
    ...parametersOf(route.query, 'query'),
    ...(route.ifMatch ? [header('If-Match', true, 'the version seen, for example "3"')] : []),
    ...(route.method === 'post' && policy[name] !== 'anyone'
      ? [header('Idempotency-Key', false, 'the same key again gives the same answer, once done')]
      : []),
  ]
  const access = policy[name]
  return {
    operationId: name,
    summary: route.summary,
    description:
      access === 'anyone'
        ? 'For anyone.'
        : `For ${access === 'signed-in' ? 'anyone signed in' : access.join(', ')}.`,
    security: access === 'anyone' ? [] : [{ session: [] }],
    ...(parameters.length > 0 ? { parameters } : {}),
    ...requestBody(name, route),
    responses: { [route.status]: success(route), ...refusals(name, route) },
  }
}

function header(name: string, required: boolean, description: string): Json {
  return { name, in: 'header', required, description, schema: { type: 'string' } }
}

function parametersOf(schema: z.ZodType | undefined, place: 'path' | 'query'): Json[] {
  if (!schema) return []
  const { properties = {}, required = [] } = jsonSchema(schema, 'input') as {
    properties?: Record<string, Json>
    required?: string[]
  }
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: property,
  }))
}

function requestBody(name: RouteName, route: Route): Json {
  if (route.upload !== undefined) {
    const schema = {
      type: 'object',
      required: [route.upload],
      properties: { [route.upload]: { type: 'string', contentMediaType: 'application/dxf' } },
    }
    return { requestBody: { required: true, content: { 'multipart/form-data': { schema } } } }
  }
  if (!route.body) return {}
  const example = name === 'evaluate' ? { example: evaluationExample } : {}
  const content = { 'application/json': { schema: jsonSchema(route.body, 'input'), ...example } }
  return { requestBody: { required: true, content } }
}

function success({ status, summary, answer, ifMatch }: Route): Json {
  if (status === 204 || answer === undefined) return { description: summary }
  const headers = ifMatch ? { headers: { ETag: { schema: { type: 'string' } } } } : {}
  if (typeof answer === 'string') {
    return {
      description: summary,
      content: { [answer]: { schema: { type: 'string', contentMediaType: answer } } },
    }
  }
  return {
    description: summary,
    ...headers,
    content: { 'application/json': { schema: jsonSchema(answer, 'output') } },
  }
}

/** Which refusals a route can give, by status, with the codes most often behind them. */
function refusals(name: RouteName, route: Route): Json {
  const access = policy[name]
  const found = new Map<number, readonly ErrorCode[]>()
  found.set(400, route.body ? ['invalid-request', 'not-json'] : ['invalid-request'])
  if (access !== 'anyone') found.set(401, ['not-signed-in'])
  if (route.method !== 'get') found.set(403, ['cross-site', 'forbidden'])
  else if (typeof access !== 'string') found.set(403, ['forbidden'])
  if (route.params) found.set(404, ['not-found'])
  if (route.ifMatch) found.set(412, ['version-stale']).set(428, ['version-missing'])
  if (route.body || route.upload) found.set(413, ['too-large'])
  found.set(429, ['too-many-requests']).set(503, ['database-away'])
  for (const [status, codes] of Object.entries(specialRefusals[name] ?? {})) found.set(Number(status), codes)
  return Object.fromEntries(
    [...found].map(([status, codes]) => [
      status,
      {
        description: codes.join(', '),
        content: { 'application/json': { schema: { $ref: '#/components/schemas/Error' } } },
      },
    ]),
  )
}

const specialRefusals: Partial<Record<RouteName, Record<number, readonly ErrorCode[]>>> = {
  signIn: { 401: ['wrong-sign-in'], 429: ['too-many-attempts'] },
  createUser: { 409: ['name-taken'] },
  createHead: { 409: ['name-taken'] },
  updateHead: { 409: ['name-taken'] },
  createPart: { 409: ['name-taken'] },
  updatePart: { 409: ['name-taken'] },
  uploadDrawing: { 400: ['invalid-request', 'drawing-not-dxf', 'drawing-malformed'], 507: ['disk-full'] },
  createSetup: { 400: ['invalid-request', 'unusable-geometry'] },
  saveSetup: { 400: ['invalid-request', 'unusable-geometry'] },
  submitSetup: { 409: ['wrong-state', 'hash-mismatch', 'has-stop-findings'] },
  approveSetup: {
    403: ['forbidden', 'own-submission', 'wrong-password'],
    409: ['wrong-state', 'hash-mismatch', 'has-stop-findings'],
    429: ['too-many-attempts'],
  },
  returnSetup: { 409: ['wrong-state', 'hash-mismatch'] },
  evaluate: { 400: ['invalid-request', 'unusable-geometry'] },
}

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): Json {
  const made: Json = { ...z.toJSONSchema(schema, { io, target: 'draft-2020-12' }) }
  // The document names the dialect once, by its version.
  delete made.$schema
  return made
}
