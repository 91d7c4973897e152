import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import { User } from './user.ts'

/** One entry of the record. Append-only: triggers refuse changes, and each hash covers the one before. */
@Entity({ name: 'audit_entries' })
export class AuditEntry {
  /** Counts from 1 without gaps. */
  @PrimaryColumn({ type: 'int' })
  id!: number

  @Column({ type: 'datetime', precision: 3 })
  at!: Date

  /** Null for the system. */
  @ForeignKey(() => User, { name: 'audit_entries_actor_fk' })
  @Column({ name: 'actor_id', type: 'char', length: 36, nullable: true })
  actorId!: string | null

  /** As the person was called then. */
  @Column({ name: 'actor_name', type: 'varchar', length: 120, nullable: true })
  actorName!: string | null

  @Index('audit_entries_action')
  @Column({ type: 'varchar', length: 60 })
  action!: string

  @Column({ name: 'subject_kind', type: 'varchar', length: 30 })
  subjectKind!: string

  @Index('audit_entries_subject')
  @Column({ name: 'subject_id', type: 'varchar', length: 64 })
  subjectId!: string

  @Column({ name: 'subject_label', type: 'varchar', length: 300 })
  subjectLabel!: string

  /** JSON. */
  @Column({ type: 'longtext' })
  details!: string

  @Column({ name: 'previous_hash', type: 'char', length: 64 })
  previousHash!: string

  @Column({ type: 'char', length: 64 })
  hash!: string
}

/** The chain's end, one row: locking it puts every audited write in one order. */
@Entity({ name: 'audit_chain' })
export class AuditChain {
  @PrimaryColumn({ type: 'int' })
  id!: number

  @Column({ name: 'last_id', type: 'int' })
  lastId!: number

  @Column({ name: 'last_hash', type: 'char', length: 64 })
  lastHash!: string
}
