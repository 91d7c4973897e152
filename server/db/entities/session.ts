import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import { User } from './user.ts'

/** A signed-in session; anonymous visitors have none. */
@Entity({ name: 'sessions' })
export class Session {
  /** SHA-256 of the cookie's id, hex: a copy of the table opens no session. */
  @PrimaryColumn({ type: 'char', length: 64 })
  id!: string

  @Index('sessions_user')
  @ForeignKey(() => User, { name: 'sessions_user_fk', onDelete: 'CASCADE' })
  @Column({ name: 'user_id', type: 'char', length: 36 })
  userId!: string

  /** The user's epoch at sign-in. */
  @Column({ type: 'int' })
  epoch!: number

  @Column({ name: 'user_agent', type: 'varchar', length: 300 })
  userAgent!: string

  @Column({ name: 'created_at', type: 'datetime', precision: 3 })
  createdAt!: Date

  /** Moved at most once in a few minutes. */
  @Column({ name: 'seen_at', type: 'datetime', precision: 3 })
  seenAt!: Date

  /** The absolute limit. */
  @Index('sessions_expires')
  @Column({ name: 'expires_at', type: 'datetime', precision: 3 })
  expiresAt!: Date
}
