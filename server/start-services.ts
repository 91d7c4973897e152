import { statfs } from 'node:fs/promises'
import type { DataSource } from 'typeorm'
import type { Config } from './config.ts'
import { Evaluator } from './features/evaluations/evaluator.ts'
import { DrawingReader } from './features/drawings/reader.ts'
import { Passwords } from './features/people/passwords.ts'
import type { Logger } from './log.ts'
import type { Services } from './services.ts'

/** Everything handlers need, from the configuration and an open database. `diskPath` is where uploads end up. */
export function createServices(
  config: Config,
  log: Logger,
  dataSource: DataSource,
  diskPath: string,
): Services {
  return {
    config,
    log,
    dataSource,
    passwords: new Passwords(config.passwordCost),
    reader: new DrawingReader(config.readDeadline),
    evaluator: new Evaluator(config.evaluateDeadline),
    freeDiskBytes: async () => {
      const { bavail, bsize } = await statfs(diskPath)
      return bavail * bsize
    },
  }
}
