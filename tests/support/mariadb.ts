import path from 'node:path'
import { ensureDebian, needs } from '../../server/run/debian.mjs'
import { startMariadb } from '../../server/run/mariadb.mjs'
import { dataDir } from '../../server/run/paths.mjs'

/**
 * A real MariaDB for the suites that need one. Each run has its own directory, so that two runs in one
 * checkout do not meet. `UNDERCANT_TEST_DATABASE` is the address of its `undercant` database; the account may
 * create any database whose name starts with `undercant`.
 */
export async function setup(): Promise<() => Promise<void>> {
  if (process.env.UNDERCANT_TEST_DATABASE) return async () => {}
  await ensureDebian([needs.mariadb])
  const database = await startMariadb(path.join(dataDir, `test-mariadb-${process.pid}`))
  process.env.UNDERCANT_TEST_DATABASE = database.url('undercant')
  return async () => {
    await database.stop()
    delete process.env.UNDERCANT_TEST_DATABASE
    const { rm } = await import('node:fs/promises')
    await rm(path.join(dataDir, `test-mariadb-${process.pid}`), { recursive: true, force: true })
  }
}
