import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Head } from '../../shared/api/heads.ts'
import type { User } from '../../shared/api/people.ts'
import { type Agent, expectStatus, ifMatch, makeHead, startApp, type TestApp } from '../support/app.ts'

let app: TestApp
let engineer: Agent
let admin: Agent
beforeAll(async () => {
  app = await startApp('heads')
  engineer = await app.as('engineer')
  admin = await app.as('administrator')
})
afterAll(() => app.close())

describe('heads', () => {
  it('change with the version seen, and a working limit cannot pass the mechanical one', async () => {
    const head = await makeHead(app)
    const path = `/api/heads/${head.id}`
    const tooHigh = { workingLimit: 61, reason: 'hope' }
    const refused = await engineer.put(`${path}/working-limit`).set(ifMatch(head)).send(tooHigh)
    expect([refused.status, refused.body.error.code]).toEqual([400, 'invalid-request'])
    const set = { workingLimit: 50, reason: 'coupons' }
    const limited = await expectStatus<Head>(
      200,
      engineer.put(`${path}/working-limit`).set(ifMatch(head)).send(set),
    )
    expect(limited).toMatchObject({
      version: 2,
      workingLimit: 50,
      workingLimitSet: { by: { id: app.ids.engineer }, reason: 'coupons' },
    })
    const lower = await engineer.patch(path).set(ifMatch(limited)).send({ mechanicalLimit: 45 })
    expect(lower.status).toBe(400)
    expect(await expectStatus<Head>(200, engineer.get(path))).toEqual(limited)
    const stale = await engineer.patch(path).set(ifMatch(head)).send({ mechanicalLimit: 55 })
    expect(stale.body.error.details.current).toEqual(limited)
    await expectStatus(400, engineer.patch(path).set(ifMatch(limited)).send({ workingLimit: 10 }))
    const moved = await expectStatus<Head>(
      200,
      engineer.patch(path).set(ifMatch(limited)).send({ mechanicalLimit: 55 }),
    )
    expect(moved).toMatchObject({ version: 3, mechanicalLimit: 55, workingLimit: 50 })
  })
})

describe('people', () => {
  const someone = {
    email: 'Someone@Test.example',
    name: 'Someone',
    role: 'welder',
    password: 'ebb and flow and ebb',
  }

  it('are added once per address, whatever its case, and never shown with a password', async () => {
    const user = await expectStatus<User>(201, admin.post('/api/users').send(someone))
    expect(user).toMatchObject({ email: 'someone@test.example', disabled: false, version: 1 })
    expect(Object.keys(user).sort()).toEqual([
      'createdAt',
      'disabled',
      'email',
      'id',
      'name',
      'role',
      'version',
    ])
    const again = await admin.post('/api/users').send({ ...someone, email: 'SOMEONE@test.example' })
    expect([again.status, again.body.error.code]).toEqual([409, 'name-taken'])
    const stale = await admin
      .patch(`/api/users/${user.id}`)
      .set(ifMatch({ version: 4 }))
      .send({ name: 'Other' })
    expect(stale.status).toBe(412)
    expect(stale.body.error.details.current).toEqual(user)
    const renamed = await expectStatus<User>(
      200,
      admin.patch(`/api/users/${user.id}`).set(ifMatch(user)).send({ name: 'Other' }),
    )
    expect(renamed).toEqual({ ...user, name: 'Other', version: 2 })
  })

  it('are listed by role and text', async () => {
    type Page = { items: User[]; total: number }
    const welders = await expectStatus<Page>(200, admin.get('/api/users').query({ role: 'welder' }))
    expect(welders.items.every(({ role }) => role === 'welder')).toBe(true)
    const engineers = await expectStatus<Page>(
      200,
      admin.get('/api/users').query({ role: 'engineer', q: 'second' }),
    )
    expect(engineers.items.map(({ name }) => name)).toEqual(['Second Engineer'])
    await expectStatus(400, admin.get('/api/users').query({ role: 'owner' }))
  })

  it('cannot disable themselves nor change their own role', async () => {
    const own = { id: app.ids.administrator, version: 1 }
    for (const change of [{ disabled: true }, { role: 'engineer' }]) {
      const answer = await admin.patch(`/api/users/${own.id}`).set(ifMatch(own)).send(change)
      expect([answer.status, answer.body.error.code]).toEqual([403, 'forbidden'])
    }
    await expectStatus(200, admin.patch(`/api/users/${own.id}`).set(ifMatch(own)).send({ name: 'Renamed' }))
    await expectStatus(200, admin.get('/api/session'))
  })
})
