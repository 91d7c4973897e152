import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { Session } from '../../server/db/entities/session.ts'
import { SESSION_IDLE } from '../../server/http/session-store.ts'
import { emailOf, expectStatus, ifMatch, PASSWORD, signIn, startApp, type TestApp } from '../support/app.ts'

let app: TestApp
beforeAll(async () => {
  app = await startApp('sign_in')
})
afterAll(() => app.close())

const credentials = { email: emailOf('welder'), password: PASSWORD }
const cookieOf = (answer: { headers: Record<string, unknown> }) => String(answer.headers['set-cookie'] ?? '')

describe('signing in', () => {
  it('gives a cookie that scripts and other sites cannot use', async () => {
    const answer = await app.anyone().post('/api/session').send(credentials)
    expect(answer.status).toBe(200)
    expect(answer.body).toEqual({
      user: { id: app.ids.welder, email: credentials.email, name: 'Test Welder', role: 'welder' },
    })
    const cookie = cookieOf(answer)
    expect(cookie).toMatch(/^undercant=s%3A/)
    expect(cookie).toContain('HttpOnly')
    expect(cookie).toContain('SameSite=Lax')
    expect(cookie).toContain('Path=/')
    expect(cookie).not.toContain('Domain')
    expect(cookie).not.toContain('Secure')
  })

  it('marks the cookie Secure behind a proxy that is trusted and speaks TLS', async () => {
    const behind = await startApp('proxy', { config: { trustProxy: 1 } })
    try {
      const answer = await behind
        .anyone()
        .post('/api/session')
        .set('X-Forwarded-Proto', 'https')
        .send(credentials)
      expect(cookieOf(answer)).toContain('Secure')
    } finally {
      await behind.close()
    }
  })

  it('starts a new session each time: an id known beforehand is worth nothing', async () => {
    const first = await app.anyone().post('/api/session').send(credentials)
    const known = cookieOf(first).split(';')[0] ?? ''
    const second = await app.anyone().post('/api/session').set('Cookie', known).send(credentials)
    expect(cookieOf(second).split(';')[0]).not.toBe(known)
    const planted = 'undercant=s%3Aplanted.AAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAA'
    const third = await app.anyone().post('/api/session').set('Cookie', planted).send(credentials)
    expect(cookieOf(third)).not.toContain('planted')
    // The session that was replaced is gone, too.
    await expectStatus(401, app.anyone().get('/api/session').set('Cookie', known))
  })

  it('says the same to someone unknown, a wrong password and a disabled account', async () => {
    const disabled = { email: 'disabled@test.example', name: 'Gone', role: 'welder', password: PASSWORD }
    const admin = await app.as('administrator')
    const user = await expectStatus<{ id: string; version: number }>(
      201,
      admin.post('/api/users').send(disabled),
    )
    await expectStatus(200, admin.patch(`/api/users/${user.id}`).set(ifMatch(user)).send({ disabled: true }))
    const answers = []
    for (const body of [
      { email: 'nobody@test.example', password: PASSWORD },
      { email: credentials.email, password: 'not the password' },
      { email: disabled.email, password: PASSWORD },
    ]) {
      const { status, body: answer } = await app.anyone().post('/api/session').send(body)
      answers.push({ status, code: answer.error.code, message: answer.error.message })
    }
    expect(answers[0]).toMatchObject({ status: 401, code: 'wrong-sign-in' })
    expect(answers[1]).toEqual(answers[0])
    expect(answers[2]).toEqual(answers[0])
  })

  it('ignores the case of the address and keeps the password as typed', async () => {
    const shouted = { email: credentials.email.toUpperCase(), password: PASSWORD }
    await expectStatus(200, app.anyone().post('/api/session').send(shouted))
    const padded = { email: credentials.email, password: `${PASSWORD} ` }
    await expectStatus(401, app.anyone().post('/api/session').send(padded))
  })

  it('writes no session for a visitor who is not signed in', async () => {
    const sessions = app.services.dataSource.getRepository(Session)
    const before = await sessions.count()
    const { headers } = await app.anyone().get('/api/about')
    expect(headers['set-cookie']).toBeUndefined()
    expect(await sessions.count()).toBe(before)
  })
})

