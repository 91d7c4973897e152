import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Head } from '../../shared/api/heads.ts'
import { firstBrokenEntry } from '../../server/features/record/audit.ts'
import { inTransaction } from '../../server/db/transaction.ts'
import { Head as HeadRow } from '../../server/db/entities/head.ts'
import { type Agent, expectStatus, makeHead, startApp, type TestApp } from '../support/app.ts'
import { type Proxy, startProxy } from '../support/proxy.ts'

/** The database hangs, vanishes and crosses locks; the server says so, and recovers by itself. */

let proxy: Proxy
let app: TestApp
let engineer: Agent
beforeAll(async () => {
  const target = new URL(process.env.UNDERCANT_TEST_DATABASE ?? '')
  proxy = await startProxy(Number(target.port))
  app = await startApp('faults', {
    reach: (text) => {
      const url = new URL(text)
      url.port = String(proxy.port)
      return url.toString()
    },
  })
  engineer = await app.as('engineer')
})
afterAll(async () => {
  await app.close()
  await proxy.close()
})

const body = (name: string) => ({
  name,
  kind: 'turning',
  mechanicalLimit: 60,
  jet: { kerf: 1, taper: 0.5, standoff: 3, nozzleDiameter: 7 },
})

async function timed<T>(work: PromiseLike<T>): Promise<{ answer: T; seconds: number }> {
  const started = performance.now()
  const answer = await work
  return { answer, seconds: (performance.now() - started) / 1000 }
}

describe('a database that hangs', () => {
  it('gives 503 within about five seconds, and all is well when it goes on', async () => {
    proxy.pause()
    try {
      const [read, write, ready, live] = await Promise.all([
        timed(engineer.get('/api/heads')),
        timed(engineer.post('/api/heads').send(body('Hung'))),
        timed(app.anyone().get('/readyz')),
        timed(app.anyone().get('/livez')),
      ])
      for (const { answer, seconds } of [read, write]) {
        expect([answer.status, answer.body.error.code]).toEqual([503, 'database-away'])
        expect(Number(answer.headers['retry-after'])).toBeGreaterThan(0)
        expect(seconds).toBeLessThan(6)
      }
      expect(ready.answer.status).toBe(503)
      expect(ready.answer.body).toMatchObject({ ready: false })
      expect(live.answer.status).toBe(200)
      expect(live.seconds).toBeLessThan(2)
    } finally {
      proxy.resume()
    }
    await expectStatus(200, app.anyone().get('/readyz'))
    await expectStatus(200, engineer.get('/api/heads'))
  })
})

describe('a database that vanishes', () => {
  it('gives 503, keeps people signed in, and loses nothing that was acknowledged', async () => {
    const kept = await expectStatus<Head>(201, engineer.post('/api/heads').send(body('Kept')))
    proxy.cut()
    try {
      for (const call of [engineer.get('/api/heads'), engineer.post('/api/heads').send(body('Lost'))]) {
        const answer = await call
        expect([answer.status, answer.body.error.code]).toEqual([503, 'database-away'])
      }
      expect((await app.anyone().get('/readyz')).status).toBe(503)
    } finally {
      proxy.open()
    }
    expect(await expectStatus<Head>(200, engineer.get(`/api/heads/${kept.id}`))).toEqual(kept)
    expect(await firstBrokenEntry(app.services.dataSource.manager)).toBeNull()
  })

  it('in the middle of writes: sent again with the same key, each is done once', async () => {
    const names = Array.from({ length: 24 }, (_, i) => `Cut ${i}`)
    const send = (name: string) =>
      engineer
        .post('/api/heads')
        .set('Idempotency-Key', `key-${name.replace(' ', '-')}`)
        .send(body(name))
    const first = Promise.all(names.map((name) => send(name).then(({ status }) => status)))
    await new Promise((resolve) => setTimeout(resolve, 40))
    proxy.cut()
    const statuses = await first
    proxy.open()
    expect(statuses.every((status) => status === 201 || status === 503)).toBe(true)
    for (const name of names) await expectStatus(201, send(name))
    const { total } = await expectStatus<{ total: number }>(
      200,
      engineer.get('/api/heads').query({ q: 'Cut ' }),
    )
    expect(total).toBe(names.length)
    expect(await firstBrokenEntry(app.services.dataSource.manager)).toBeNull()
  })
})

describe('transactions that cross', () => {
  it('are run again after a deadlock, and both take effect', async () => {
    const { dataSource } = app.services
    const a = await makeHead(app)
    const b = await makeHead(app)
    let runs = 0
    const touch = (first: string, second: string) =>
      inTransaction(dataSource, async (manager) => {
        runs += 1
        await manager.increment(HeadRow, { id: first }, 'version', 1)
        await new Promise((resolve) => setTimeout(resolve, 60))
        await manager.increment(HeadRow, { id: second }, 'version', 1)
      })
    await Promise.all([touch(a.id, b.id), touch(b.id, a.id)])
    expect(runs).toBeGreaterThan(2)
    for (const { id } of [a, b]) {
      expect((await expectStatus<Head>(200, engineer.get(`/api/heads/${id}`))).version).toBe(3)
    }
  })

  it('are run again when a row moved since it was read, so that no update is lost', async () => {
    const { dataSource } = app.services
    const head = await makeHead(app)
    const add = () =>
      inTransaction(dataSource, async (manager) => {
        const { kerf } = await manager.findOneByOrFail(HeadRow, { id: head.id })
        await new Promise((resolve) => setTimeout(resolve, 10))
        await manager.update(HeadRow, { id: head.id }, { kerf: kerf + 1 })
      })
    await Promise.all([add(), add(), add()])
    const after = await expectStatus<Head>(200, engineer.get(`/api/heads/${head.id}`))
    expect(after.jet.kerf).toBe(head.jet.kerf + 3)
  })
})
