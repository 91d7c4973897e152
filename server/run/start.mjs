/**
 * `npm start`: from a fresh clone to a running product. Installs what is missing, starts a private MariaDB
 * (or uses DATABASE_URL), builds, and runs the server, which migrates and seeds. Ctrl-C and SIGTERM stop
 * the server first and then the database.
 */
import { spawn } from 'node:child_process'
import path from 'node:path'
import { ensureBuild } from './build.mjs'
import { ensureDebian, needs } from './debian.mjs'
import { releaseLock, takeLock } from './lock.mjs'
import { startMariadb } from './mariadb.mjs'
import { ensurePackages } from './packages.mjs'
import { dataDir, root } from './paths.mjs'
import { freePort, isFree } from './ports.mjs'
import { waitUntilGone } from './processes.mjs'
import { say, StartError } from './say.mjs'

const DEFAULT_PORT = 4600
const STOP_SERVER_MS = 20_000

/** @type {import('node:child_process').ChildProcess | undefined} */
let server
/** @type {import('./mariadb.mjs').Mariadb | undefined} */
let database
let stopping = false

process.on('SIGINT', () => void stop(0))
process.on('SIGTERM', () => void stop(0))
process.on('SIGHUP', () => void stop(0))

try {
  takeLock()
  await start()
} catch (error) {
  if (!stopping) {
    process.stderr.write(
      `\n${error instanceof StartError ? error.message : /** @type {Error} */ (error).stack}\n`,
    )
    await stop(1)
  }
}

async function start() {
  await ensurePackages()
  const url = process.env.DATABASE_URL ?? (await startOwnDatabase())
  await ensureBuild()
  if (stopping) return
  const port = await choosePort()
  say('migrating, seeding the demo, starting the server')
  server = spawn(process.execPath, ['--enable-source-maps', path.join(root, 'dist/server/server/main.js')], {
    cwd: root,
    env: { DEMO: '1', NODE_ENV: 'production', ...process.env, PORT: String(port), DATABASE_URL: url },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
    detached: true, // Ctrl-C reaches this process alone, which stops the server in order
  })
  server.once('exit', (code, signal) => {
    if (stopping) return
    process.stderr.write(`\nThe server ended by itself (${signal ?? code}).\n`)
    void stop(1)
  })
  server.on('message', (message) => {
    if (typeof message === 'object' && message && 'ready' in message) announce(port)
  })
}

async function startOwnDatabase() {
  await ensureDebian([needs.mariadb])
  say('starting MariaDB on loopback')
  database = await startMariadb(path.join(dataDir, 'mariadb'))
  return database.url('undercant')
}

/** PORT as given, else the default or the next free one, so that two checkouts can run side by side. */
async function choosePort() {
  if (process.env.PORT === undefined) return freePort(DEFAULT_PORT)
  const port = Number(process.env.PORT)
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new StartError(`PORT must be a whole number from 1 to 65535, not "${process.env.PORT}".`)
  }
  if (!(await isFree(port))) throw new StartError(`Port ${port} is taken. Set PORT to another one.`)
  return port
}

/** @param {number} port */
function announce(port) {
  say('ready')
  process.stdout.write(`\n  Undercant   http://127.0.0.1:${port}\n\n`)
  if ((process.env.DEMO ?? '1') === '1') {
    process.stdout.write(
      ['programmer', 'engineer', 'welder', 'admin']
        .map((name) => `  ${`${name}@saltmarsh.example`.padEnd(30)} tidal-footbridge\n`)
        .join('') + '\n',
    )
  }
  process.stdout.write('  Ctrl-C stops it.\n\n')
}

/** @param {number} code */
async function stop(code) {
  if (stopping) return
  stopping = true
  say('stopping')
  const pid = server?.pid
  if (pid !== undefined && server?.exitCode === null && server.signalCode === null) {
    server.kill('SIGTERM')
    if (!(await waitUntilGone(pid, STOP_SERVER_MS))) server.kill('SIGKILL')
  }
  try {
    await database?.stop()
  } catch (error) {
    process.stderr.write(`${/** @type {Error} */ (error).message}\n`)
    code = 1
  }
  releaseLock()
  process.exit(code)
}
