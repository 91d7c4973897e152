import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Head } from '../../shared/api/heads.ts'
import type { Setup } from '../../shared/api/setups.ts'
import { expectStatus, ifMatch, makeSetup } from '../support/app.ts'
import { startShop, type Shop } from '../support/shop.ts'

let app: Shop['app']
let engineer: Shop['engineer']
let programmer: Shop['programmer']
let head: Shop['head']
let part: Shop['part']

beforeAll(async () => {
  ;({ app, engineer, programmer, head, part } = await startShop('idempotency'))
})
afterAll(() => app.close())

const jet = { kerf: 1, taper: 0.5, standoff: 3, nozzleDiameter: 7 }
const body = (name: string) => ({ name, kind: 'turning', mechanicalLimit: 60, jet })
const create = (key: string, name: string, agent = engineer) =>
  agent.post('/api/heads').set('Idempotency-Key', key).send(body(name))

describe('a write with an idempotency key', () => {
  it('is done once and answered the same', async () => {
    const key = randomUUID()
    const first = await expectStatus<Head>(201, create(key, 'Once'))
    const second = await expectStatus<Head>(201, create(key, 'Once'))
    expect(second).toEqual(first)
    const { total } = await expectStatus<{ total: number }>(
      200,
      engineer.get('/api/heads').query({ q: 'Once' }),
    )
    expect(total).toBe(1)
  })

  it('is done once though sent many times at once', async () => {
    const key = randomUUID()
    const answers = await Promise.all(Array.from({ length: 8 }, () => create(key, 'Many')))
    expect(answers.map(({ status }) => status)).toEqual(Array(8).fill(201))
    expect(new Set(answers.map((answer) => (answer.body as Head).id)).size).toBe(1)
  })

  it('may not carry another request', async () => {
    const key = randomUUID()
    await expectStatus(201, create(key, 'First use'))
    const other = await create(key, 'Second use')
    expect([other.status, other.body.error.code]).toEqual([400, 'invalid-request'])
  })

  it('belongs to its person', async () => {
    const key = randomUUID()
    const mine = await expectStatus<Head>(201, create(key, 'Mine'))
    const theirs = await expectStatus<Head>(201, create(key, 'Theirs', await app.as('engineer2')))
    expect(theirs.id).not.toBe(mine.id)
  })

  it('keeps no refusal: the same key works once the cause is gone', async () => {
    const key = randomUUID()
    await expectStatus(409, create(key, head.name))
    await expectStatus(201, create(key, 'Free name'))
  })

  it('gives the answer of a step again although the state has moved on', async () => {
    const setup = await makeSetup(app, part.id, head.id)
    const send = () =>
      programmer
        .post(`/api/setups/${setup.id}/submit`)
        .set(ifMatch(setup))
        .set('Idempotency-Key', 'submit-' + setup.id)
        .send({ hash: setup.revision.hash })
    const first = await expectStatus<Setup>(200, send())
    expect(await expectStatus<Setup>(200, send())).toEqual(first)
    expect(first.revision.decisions).toHaveLength(1)
  })

  it.each(['short', 'with a space in it', 'ü'.repeat(10), 'x'.repeat(201)])(
    'refuses the key %s',
    async (key) => {
      const { status } = await create(encodeURI(key) === key ? key : 'with spaces', 'Never')
      expect(status).toBe(400)
    },
  )
})
