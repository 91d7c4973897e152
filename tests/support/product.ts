import { spawn } from 'node:child_process'
import path from 'node:path'
import type { TestProject } from 'vitest/node'
import { ensureBuild } from '../../server/run/build.mjs'
import { ensureDebian, needs } from '../../server/run/debian.mjs'
import { root } from '../../server/run/paths.mjs'
import { freshDatabase } from './databases.ts'

declare module 'vitest' {
  interface ProvidedContext {
    /** Address of the built product with its demo. */
    baseUrl: string
  }
}

const READY_MS = 120_000

/** The product as built, with its demo, on a fresh database and a free port; the browser suite visits it. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  await ensureDebian([needs.chromium])
  await ensureBuild()
  const database = await freshDatabase('browser')
  const server = spawn(process.execPath, [path.join(root, 'dist/server/server/main.js')], {
    cwd: root,
    env: {
      ...process.env,
      NODE_ENV: 'production',
      DEMO: '1',
      PORT: '0',
      LOG_LEVEL: 'warn',
      DATABASE_URL: database.url,
    },
    stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
  })
  const gone = new Promise<void>((resolve) => server.once('exit', () => resolve()))
  const port = await new Promise<number>((resolve, reject) => {
    const timer = setTimeout(() => reject(new Error('the server was not ready in time')), READY_MS)
    server.once('exit', (code) => reject(new Error(`the server ended with ${code} before it was ready`)))
    server.on('message', (message) => {
      if (typeof message !== 'object' || message === null || !('port' in message)) return
      clearTimeout(timer)
      resolve(Number(message.port))
    })
  })
  project.provide('baseUrl', `http://127.0.0.1:${port}`)
  return async () => {
    server.kill('SIGTERM')
    await gone
    await database.drop()
  }
}
