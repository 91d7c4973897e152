import { Column, Entity, ForeignKey, PrimaryColumn } from 'typeorm'
import { User } from './user.ts'

/** An uploaded file, whole; it never changes. */
@Entity({ name: 'drawings' })
export class Drawing {
  @PrimaryColumn({ type: 'char', length: 36 })
  id!: string

  @Column({ name: 'file_name', type: 'varchar', length: 255 })
  fileName!: string

  /** Bytes. */
  @Column({ type: 'int' })
  size!: number

  @Column({ type: 'char', length: 64 })
  sha256!: string

  /** Loaded only where it is asked for. */
  @Column({ type: 'longblob', select: false })
  bytes!: Buffer

  @ForeignKey(() => User, { name: 'drawings_uploaded_by_fk' })
  @Column({ name: 'uploaded_by', type: 'char', length: 36 })
  uploadedBy!: string

  @Column({ name: 'uploaded_at', type: 'datetime', precision: 3 })
  uploadedAt!: Date
}
