import type { Express } from 'express'
import type { Services } from '../services.ts'
import { within } from './deadline.ts'

const PING_DEADLINE = 3_000

/** `/livez`: the process answers. `/readyz`: the database does too. */
export function serveHealth(app: Express, { dataSource }: Services): void {
  app.get('/livez', (_req, res) => {
    res.json({ live: true })
  })
  app.get('/readyz', async (_req, res) => {
    try {
      await within(PING_DEADLINE, dataSource.query('SELECT 1'), () => new Error('no answer in time'))
      res.json({ ready: true })
    } catch (error) {
      const code = error instanceof Error && 'code' in error ? String(error.code) : ''
      res
        .status(503)
        .json({ ready: false, reason: code ? `the database is away (${code})` : 'the database is away' })
    }
  })
}
