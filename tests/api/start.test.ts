import { type ChildProcess, spawn } from 'node:child_process'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { readConfig } from '../../server/config.ts'
import { freshDatabase } from '../support/databases.ts'
import { startProxy } from '../support/proxy.ts'

/** The server as a process: how it starts, refuses to start, and stops. */

const root = path.resolve(import.meta.dirname, '../..')

interface Started {
  readonly child: ChildProcess
  /** Resolves with the port, or with what was written to standard error when the process ended instead. */
  readonly ready: Promise<{ port: number } | { ended: number | null; error: string }>
  readonly ended: Promise<number | null>
  readonly output: () => string
}

function start(environment: Record<string, string>): Started {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: root,
    env: { PATH: process.env.PATH, PORT: '0', WEB_DIR: '/nowhere', ...environment },
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  })
  let output = ''
  let error = ''
  child.stdout?.on('data', (text: Buffer) => (output += text.toString()))
  child.stderr?.on('data', (text: Buffer) => (error += text.toString()))
  const ended = new Promise<number | null>((resolve) => child.once('close', (code) => resolve(code)))
  const port = new Promise<{ port: number }>((resolve) => {
    child.on('message', (message) => resolve({ port: (message as { port: number }).port }))
  })
  return {
    child,
    ready: Promise.race([port, ended.then((code) => ({ ended: code, error }))]),
    ended,
    output: () => output,
  }
}

let database: { url: string; drop: () => Promise<void> }
const running: Started[] = []
beforeEach(async () => {
  database = await freshDatabase('start')
})
afterEach(async () => {
  for (const { child, ended } of running.splice(0)) {
    child.kill('SIGKILL')
    await ended
  }
  await database.drop()
})

async function serve(environment: Record<string, string>): Promise<{ started: Started; base: string }> {
  const started = start({ DATABASE_URL: database.url, ...environment })
  running.push(started)
  const ready = await started.ready
  if (!('port' in ready)) throw new Error(ready.error)
  return { started, base: `http://127.0.0.1:${ready.port}` }
}

async function refusal(environment: Record<string, string>): Promise<string> {
  const started = start({ DATABASE_URL: database.url, ...environment })
  running.push(started)
  const ready = await started.ready
  if ('port' in ready) throw new Error('the server started')
  expect(ready.ended).toBe(1)
  return ready.error
}

async function signIn(base: string, email: string, password: string): Promise<number> {
  const headers = { 'Content-Type': 'application/json' }
  const response = await fetch(`${base}/api/session`, {
    method: 'POST',
    headers,
    body: JSON.stringify({ email, password }),
  })
  return response.status
}

const SECRET = 'f3Zq8vW1s0mB6yR4tK9uX2cL7nP5dJ'.repeat(2)

describe('a demo', () => {
  it(
    'starts on an empty database, signs its people in, says so, and stops when told',
    { timeout: 120_000 },
    async () => {
      const { started, base } = await serve({ DEMO: '1' })
      const about = await fetch(`${base}/api/about`)
      const { demo, demoAccounts } = (await about.json()) as {
        demo: boolean
        demoAccounts: { email: string; role: string }[]
      }
      expect(demo).toBe(true)
      expect(demoAccounts.map(({ role }) => role).sort()).toEqual([
        'administrator',
        'engineer',
        'programmer',
        'welder',
      ])
      for (const { email } of demoAccounts) expect(await signIn(base, email, 'tidal-footbridge')).toBe(200)
      expect((await fetch(`${base}/readyz`)).status).toBe(200)
      started.child.kill('SIGTERM')
      expect(await started.ended).toBe(0)
      const lines = started
        .output()
        .trim()
        .split('\n')
        .map((line) => JSON.parse(line) as Record<string, unknown>)
      expect(lines.map(({ msg }) => msg)).toEqual(expect.arrayContaining(['listening', 'request', 'stopped']))
      expect(lines.find(({ route }) => route === 'signIn')).toMatchObject({ method: 'POST', status: 200 })
      expect(started.output()).not.toMatch(/tidal-footbridge|undercant=s|argon2/)

      // The second start finds everything there, and a real installation refuses these accounts.
      const again = await serve({ DEMO: '1' })
      expect(await signIn(again.base, demoAccounts[0]?.email ?? '', 'tidal-footbridge')).toBe(200)
      again.started.child.kill('SIGINT')
      expect(await again.started.ended).toBe(0)
      expect(await refusal({ NODE_ENV: 'production', SESSION_SECRET: SECRET })).toContain('demo accounts')
    },
  )
})

