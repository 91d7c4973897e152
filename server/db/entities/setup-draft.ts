import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { Setup } from './setup.ts'
import { User } from './user.ts'

/** What one person has typed on one set-up and not saved; overwritten while they type. */
@Entity({ name: 'setup_drafts' })
export class SetupDraft {
  @ForeignKey(() => Setup, { name: 'setup_drafts_setup_fk', onDelete: 'CASCADE' })
  @PrimaryColumn({ name: 'setup_id', type: 'char', length: 36 })
  setupId!: string

  @ForeignKey(() => User, { name: 'setup_drafts_user_fk', onDelete: 'CASCADE' })
  @PrimaryColumn({ name: 'user_id', type: 'char', length: 36 })
  userId!: string

  /** Revision and version of the set-up that it was begun on. */
  @Column({ type: 'int' })
  revision!: number

  @Column({ type: 'int' })
  version!: number

  @Column({ type: 'longtext' })
  content!: string

  @Column({ name: 'kept_at', type: 'datetime', precision: 3 })
  keptAt!: Date
}
