import { Column, Entity, Index, PrimaryColumn } from 'typeorm'

/** Failed attempts within the running window, one row per account and per address. */
@Entity({ name: 'sign_in_attempts' })
export class SignInAttempt {
  /** SHA-256 of what is throttled, hex: addresses of unknown people are not kept in clear. */
  @PrimaryColumn({ type: 'char', length: 64 })
  id!: string

  @Column({ type: 'int' })
  failures!: number

  @Index('sign_in_attempts_window')
  @Column({ name: 'window_start', type: 'datetime', precision: 3 })
  windowStart!: Date
}
