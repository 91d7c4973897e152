import { Column, Entity, Index, PrimaryColumn } from 'typeorm'
import type { Role } from '../../../shared/api/common.ts'

@Entity({ name: 'users' })
export class User {
  @PrimaryColumn({ type: 'char', length: 36 })
  id!: string

  /** Lower case. */
  @Index('users_email', { unique: true })
  @Column({ type: 'varchar', length: 254 })
  email!: string

  @Column({ type: 'varchar', length: 120 })
  name!: string

  @Column({ type: 'varchar', length: 20 })
  role!: Role

  @Column({ type: 'boolean' })
  disabled!: boolean

  @Column({ name: 'password_hash', type: 'varchar', length: 255 })
  passwordHash!: string

  /** Raised when role, password or access change: sessions of an older epoch are dead at once. */
  @Column({ type: 'int' })
  epoch!: number

  @Column({ type: 'int' })
  version!: number

  @Column({ name: 'created_at', type: 'datetime', precision: 3 })
  createdAt!: Date
}
