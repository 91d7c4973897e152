import mysql from 'mysql2'
import { DataSource } from 'typeorm'
import { ConfigError } from '../config.ts'
import { readConnectionUrl } from './connection-url.ts'
import { entities } from './entities/index.ts'
import { Ground1764547200000 } from './migrations/1764547200000-ground.ts'
import { Drafts1764633600000 } from './migrations/1764633600000-drafts.ts'

/**
 * Every connection sees a consistent snapshot and is told when a row it read has moved on (error 1020, then
 * the whole transaction is tried again); without it MariaDB 10.11 loses updates.
 */
const SESSION_SETTINGS =
  "SET SESSION innodb_snapshot_isolation = ON, innodb_lock_wait_timeout = 4, time_zone = '+00:00', " +
  "sql_mode = 'STRICT_TRANS_TABLES,ERROR_FOR_DIVISION_BY_ZERO,NO_ENGINE_SUBSTITUTION'"

/** Requests that may wait for a connection before new ones are turned away. */
const QUEUE_LIMIT = 400

const driver = {
  ...mysql,
  createPool(options: mysql.PoolOptions) {
    const pool = mysql.createPool(options)
    pool.on('connection', (connection) => {
      // Queued ahead of any work. A server that does not know the setting is refused by `openDatabase`.
      connection.query(SESSION_SETTINGS, () => undefined)
    })
    return pool
  },
}

export function createDataSource(databaseUrl: string, poolSize = 20): DataSource {
  return new DataSource({
    type: 'mariadb',
    driver,
    ...readConnectionUrl(databaseUrl),
    entities,
    migrations: [Ground1764547200000, Drafts1764633600000],
    synchronize: false,
    logging: false,
    charset: 'utf8mb4_unicode_ci',
    timezone: 'Z',
    poolSize,
    connectTimeout: 4_000,
    extra: { queueLimit: QUEUE_LIMIT },
  })
}

/** Connects, checks that the server can do what is needed, and brings the tables up to date. */
export async function openDatabase(dataSource: DataSource): Promise<void> {
  if (!dataSource.isInitialized) await dataSource.initialize()
  const known: unknown = await dataSource.query("SHOW VARIABLES LIKE 'innodb_snapshot_isolation'")
  if (!Array.isArray(known) || known.length === 0) {
    throw new ConfigError('MariaDB 10.6.18, 10.11.8, 11.4.2 or newer is needed (innodb_snapshot_isolation).')
  }
  await dataSource.runMigrations({ transaction: 'none' })
}
