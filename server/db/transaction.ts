import { setTimeout as wait } from 'node:timers/promises'
import type { DataSource, EntityManager } from 'typeorm'
import { isTransient } from './failures.ts'

const TRIES = 5
const FIRST_WAIT = 10

/**
 * Runs the work in one transaction, and all of it again when the database says that rows moved or locks
 * crossed. The work must use only the manager it is given and must bear being run more than once.
 */
export async function inTransaction<T>(
  dataSource: DataSource,
  work: (manager: EntityManager) => Promise<T>,
): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await dataSource.transaction(work)
    } catch (error) {
      if (attempt === TRIES || !isTransient(error)) throw error
      await wait(FIRST_WAIT * 2 ** attempt * Math.random())
    }
  }
}
