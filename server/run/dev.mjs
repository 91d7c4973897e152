/**
 * `npm run dev`: the private MariaDB, the server restarted on every change (port 4600), and Vite's page
 * server (port 5173) in front of it. Ctrl-C stops all three.
 */
import { spawn } from 'node:child_process'
import path from 'node:path'
import { ensureDebian, needs } from './debian.mjs'
import { startMariadb } from './mariadb.mjs'
import { ensurePackages } from './packages.mjs'
import { dataDir, root } from './paths.mjs'
import { say } from './say.mjs'

await ensurePackages()
await ensureDebian([needs.mariadb])
const database = await startMariadb(path.join(dataDir, 'mariadb'))
const env = { DEMO: '1', PORT: '4600', ...process.env, DATABASE_URL: database.url('undercant') }

const children = [
  spawn(process.execPath, ['--watch', '--import', 'tsx', 'server/main.ts'], {
    cwd: root,
    env,
    stdio: 'inherit',
  }),
  spawn(process.execPath, ['node_modules/vite/bin/vite.js', '--host', '127.0.0.1'], {
    cwd: root,
    env: { ...env, API_URL: `http://127.0.0.1:${env.PORT}` },
    stdio: 'inherit',
  }),
]
say('development servers are starting')

let stopping = false
async function stop() {
  if (stopping) return
  stopping = true
  for (const child of children) child.kill('SIGTERM')
  await Promise.all(
    children.map((child) => child.exitCode ?? new Promise((done) => child.once('exit', done))),
  )
  await database.stop()
  process.exit(0)
}
process.on('SIGINT', () => void stop())
process.on('SIGTERM', () => void stop())
