import type { Express, Request, Response } from 'express'
import type passport from 'passport'
import type { EntityManager } from 'typeorm'
import { mayCall, policy } from '../../shared/api/policy.ts'
import type { Route } from '../../shared/api/route.ts'
import { routes, type RouteName } from '../../shared/api/routes.ts'
import type { CurrentUser } from '../../shared/api/people.ts'
import type { Services } from '../services.ts'
import { writeOnce } from './act.ts'
import type { Handlers, SessionControl } from './call.ts'
import { settlesWithin, within } from './deadline.ts'
import { type Download, sendDownload } from './download.ts'
import { idempotentRequest, keptAnswer, type IdempotentRequest } from './idempotency.ts'
import { readIfMatch, readInputs, receiveBody } from './read-request.ts'
import { databaseAway, Refusal } from './refusal.ts'
import { sessionControl } from './session-control.ts'
import { TokenBuckets } from './token-buckets.ts'

/**
 * A handler may take long for good reasons (a large drawing, many sign-ins at once). When it has not answered
 * after the first of these, the database is asked for a sign of life within the second; so a database that
 * hangs is reported within five seconds. ms.
 */
const PATIENCE = 3_500
const SIGN_OF_LIFE = 1_300

export const routeNames = Object.keys(routes) as RouteName[]

/** Puts every route of the table on the app, each through the same steps. */
export function mountRoutes(
  app: Express,
  services: Services,
  handlers: Handlers,
  authenticator: passport.Authenticator,
): void {
  const evaluations = new TokenBuckets(services.config.evaluationRate)
  const methodsByPath = new Map<string, string[]>()
  for (const name of routeNames) {
    const route: Route = routes[name]
    methodsByPath.set(route.path, [...(methodsByPath.get(route.path) ?? []), route.method.toUpperCase()])
    app[route.method](route.path, async (req, res) => {
      req.routeName = name
      const visitor = authorise(name, req)
      if (name === 'evaluate' && visitor) limitRate(evaluations, visitor)
      const version = route.ifMatch ? readIfMatch(req.get('if-match')) : 0
      await receiveBody(name, route, req, res)
      const inputs = readInputs(route, req)
      const repeatable = repeatableRequest(name, route, req, inputs)
      const session = sessionControl(authenticator, req, res)
      const call = callOf(services, { visitor, version, session, ...inputs }, repeatable, req)
      const before = await answeredBefore(services, visitor, repeatable)
      present(services, route, res, before ? before.answer : await handle(handlers, name, call))
    })
  }
  for (const [path, methods] of methodsByPath) {
    app.all(path, () => {
      throw new Refusal('method-not-allowed', `Allowed here: ${methods.join(', ')}.`, {
        allow: methods.join(', '),
      })
    })
  }
}

function authorise(name: RouteName, req: Request): CurrentUser | null {
  const { user } = req
  if (!user && policy[name] !== 'anyone') throw new Refusal('not-signed-in', 'Sign in first.')
  if (user && !mayCall(user.role, name)) {
    throw new Refusal('forbidden', `This is not for the role ${user.role}. Ask an administrator.`)
  }
  return user ? { id: user.id, email: user.email, name: user.name, role: user.role } : null
}

function limitRate(buckets: TokenBuckets, visitor: CurrentUser): void {
  const wait = buckets.take(visitor.id, performance.now())
  if (wait > 0) {
    throw new Refusal('too-many-requests', 'Too many evaluations at once. Wait a moment.', {
      retryAfterSeconds: Math.ceil(wait),
    })
  }
}

function repeatableRequest(
  name: RouteName,
  route: Route,
  req: Request,
  { params, body }: { params: unknown; body: unknown },
): IdempotentRequest | null {
  if (route.method !== 'post') return null
  return idempotentRequest(req.get('idempotency-key'), { route: name, params, body, file: req.file?.buffer })
}

function callOf(
  services: Services,
  known: {
    visitor: CurrentUser | null
    version: number
    session: SessionControl
    params: unknown
    query: unknown
    body: unknown
  },
  repeatable: IdempotentRequest | null,
  req: Request,
) {
  const { visitor } = known
  return {
    ...known,
    services,
    get user() {
      if (!visitor) throw new Error('A route for anyone asked who is signed in')
      return visitor
    },
    file: req.file && { name: req.file.originalname, bytes: req.file.buffer },
    address: req.ip ?? '',
    write: <T>(work: (manager: EntityManager) => Promise<T>) =>
      writeOnce(services, visitor, repeatable, work),
  }
}

async function answeredBefore(
  { dataSource }: Services,
  visitor: CurrentUser | null,
  repeatable: IdempotentRequest | null,
): Promise<{ readonly answer: unknown } | null> {
  return visitor && repeatable ? keptAnswer(dataSource.manager, visitor, repeatable) : null
}

async function handle(handlers: Handlers, name: RouteName, call: { services: Services }): Promise<unknown> {
  // The table ties each name to its schemas and its handler; the loop over names cannot show that to the compiler.
  const handler = handlers[name] as (call: unknown) => Promise<unknown>
  const work = handler(call)
  while (!(await settlesWithin(PATIENCE, work))) {
    await within(SIGN_OF_LIFE, call.services.dataSource.query('SELECT 1'), databaseAway)
  }
  return work
}

function present({ config }: Services, route: Route, res: Response, answer: unknown): void {
  const { answer: kind } = route
  if (kind === undefined) {
    res.status(route.status).end()
    return
  }
  if (typeof kind === 'string') {
    sendDownload(res, kind, answer as Download)
    return
  }
  if (config.checkAnswers) {
    const checked = kind.safeParse(answer)
    if (!checked.success)
      throw new Error(`${route.path} answered against its schema`, { cause: checked.error })
  }
  const version = versionOf(answer)
  if (version !== undefined) res.setHeader('ETag', `"${version}"`)
  res.status(route.status).json(answer)
}

function versionOf(answer: unknown): number | undefined {
  if (typeof answer !== 'object' || answer === null || !('version' in answer)) return undefined
  return typeof answer.version === 'number' ? answer.version : undefined
}
