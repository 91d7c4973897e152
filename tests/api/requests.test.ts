import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { errorSchema } from '../../shared/api/errors.ts'
import { mayCall } from '../../shared/api/policy.ts'
import { roles } from '../../shared/api/common.ts'
import type { Route } from '../../shared/api/route.ts'
import { routes, type RouteName } from '../../shared/api/routes.ts'
import { type Agent, expectStatus, makeHead, startApp, type TestApp } from '../support/app.ts'

let app: TestApp
beforeAll(async () => {
  app = await startApp('requests')
})
afterAll(() => app.close())

const names = Object.keys(routes) as RouteName[]
const routeOf = (name: RouteName): Route => routes[name]
const pathOf = (name: RouteName, id: string = randomUUID()) =>
  routeOf(name)
    .path.replace(':id', name === 'endSession' ? 'b'.repeat(64) : id)
    .replace(':revision', '1')

async function agentFor(name: RouteName): Promise<Agent> {
  const role = roles.find((each) => mayCall(each, name))
  return role ? app.as(role) : app.anyone()
}

describe('every route', () => {
  it.each(names.filter((name) => routeOf(name).body))('%s refuses a key it does not know', async (name) => {
    const { method, ifMatch } = routeOf(name)
    const call = (await agentFor(name))
      [method](pathOf(name))
      .send({ surprise: 1, id: randomUUID(), version: 9 })
    const { status, body } = await (ifMatch ? call.set('If-Match', '"1"') : call)
    expect(status).toBe(400)
    expect(body.error.code).toBe('invalid-request')
    expect(JSON.stringify(body.error.details)).toContain('surprise')
  })

  it.each(names.filter((name) => routeOf(name).method === 'get'))(
    '%s refuses a query it does not know',
    async (name) => {
      const { status, body } = await (await agentFor(name)).get(pathOf(name)).query({ surprise: 1 })
      expect(status).toBe(400)
      expect(body.error.code).toBe('invalid-request')
    },
  )

  it.each(names.filter((name) => routeOf(name).params))('%s refuses ids that are none', async (name) => {
    const { method, path, ifMatch, body } = routeOf(name)
    for (const id of ['1', 'null', '%00', "'--", '../users', 'x'.repeat(300)]) {
      const call = (await agentFor(name))[method](
        path.replace(':id', encodeURIComponent(id)).replace(':revision', '1'),
      )
      if (ifMatch) call.set('If-Match', '"1"')
      const { status } = await (body ? call.send({}) : call)
      expect([400, 404]).toContain(status)
      if (!id.includes('/')) expect(status).toBe(400)
    }
  })

  it.each(names.filter((name) => routeOf(name).ifMatch))('%s needs If-Match', async (name) => {
    const agent = await agentFor(name)
    const { method } = routeOf(name)
    const missing = await agent[method](pathOf(name)).send({})
    expect(missing.status).toBe(428)
    expect(missing.body.error.code).toBe('version-missing')
    for (const tag of ['3', '*', 'W/"3"', '"0"', '"x"', '"1", "2"']) {
      const { status } = await agent[method](pathOf(name)).set('If-Match', tag).send({})
      expect(status).toBe(400)
    }
  })
})

describe('bodies', () => {
  it('that are not JSON are named so', async () => {
    const agent = await app.as('engineer')
    for (const [type, text] of [
      ['application/json', '{"name":'],
      ['application/json', 'NaN'],
      ['application/json', ''],
      ['text/plain', '{}'],
    ] as const) {
      const { status, body } = await agent.post('/api/evaluations').set('Content-Type', type).send(text)
      expect(status).toBe(400)
      expect(['not-json', 'invalid-request']).toContain(body.error.code)
    }
    const cut = await agent.post('/api/heads').set('Content-Type', 'application/json').send('{"name":')
    expect(cut.body.error.code).toBe('not-json')
  })

  it('over a megabyte are refused, evaluations over five', async () => {
    const agent = await app.as('engineer')
    const heavy = async (path: string, megabytes: number) =>
      (await agent.post(path).send({ name: 'x'.repeat(megabytes * 1_048_576) })).status
    expect(await heavy('/api/heads', 1.1)).toBe(413)
    expect(await heavy('/api/evaluations', 2)).toBe(400)
    expect(await heavy('/api/evaluations', 5.1)).toBe(413)
  })

  it('may not hold numbers that are not finite or out of range', async () => {
    const agent = await app.as('engineer')
    for (const limit of ['1e999', '-5', '90.001', '"60"', 'null', '[60]']) {
      const jet = '{"kerf":1,"taper":0.5,"standoff":3,"nozzleDiameter":7}'
      const text = `{"name":"n","kind":"turning","mechanicalLimit":${limit},"jet":${jet}}`
      await expectStatus(400, agent.post('/api/heads').set('Content-Type', 'application/json').send(text))
    }
  })
})

