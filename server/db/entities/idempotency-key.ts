import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import { User } from './user.ts'

/** The answer to a write, kept under the key that the client chose for it. */
@Entity({ name: 'idempotency_keys' })
export class IdempotencyKey {
  @ForeignKey(() => User, { name: 'idempotency_keys_user_fk', onDelete: 'CASCADE' })
  @PrimaryColumn({ name: 'user_id', type: 'char', length: 36 })
  userId!: string

  /** SHA-256 of the client's key, hex. */
  @PrimaryColumn({ type: 'char', length: 64 })
  id!: string

  /** SHA-256 over route, parameters and body: the same key may not carry another request. */
  @Column({ type: 'char', length: 64 })
  fingerprint!: string

  /** JSON. */
  @Column({ type: 'longtext' })
  answer!: string

  @Index('idempotency_keys_created')
  @Column({ name: 'created_at', type: 'datetime', precision: 3 })
  createdAt!: Date
}
