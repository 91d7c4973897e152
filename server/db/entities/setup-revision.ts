import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { Setup } from './setup.ts'
import { User } from './user.ts'

/** What was saved, exactly as it was hashed; a row is never changed. */
@Entity({ name: 'setup_revisions' })
export class SetupRevision {
  @ForeignKey(() => Setup, { name: 'setup_revisions_setup_fk' })
  @PrimaryColumn({ name: 'setup_id', type: 'char', length: 36 })
  setupId!: string

  @PrimaryColumn({ type: 'int' })
  number!: number

  @Column({ type: 'longtext' })
  content!: string

  /** SHA-256 of the content's UTF-8 bytes, hex. */
  @Column({ type: 'char', length: 64 })
  hash!: string

  @ForeignKey(() => User, { name: 'setup_revisions_saved_by_fk' })
  @Column({ name: 'saved_by', type: 'char', length: 36 })
  savedBy!: string

  @Column({ name: 'saved_at', type: 'datetime', precision: 3 })
  savedAt!: Date
}
