import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import { Drawing } from './drawing.ts'
import { User } from './user.ts'

@Entity({ name: 'parts' })
export class Part {
  @PrimaryColumn({ type: 'char', length: 36 })
  id!: string

  @Index('parts_number', { unique: true })
  @Column({ type: 'varchar', length: 60 })
  number!: string

  @Column({ type: 'varchar', length: 120 })
  name!: string

  @ForeignKey(() => Drawing, { name: 'parts_drawing_fk' })
  @Column({ name: 'drawing_id', type: 'char', length: 36 })
  drawingId!: string

  /** JSON of the reading options. */
  @Column({ type: 'longtext' })
  reading!: string

  /** JSON of the loops, mm. */
  @Column({ type: 'longtext' })
  loops!: string

  /** mm² less holes. */
  @Column({ type: 'double' })
  area!: number

  @Column({ name: 'min_x', type: 'double' })
  minX!: number

  @Column({ name: 'min_y', type: 'double' })
  minY!: number

  @Column({ name: 'max_x', type: 'double' })
  maxX!: number

  @Column({ name: 'max_y', type: 'double' })
  maxY!: number

  @ForeignKey(() => User, { name: 'parts_created_by_fk' })
  @Column({ name: 'created_by', type: 'char', length: 36 })
  createdBy!: string

  @Index('parts_created_at')
  @Column({ name: 'created_at', type: 'datetime', precision: 3 })
  createdAt!: Date

  @Column({ type: 'int' })
  version!: number
}