describe('queries', () => {
  it('refuses keys twice, sorts that are not offered, pages that are none', async () => {
    const agent = await app.as('welder')
    for (const query of [
      'q=a&q=b',
      'q[]=a',
      'sort=name;drop',
      'sort=id',
      'page=0',
      'page=1e3',
      'page=-1',
      'pageSize=101',
      'pageSize=abc',
      `q=${'x'.repeat(121)}`,
    ]) {
      await expectStatus(400, agent.get(`/api/parts?${query}`))
    }
    await expectStatus(200, agent.get('/api/parts?q=%25_\\&sort=-number&page=1&pageSize=100'))
  })

  it('take wildcards and quotes as text', async () => {
    await makeHead(app)
    const agent = await app.as('welder')
    for (const q of ['%', '_', "' OR 1=1 -- ", '\\']) {
      const { total } = await expectStatus<{ total: number }>(200, agent.get('/api/heads').query({ q }))
      expect(total).toBe(0)
    }
    const { total } = await expectStatus<{ total: number }>(200, agent.get('/api/heads').query({ q: 'HEAD' }))
    expect(total).toBeGreaterThan(0)
  })
})

describe('answers', () => {
  it('have one shape for every error, with the id of the request and nothing of the inside', async () => {
    const agent = await app.as('welder')
    for (const call of [
      app.anyone().get('/api/parts'),
      agent.get('/api/users'),
      agent.get('/api/nothing'),
      agent.get(`/api/parts/${randomUUID()}`),
      agent.delete('/api/parts'),
      agent.get('/api/parts/%E0%A4%A'),
      agent.post('/api/session').send('{'),
      agent.get('/elsewhere.png'),
    ]) {
      const { status, body, headers } = await call
      expect(status).toBeGreaterThanOrEqual(400)
      expect(status).toBeLessThan(500)
      expect(errorSchema.safeParse(body).success).toBe(true)
      expect(headers['x-request-id']).toBe(body.error.requestId)
      expect(JSON.stringify(body)).not.toMatch(/\.ts|node_modules|SELECT|\bat \S+ \(/)
    }
  })

  it('say 405 with what is allowed where only the method is wrong, 404 where nothing is', async () => {
    const agent = await app.as('administrator')
    const wrong = await agent.delete('/api/heads')
    expect(wrong.status).toBe(405)
    expect(wrong.body.error.code).toBe('method-not-allowed')
    expect(wrong.headers.allow).toBe('GET, POST')
    const nothing = await agent.get('/api/heads/a/b')
    expect(nothing.status).toBe(404)
    expect(nothing.body.error.code).toBe('not-found')
  })

  it('carry the headers that protect a browser, and are never stored', async () => {
    const { headers } = await (await app.as('welder')).get('/api/parts')
    expect(headers['cache-control']).toBe('no-store')
    expect(headers['x-content-type-options']).toBe('nosniff')
    expect(headers['x-powered-by']).toBeUndefined()
    expect(headers['referrer-policy']).toBe('no-referrer')
    const policy = String(headers['content-security-policy'])
    const directives = new Map(
      policy.split(';').map((part) => [part.split(' ')[0], part.split(' ').slice(1)]),
    )
    expect(directives.get('default-src')).toEqual(["'self'"])
    expect(directives.get('script-src')).toEqual(["'self'"])
    expect(directives.get('connect-src')).toEqual(["'self'"])
    expect(directives.get('frame-ancestors')).toEqual(["'none'"])
    expect(policy).not.toMatch(/unsafe-eval|https?:|upgrade-insecure/)
  })

  it('give a version as ETag', async () => {
    const head = await makeHead(app)
    const { headers, body } = await (await app.as('welder')).get(`/api/heads/${head.id}`)
    expect(headers.etag).toBe(`"${body.version}"`)
  })
})

describe('writes from elsewhere', () => {
  const body = { plate: { thickness: 10 }, loops: [], walls: [] }

  it('are refused by what the browser says of them', async () => {
    const agent = await app.as('engineer')
    for (const headers of [
      { 'Sec-Fetch-Site': 'cross-site' },
      { 'Sec-Fetch-Site': 'same-site' },
      { 'Sec-Fetch-Site': 'none' },
      { Origin: 'http://elsewhere.example' },
      { Origin: 'null' },
      { Origin: 'http://elsewhere.example', 'Sec-Fetch-Site': 'cross-site' },
    ]) {
      const { status, body: answer } = await agent.post('/api/evaluations').set(headers).send(body)
      expect(status).toBe(403)
      expect(answer.error.code).toBe('cross-site')
    }
    const signIn = await app.anyone().post('/api/session').set('Sec-Fetch-Site', 'cross-site').send({})
    expect(signIn.status).toBe(403)
  })

  it('are taken from our own pages and from programs', async () => {
    const agent = await app.as('engineer')
    const { port } = app.server.address() as { port: number }
    for (const headers of [
      { 'Sec-Fetch-Site': 'same-origin' },
      { Origin: `http://127.0.0.1:${port}` },
      {},
    ] as Record<string, string>[]) {
      const { body: answer } = await agent.post('/api/evaluations').set(headers).send(body)
      expect(answer.error.code).toBe('invalid-request')
    }
  })

  it('may be read only by our own pages: nothing allows other origins', async () => {
    const { headers } = await (
      await app.as('welder')
    )
      .get('/api/parts')
      .set('Origin', 'http://elsewhere.example')
    expect(headers['access-control-allow-origin']).toBeUndefined()
    expect(headers['cross-origin-resource-policy']).toBe('same-origin')
  })
})
