import { Column, Entity, ForeignKey, Index, PrimaryGeneratedColumn } from 'typeorm'
import type { Decision as DecisionAnswer } from '../../../shared/api/setups.ts'
import { Setup } from './setup.ts'
import { User } from './user.ts'

/** Who decided what about which content, when, and what that means; a row is never changed. */
@Entity({ name: 'decisions' })
@Index('decisions_setup', ['setupId', 'revision'])
export class Decision {
  @PrimaryGeneratedColumn({ type: 'int' })
  id!: number

  @ForeignKey(() => Setup, { name: 'decisions_setup_fk' })
  @Column({ name: 'setup_id', type: 'char', length: 36 })
  setupId!: string

  @Column({ type: 'int' })
  revision!: number

  @Column({ type: 'varchar', length: 20 })
  kind!: DecisionAnswer['kind']

  @ForeignKey(() => User, { name: 'decisions_by_fk' })
  @Column({ name: 'by_user', type: 'char', length: 36 })
  by!: string

  @Column({ type: 'datetime', precision: 3 })
  at!: Date

  @Column({ type: 'varchar', length: 1000 })
  reason!: string

  /** What the person declared with it, in words. */
  @Column({ type: 'varchar', length: 300 })
  meaning!: string

  /** SHA-256 of the content decided on, hex. */
  @Column({ type: 'char', length: 64 })
  hash!: string
}
