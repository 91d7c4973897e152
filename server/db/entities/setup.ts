import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import type { SetupState } from '../../../shared/api/setups.ts'
import { Head } from './head.ts'
import { Part } from './part.ts'
import { User } from './user.ts'

/** A set-up and, copied from its newest revision, what lists show. */
@Entity({ name: 'setups' })
export class Setup {
  @PrimaryColumn({ type: 'char', length: 36 })
  id!: string

  @Column({ type: 'varchar', length: 120 })
  name!: string

  @Index('setups_part')
  @ForeignKey(() => Part, { name: 'setups_part_fk' })
  @Column({ name: 'part_id', type: 'char', length: 36 })
  partId!: string

  @Index('setups_head')
  @ForeignKey(() => Head, { name: 'setups_head_fk' })
  @Column({ name: 'head_id', type: 'char', length: 36 })
  headId!: string

  /** State of the newest revision. */
  @Index('setups_state')
  @Column({ type: 'varchar', length: 20 })
  state!: SetupState

  /** Number of the newest revision. */
  @Column({ type: 'int' })
  revision!: number

  @Column({ name: 'approved_revision', type: 'int', nullable: true })
  approvedRevision!: number | null

  @Column({ type: 'varchar', length: 120 })
  material!: string

  /** mm */
  @Column({ type: 'double' })
  thickness!: number

  @Column({ name: 'head_name', type: 'varchar', length: 120 })
  headName!: string

  @ForeignKey(() => User, { name: 'setups_saved_by_fk' })
  @Column({ name: 'saved_by', type: 'char', length: 36 })
  savedBy!: string

  @Index('setups_saved_at')
  @Column({ name: 'saved_at', type: 'datetime', precision: 3 })
  savedAt!: Date

  /** Who asked for approval of the newest revision; null while it is a draft. */
  @ForeignKey(() => User, { name: 'setups_submitted_by_fk' })
  @Column({ name: 'submitted_by', type: 'char', length: 36, nullable: true })
  submittedBy!: string | null

  @Column({ name: 'submitted_at', type: 'datetime', precision: 3, nullable: true })
  submittedAt!: Date | null

  @Column({ type: 'int' })
  version!: number
}
