import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import type { DataSource } from 'typeorm'
import { createDataSource, openDatabase } from '../../server/db/data-source.ts'
import { freshDatabase } from '../support/databases.ts'

let database: { url: string; drop: () => Promise<void> }
let dataSource: DataSource
beforeEach(async () => {
  database = await freshDatabase('migrations')
  dataSource = createDataSource(database.url, 2)
})
afterEach(async () => {
  await dataSource.destroy()
  await database.drop()
})

async function shape(): Promise<unknown> {
  const columns: unknown = await dataSource.query(
    `SELECT TABLE_NAME, COLUMN_NAME, COLUMN_TYPE, IS_NULLABLE, COLLATION_NAME FROM information_schema.COLUMNS
     WHERE TABLE_SCHEMA = DATABASE() AND TABLE_NAME <> 'migrations' ORDER BY 1, 2`,
  )
  const triggers: unknown = await dataSource.query(
    'SELECT TRIGGER_NAME FROM information_schema.TRIGGERS WHERE TRIGGER_SCHEMA = DATABASE() ORDER BY 1',
  )
  return { columns, triggers }
}

async function undoAll(): Promise<void> {
  for (let i = 0; i < dataSource.migrations.length; i += 1)
    await dataSource.undoLastMigration({ transaction: 'none' })
}

describe('migrations', () => {
  it('bring an empty database to exactly what the entities say', async () => {
    await openDatabase(dataSource)
    const { upQueries } = await dataSource.driver.createSchemaBuilder().log()
    expect(upQueries.map(({ query }) => query)).toEqual([])
  })

  it('go down to nothing and up again to the same', async () => {
    await openDatabase(dataSource)
    const before = await shape()
    await undoAll()
    expect(await shape()).toEqual({ columns: [], triggers: [] })
    await dataSource.runMigrations({ transaction: 'none' })
    expect(await shape()).toEqual(before)
  })

  it('do nothing the second time', async () => {
    await openDatabase(dataSource)
    expect(await dataSource.runMigrations({ transaction: 'none' })).toEqual([])
  })

  it('give every connection the settings that protect against lost updates', async () => {
    await openDatabase(dataSource)
    const asked = await Promise.all(
      Array.from({ length: 4 }, () =>
        dataSource.query(
          'SELECT CAST(@@innodb_snapshot_isolation AS CHAR) AS safe, @@time_zone AS zone, SLEEP(0.05)',
        ),
      ),
    )
    for (const [row] of asked) expect(row).toMatchObject({ safe: 'ON', zone: '+00:00' })
  })
})
