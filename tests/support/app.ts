import { randomUUID } from 'node:crypto'
import { createServer, type Server } from 'node:http'
import request from 'supertest'
import type TestAgent from 'supertest/lib/agent.js'
import type { Role } from '../../shared/api/common.ts'
import type { Head } from '../../shared/api/heads.ts'
import type { Part } from '../../shared/api/parts.ts'
import type { SaveSetup, Setup } from '../../shared/api/setups.ts'
import { type Config, LIMITS } from '../../server/config.ts'
import { createDataSource, openDatabase } from '../../server/db/data-source.ts'
import { addPerson } from '../../server/features/people/first-people.ts'
import { createApp } from '../../server/http/app.ts'
import { createLog } from '../../server/log.ts'
import type { Services } from '../../server/services.ts'
import { createServices } from '../../server/start-services.ts'
import { freshDatabase } from './databases.ts'
import { plateDxf } from './plate.ts'

/** The password of everyone in tests. */
export const PASSWORD = 'low-tide-at-noon'

export type Agent = TestAgent

/** Everyone in tests; engineers come in two, since nobody approves what they submitted. */
const people = {
  programmer: { name: 'Test Programmer', role: 'programmer' },
  programmer2: { name: 'Second Programmer', role: 'programmer' },
  engineer: { name: 'Test Engineer', role: 'engineer' },
  engineer2: { name: 'Second Engineer', role: 'engineer' },
  welder: { name: 'Test Welder', role: 'welder' },
  administrator: { name: 'Test Administrator', role: 'administrator' },
} as const satisfies Record<string, { name: string; role: Role }>

export type Who = keyof typeof people

export const emailOf = (who: Who) => `${who}@test.example`

export interface TestApp {
  readonly server: Server
  readonly services: Services
  readonly ids: Readonly<Record<Who, string>>
  /** Address of the app's own database. */
  readonly databaseUrl: string
  /** Not signed in. */
  readonly anyone: () => Agent
  /** Signed in, one session per person, made at the first call. */
  readonly as: (who: Who) => Promise<Agent>
  readonly close: () => Promise<void>
}

/** Passwords cost next to nothing here: what is tested is who may do what, not argon2. */
const CHEAP = { memoryCost: 8, timeCost: 1, parallelism: 1 }

export function testConfig(databaseUrl: string): Config {
  return {
    port: 0,
    host: '127.0.0.1',
    databaseUrl,
    databasePool: 8,
    demo: false,
    production: false,
    sessionSecret: randomUUID(),
    logLevel: 'silent',
    trustProxy: 0,
    webDir: undefined,
    minFreeDiskBytes: 0,
    firstAdmin: undefined,
    passwordCost: CHEAP,
    checkAnswers: true,
    ...LIMITS,
  }
}

export interface AppOptions {
  readonly config?: Partial<Config>
  readonly services?: Partial<Services>
  /** Address to reach the database by, when it is not its own (a proxy, for example). */
  readonly reach?: (url: string) => string
}

/** The whole application on a fresh, migrated database with one or two people per role. */
export async function startApp(label: string, options: AppOptions = {}): Promise<TestApp> {
  const database = await freshDatabase(label)
  const config = { ...testConfig(options.reach?.(database.url) ?? database.url), ...options.config }
  const dataSource = createDataSource(config.databaseUrl, config.databasePool)
  await openDatabase(dataSource)
  const services: Services = {
    ...createServices(config, createLog(config.logLevel), dataSource, process.cwd()),
    ...options.services,
  }
  const ids = {} as Record<Who, string>
  for (const [who, { name, role }] of Object.entries(people) as [Who, (typeof people)[Who]][]) {
    ids[who] = await addPerson(services, { email: emailOf(who), name, role }, PASSWORD)
  }
  const server = createServer(createApp(services, null))
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const agents = new Map<Who, Promise<Agent>>()
  return {
    server,
    services,
    ids,
    databaseUrl: database.url,
    anyone: () => request.agent(server),
    as: (who) => {
      const known = agents.get(who) ?? signIn(server, emailOf(who))
      agents.set(who, known)
      return known
    },
    close: async () => {
      server.closeAllConnections()
      await new Promise<void>((resolve) => server.close(() => resolve()))
      if (dataSource.isInitialized) await dataSource.destroy()
      await database.drop()
    },
  }
}

/** A new session for someone. */
export async function signIn(server: Server, email: string, password = PASSWORD): Promise<Agent> {
  const agent = request.agent(server)
  const { status, text } = await agent.post('/api/session').send({ email, password })
  if (status !== 200) throw new Error(`signing in answered ${status}: ${text}`)
  return agent
}

export const ifMatch = (row: { version: number }) => ({ 'If-Match': `"${row.version}"` })

/** A body of an answer that must have this status; the text is in the message when it has not. */
export async function expectStatus<T>(
  status: number,
  answer: PromiseLike<{ status: number; text: string; body: unknown }>,
): Promise<T> {
  const { status: seen, text, body } = await answer
  if (seen !== status) throw new Error(`expected ${status}, got ${seen}: ${text}`)
  return body as T
}

let made = 0

export async function makeHead(app: TestApp): Promise<Head> {
  made += 1
  const jet = { kerf: 1, taper: 0.5, standoff: 3, nozzleDiameter: 7 }
  const body = { name: `Head ${made}`, kind: 'turning', mechanicalLimit: 60, jet }
  const agent = await app.as('engineer')
  return expectStatus(201, agent.post('/api/heads').send(body))
}

/** A part of 200 × 100 mm with a hole of 30 mm, through upload and reading. */
export async function makePart(app: TestApp): Promise<Part> {
  made += 1
  const agent = await app.as('programmer')
  const upload = agent.post('/api/drawings').attach('file', Buffer.from(plateDxf()), 'plate.dxf')
  const { drawing } = await expectStatus<{ drawing: { id: string } }>(201, upload)
  const body = { drawingId: drawing.id, reading: {}, pick: 0, number: `T-${made}`, name: 'Test plate' }
  return expectStatus(201, agent.post('/api/parts').send(body))
}

export async function makeSetup(
  app: TestApp,
  partId: string,
  headId: string,
  who: Who = 'programmer',
): Promise<Setup> {
  made += 1
  const agent = await app.as(who)
  const body = { partId, headId, name: `Set-up ${made}`, plate: { material: 'S355', thickness: 20 } }
  return expectStatus(201, agent.post('/api/setups').send(body))
}

/** What a page would send to save this set-up with a tilt on its first edge. */
export function saveBody(setup: Setup, tilt: number): SaveSetup {
  const { head, plate, jet, datum, joints, note } = setup.revision.content
  const walls = tilt === 0 ? [] : [{ loop: 0, edge: 0, facets: [{ depth: plate.thickness, tilt }] }]
  return { name: setup.name, headId: head.id, plate, jet, datum, joints, note, walls }
}
