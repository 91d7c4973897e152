import { existsSync } from 'node:fs'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import type { DataSource } from 'typeorm'
import { type Config, ConfigError, readConfig } from './config.ts'
import { createDataSource, openDatabase } from './db/data-source.ts'
import { isDatabaseAway } from './db/failures.ts'
import { keepHouse } from './db/housekeeping.ts'
import { createFirstAdmin, refuseDemoAccounts } from './features/people/first-people.ts'
import { createApp } from './http/app.ts'
import { createLog, type Logger } from './log.ts'
import { createServices } from './start-services.ts'

/** How long requests in work may take to finish once the server has been told to stop, ms. */
const STOP_PATIENCE = 15_000

/** A database that does not answer is tried for a minute, every second. */
const OPENING_TRIES = 60
const OPENING_WAIT = 1_000

type Close = () => void | Promise<void>

async function main(): Promise<void> {
  const config = readConfig(process.env)
  const log = createLog(config.logLevel)
  const opened: Close[] = []
  stopOnSignal(log, opened)
  const root = projectRoot()
  const dataSource = createDataSource(config.databaseUrl, config.databasePool)
  await openPatiently(dataSource, log)
  opened.push(() => dataSource.destroy())
  const services = createServices(config, log, dataSource, root)
  if (config.demo) {
    const { seedDemo } = await import('./db/seed.ts')
    await seedDemo(services)
  } else {
    if (config.production) await refuseDemoAccounts(services)
    await createFirstAdmin(services)
  }
  opened.push(keepHouse(services))

  const webDir = config.webDir ?? path.join(root, 'dist', 'web')
  const hasWeb = existsSync(path.join(webDir, 'index.html'))
  if (!hasWeb) log.warn('the pages are not built: only the API is served')
  const server = createServer(createApp(services, hasWeb ? webDir : null))
  await listen(server, config)
  opened.push(() => close(server))
  const { port } = server.address() as AddressInfo
  log.info({ port, host: config.host, demo: config.demo }, 'listening')
  process.send?.({ ready: true, port })
}

/** The database may still be starting, after a power cut for example. */
async function openPatiently(dataSource: DataSource, log: Logger): Promise<void> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      await openDatabase(dataSource)
      return
    } catch (error) {
      if (attempt === OPENING_TRIES || !isDatabaseAway(error)) throw error
      log.warn({ attempt }, 'waiting for the database')
      await wait(OPENING_WAIT)
    }
  }
}

/** The nearest folder above with a package.json: sources and build lie at different depths below it. */
function projectRoot(): string {
  let folder = path.dirname(fileURLToPath(import.meta.url))
  while (!existsSync(path.join(folder, 'package.json')) && folder !== path.dirname(folder)) {
    folder = path.dirname(folder)
  }
  return folder
}

async function listen(server: Server, { port, host }: Config): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, resolve)
  })
}

/** Takes no new requests, answers those accepted, then closes. */
async function close(server: Server): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()))
  const timer = setTimeout(() => server.closeAllConnections(), STOP_PATIENCE)
  await closed
  clearTimeout(timer)
}

/** From the first moment on: whatever is open by then is closed, the last opened first. */
function stopOnSignal(log: Logger, opened: readonly Close[]): void {
  let stopping = false
  const stop = async () => {
    for (const close of opened.toReversed()) await close()
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.on(signal, () => {
      if (stopping) return
      stopping = true
      log.info({ signal }, 'stopping')
      stop().then(
        () => {
          log.info('stopped')
          process.exit(0)
        },
        (error: unknown) => {
          log.error({ err: error }, 'could not stop cleanly')
          process.exit(1)
        },
      )
    })
  }
}

main().catch((error: unknown) => {
  const text =
    error instanceof ConfigError ? error.message : error instanceof Error ? error.stack : String(error)
  process.stderr.write(`${text}\n`)
  process.exit(1)
})