describe('throttling', () => {
  it('makes an account wait after ten failures, even with the right password, whatever the server', async () => {
    const wrong = { email: emailOf('programmer2'), password: 'guess after guess' }
    for (let i = 0; i < 10; i += 1) await expectStatus(401, app.anyone().post('/api/session').send(wrong))
    const answer = await app
      .anyone()
      .post('/api/session')
      .send({ ...wrong, password: PASSWORD })
    expect(answer.status).toBe(429)
    expect(answer.body.error.code).toBe('too-many-attempts')
    const wait = Number(answer.headers['retry-after'])
    expect(wait).toBeGreaterThan(0)
    expect(wait).toBeLessThanOrEqual(900)
    // It is kept in the database, so another person and address are not hindered, and a restart forgets nothing.
    const counted = await app.services.dataSource.query('SELECT MAX(failures) AS most FROM sign_in_attempts')
    expect(Number(counted[0].most)).toBeGreaterThanOrEqual(10)
  })

  it('lets no burst of guesses slip through at once', async () => {
    const wrong = { email: emailOf('engineer2'), password: 'many at once' }
    const answers = await Promise.all(
      Array.from({ length: 30 }, () => app.anyone().post('/api/session').send(wrong)),
    )
    expect(answers.filter(({ status }) => status === 401)).toHaveLength(10)
    expect(answers.filter(({ status }) => status === 429)).toHaveLength(20)
  })

  it('makes an address wait that tries many accounts', async () => {
    const other = await startApp('spray')
    try {
      const statuses = []
      for (let i = 0; i < 62; i += 1) {
        const body = { email: `nobody${i}@test.example`, password: 'spring-tide' }
        statuses.push((await other.anyone().post('/api/session').send(body)).status)
      }
      expect(statuses.slice(0, 60).every((status) => status === 401)).toBe(true)
      // Adding six people to the app does not count; the sixty-first attempt does.
      expect(statuses.slice(60)).toEqual([429, 429])
    } finally {
      await other.close()
    }
  })
})

describe('a session', () => {
  it('ends for good when its owner signs out', async () => {
    const answer = await app.anyone().post('/api/session').send(credentials)
    const cookie = cookieOf(answer).split(';')[0] ?? ''
    await expectStatus(200, app.anyone().get('/api/session').set('Cookie', cookie))
    const out = await app.anyone().delete('/api/session').set('Cookie', cookie)
    expect(out.status).toBe(204)
    expect(cookieOf(out)).toMatch(/undercant=;.*Expires=Thu, 01 Jan 1970/)
    await expectStatus(401, app.anyone().get('/api/session').set('Cookie', cookie))
  })

  it('ends at once when its owner is disabled, and an old one stays dead when enabled again', async () => {
    const admin = await app.as('administrator')
    const body = { email: 'short@test.example', name: 'Short Stay', role: 'engineer', password: PASSWORD }
    const user = await expectStatus<{ id: string; version: number }>(201, admin.post('/api/users').send(body))
    const agent = await signIn(app.server, body.email)
    await expectStatus(200, agent.get('/api/audit'))
    const path = `/api/users/${user.id}`
    const off = await expectStatus<{ version: number }>(
      200,
      admin.patch(path).set(ifMatch(user)).send({ disabled: true }),
    )
    await expectStatus(401, agent.get('/api/audit'))
    const on = await expectStatus<{ version: number }>(
      200,
      admin.patch(path).set(ifMatch(off)).send({ disabled: false }),
    )
    await expectStatus(401, agent.get('/api/audit'))
    const again = await signIn(app.server, body.email)
    await expectStatus(200, again.get('/api/audit'))
    // A change of role acts on the next request, too.
    await expectStatus(200, admin.patch(path).set(ifMatch(on)).send({ role: 'welder' }))
    await expectStatus(401, again.get('/api/audit'))
  })

  it('ends when it was idle too long, and at its absolute limit', async () => {
    const { dataSource } = app.services
    const agent = await signIn(app.server, emailOf('welder'))
    const { items } = await expectStatus<{ items: { id: string; current: boolean }[] }>(
      200,
      agent.get('/api/sessions'),
    )
    const own = items.find((item) => item.current)
    expect(own).toBeDefined()
    const idle = new Date(Date.now() - SESSION_IDLE - 1000)
    await dataSource.getRepository(Session).update({ id: own?.id ?? '' }, { seenAt: idle })
    await expectStatus(401, agent.get('/api/session'))
    await dataSource.getRepository(Session).update({ id: own?.id ?? '' }, { seenAt: new Date() })
    await expectStatus(200, agent.get('/api/session'))
    await dataSource
      .getRepository(Session)
      .update({ id: own?.id ?? '' }, { expiresAt: new Date(Date.now() - 1) })
    await expectStatus(401, agent.get('/api/session'))
  })

  it('is written at sign-in and not by ordinary requests', async () => {
    const agent = await signIn(app.server, emailOf('welder'))
    const { items } = await expectStatus<{ items: { id: string; current: boolean }[] }>(
      200,
      agent.get('/api/sessions'),
    )
    const id = items.find((item) => item.current)?.id ?? ''
    const sessions = app.services.dataSource.getRepository(Session)
    const before = await sessions.findOneByOrFail({ id })
    for (let i = 0; i < 3; i += 1) await expectStatus(200, agent.get('/api/parts'))
    expect(await sessions.findOneByOrFail({ id })).toEqual(before)
    await sessions.update({ id }, { seenAt: new Date(Date.now() - 10 * 60_000) })
    await expectStatus(200, agent.get('/api/parts'))
    const after = await sessions.findOneByOrFail({ id })
    expect(after.seenAt.getTime()).toBeGreaterThan(Date.now() - 60_000)
  })

  it('can be seen and ended by its owner, and by nobody else', async () => {
    const one = await signIn(app.server, emailOf('welder'))
    const two = await signIn(app.server, emailOf('welder'))
    const { items } = await expectStatus<{ items: { id: string; current: boolean }[] }>(
      200,
      two.get('/api/sessions'),
    )
    const own = items.find((item) => item.current)?.id ?? ''
    const stranger = await app.as('engineer')
    await expectStatus(404, stranger.delete(`/api/sessions/${own}`))
    await expectStatus(200, two.get('/api/session'))
    await expectStatus(204, one.delete(`/api/sessions/${own}`))
    await expectStatus(401, two.get('/api/session'))
    await expectStatus(200, one.get('/api/session'))
  })

  it('a new password ends the others; the old one opens nothing', async () => {
    const admin = await app.as('administrator')
    const body = { email: 'mover@test.example', name: 'Mover', role: 'welder', password: PASSWORD }
    await expectStatus(201, admin.post('/api/users').send(body))
    const here = await signIn(app.server, body.email)
    const there = await signIn(app.server, body.email)
    const next = 'a quiet slack water'
    const wrong = await here.post('/api/session/password').send({ current: 'wrong one', next })
    expect(wrong.body.error.code).toBe('wrong-password')
    await expectStatus(204, here.post('/api/session/password').send({ current: PASSWORD, next }))
    await expectStatus(200, here.get('/api/session'))
    await expectStatus(401, there.get('/api/session'))
    await expectStatus(401, app.anyone().post('/api/session').send({ email: body.email, password: PASSWORD }))
    await signIn(app.server, body.email, next)
  })
})

