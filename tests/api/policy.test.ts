import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { roles } from '../../shared/api/common.ts'
import { mayCall, policy } from '../../shared/api/policy.ts'
import type { Route } from '../../shared/api/route.ts'
import { routes, type RouteName } from '../../shared/api/routes.ts'
import { type Agent, startApp, type TestApp } from '../support/app.ts'

/** Role × route, made of the table: whoever may not is told so, whoever may gets past the door. */

const names = Object.keys(routes) as RouteName[]
/** Calling these would end the caller's own session, or start another. */
const MOVES_THE_SESSION: ReadonlySet<RouteName> = new Set(['signIn', 'signOut'])

let app: TestApp
beforeAll(async () => {
  app = await startApp('policy')
})
afterAll(() => app.close())

function call(agent: Agent, name: RouteName) {
  const { method, path }: Route = routes[name]
  const id = name === 'endSession' ? 'a'.repeat(64) : randomUUID()
  return agent[method](path.replace(':id', id).replace(':revision', '1'))
}

describe('the table', () => {
  it('names every route, and no other', () => {
    expect(Object.keys(policy).sort()).toEqual([...names].sort())
  })

  it('leaves to anyone only what signing in needs', () => {
    expect(names.filter((name) => policy[name] === 'anyone')).toEqual(['about', 'openapi', 'signIn'])
  })
})

describe.each(names)('%s', (name) => {
  const open = policy[name] === 'anyone'

  it(`${open ? 'is open' : 'refuses'} without a session`, async () => {
    const { status, body } = await call(app.anyone(), name)
    if (open) expect([200, 400]).toContain(status)
    else {
      expect(status).toBe(401)
      expect(body.error.code).toBe('not-signed-in')
    }
  })

  it.each(roles)('holds for the role %s', async (role) => {
    if (MOVES_THE_SESSION.has(name)) {
      expect(mayCall(role, name)).toBe(true)
      return
    }
    const { status, body } = await call(await app.as(role), name)
    if (mayCall(role, name)) expect([200, 400, 404, 428]).toContain(status)
    else {
      expect(status).toBe(403)
      expect(body.error.code).toBe('forbidden')
    }
  })
})
