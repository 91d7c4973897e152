import type { DataSource } from 'typeorm'
import type { Config } from './config.ts'
import type { Evaluator } from './features/evaluations/evaluator.ts'
import type { DrawingReader } from './features/drawings/reader.ts'
import type { Passwords } from './features/people/passwords.ts'
import type { Logger } from './log.ts'

/** What handlers work with; made once at the start, by hand in tests. */
export interface Services {
  readonly config: Config
  readonly log: Logger
  readonly dataSource: DataSource
  readonly passwords: Passwords
  readonly reader: DrawingReader
  readonly evaluator: Evaluator
  /** Bytes free where uploads end up; null when that cannot be told. */
  readonly freeDiskBytes: () => Promise<number | null>
}