describe('a real installation', () => {
  it('has no demo accounts and starts with an administrator of its own', { timeout: 120_000 }, async () => {
    const { base } = await serve({
      NODE_ENV: 'production',
      SESSION_SECRET: SECRET,
      FIRST_ADMIN_EMAIL: 'owner@yard.example',
      FIRST_ADMIN_PASSWORD: 'a first long password',
    })
    expect(await (await fetch(`${base}/api/about`)).json()).toEqual({
      name: 'Undercant',
      demo: false,
      demoAccounts: [],
    })
    expect(await signIn(base, 'programmer@saltmarsh.example', 'tidal-footbridge')).toBe(401)
    expect(await signIn(base, 'owner@yard.example', 'a first long password')).toBe(200)
  })

  it('answers what it accepted before it stops', { timeout: 120_000 }, async () => {
    const [email, password] = ['owner@yard.example', 'a first long password']
    const { started, base } = await serve({ FIRST_ADMIN_EMAIL: email, FIRST_ADMIN_PASSWORD: password })
    const requests = Array.from({ length: 40 }, () => signIn(base, email, password))
    await new Promise((resolve) => setTimeout(resolve, 150))
    started.child.kill('SIGTERM')
    const outcomes = await Promise.allSettled(requests)
    expect(await started.ended).toBe(0)
    const answered = outcomes.flatMap((outcome) => (outcome.status === 'fulfilled' ? [outcome.value] : []))
    expect(answered.length).toBeGreaterThan(0)
    expect(answered.every((status) => [200, 429, 503].includes(status))).toBe(true)
    // A request that was not answered was not accepted either: each answer has its line in the log.
    const lines = started
      .output()
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line) as Record<string, unknown>)
    expect(lines.filter(({ status }) => status === 'aborted')).toEqual([])
  })

  it('does not start without what it needs, and says what that is', { timeout: 120_000 }, async () => {
    expect(await refusal({ DATABASE_URL: 'postgres://x' })).toContain('DATABASE_URL must look like')
  })

  it('waits for a database that is not there yet', { timeout: 120_000 }, async () => {
    const { port } = new URL(database.url)
    const proxy = await startProxy(Number(port))
    proxy.cut()
    const url = new URL(database.url)
    url.port = String(proxy.port)
    const started = start({ DATABASE_URL: url.toString() })
    running.push(started)
    while (!started.output().includes('waiting for the database'))
      await new Promise((resolve) => setTimeout(resolve, 50))
    proxy.open()
    expect(await started.ready).toHaveProperty('port')
    started.child.kill('SIGTERM')
    expect(await started.ended).toBe(0)
    await proxy.close()
  })
})

describe('the configuration', () => {
  const base = { DATABASE_URL: 'mysql://u:p@127.0.0.1:3306/undercant' }
  const real = { ...base, NODE_ENV: 'production' }

  it('refuses a secret that is missing, short or a default in a real installation', () => {
    for (const secret of [
      undefined,
      'short',
      'changeme-changeme-changeme-changeme',
      `secret${'x'.repeat(40)}`,
    ]) {
      expect(() => readConfig({ ...real, SESSION_SECRET: secret })).toThrow(/SESSION_SECRET/)
    }
    expect(readConfig({ ...real, SESSION_SECRET: SECRET }).sessionSecret).toBe(SECRET)
  })

  it('makes a secret of its own for a demo, another each time', () => {
    const one = readConfig({ ...real, DEMO: '1' }).sessionSecret
    expect(one.length).toBeGreaterThan(40)
    expect(readConfig({ ...real, DEMO: '1' }).sessionSecret).not.toBe(one)
  })

  it('names every value that is not usable', () => {
    expect(() => readConfig({ PORT: 'x', DEMO: 'yes', DATABASE_POOL: '0' })).toThrow(
      /PORT[\s\S]*DATABASE_URL[\s\S]*DATABASE_POOL[\s\S]*DEMO/,
    )
  })

  it('costs a password 19 MiB and two passes, as OWASP asks', () => {
    expect(readConfig(base).passwordCost).toEqual({ memoryCost: 19 * 1024, timeCost: 2, parallelism: 1 })
  })

  it('stops in order while it still waits for its database', { timeout: 120_000 }, async () => {
    const nobody = new URL(database.url)
    nobody.port = '1'
    const started = start({ DATABASE_URL: nobody.toString() })
    running.push(started)
    while (!started.output().includes('waiting for the database'))
      await new Promise((resolve) => setTimeout(resolve, 50))
    started.child.kill('SIGTERM')
    expect(await started.ended).toBe(0)
  })
})