describe('passwords', () => {
  it.each(['password123', 'aaaaaaaaaa', 'bollard@test.example', 'QWERTYUIOP'])(
    'refuses %s',
    async (password) => {
      const admin = await app.as('administrator')
      const body = { email: 'bollard@test.example', name: 'Bollard', role: 'welder', password }
      const answer = await admin.post('/api/users').send(body)
      expect(answer.status).toBe(400)
      expect(answer.body.error.details).toEqual({ field: 'password' })
    },
  )

  it('are stored as argon2id and never shown', async () => {
    const admin = await app.as('administrator')
    const { text } = await admin.get('/api/users')
    expect(text).not.toContain('argon2')
    const rows = await app.services.dataSource.query('SELECT password_hash FROM users')
    expect(rows.length).toBeGreaterThan(5)
    for (const row of rows) expect(row.password_hash).toMatch(/^\$argon2id\$v=19\$m=8,t=1,p=1\$/)
  })

  it('are hashed anew at sign-in when the parameters have grown', async () => {
    const { dataSource } = app.services
    const stronger = await startApp('rehash', {
      config: { passwordCost: { memoryCost: 16, timeCost: 2, parallelism: 1 } },
    })
    try {
      const [old] = await dataSource.query('SELECT password_hash FROM users WHERE id = ?', [app.ids.welder])
      await stronger.services.dataSource.query('UPDATE users SET password_hash = ? WHERE id = ?', [
        old.password_hash,
        stronger.ids.welder,
      ])
      await signIn(stronger.server, emailOf('welder'))
      const [now] = await stronger.services.dataSource.query('SELECT password_hash FROM users WHERE id = ?', [
        stronger.ids.welder,
      ])
      expect(now.password_hash).toMatch(/^\$argon2id\$v=19\$m=16,t=2,p=1\$/)
      await signIn(stronger.server, emailOf('welder'))
    } finally {
      await stronger.close()
    }
  })
})
