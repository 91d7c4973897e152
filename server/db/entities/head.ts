import { Column, Entity, ForeignKey, Index, PrimaryColumn } from 'typeorm'
import type { Head as HeadAnswer } from '../../../shared/api/heads.ts'
import { User } from './user.ts'

@Entity({ name: 'heads' })
export class Head {
  @PrimaryColumn({ type: 'char', length: 36 })
  id!: string

  @Index('heads_name', { unique: true })
  @Column({ type: 'varchar', length: 120 })
  name!: string

  @Column({ type: 'varchar', length: 20 })
  kind!: HeadAnswer['kind']

  /** Degrees. */
  @Column({ name: 'mechanical_limit', type: 'double' })
  mechanicalLimit!: number

  /** Degrees; null until an engineer sets one. */
  @Column({ name: 'working_limit', type: 'double', nullable: true })
  workingLimit!: number | null

  @ForeignKey(() => User, { name: 'heads_working_limit_by_fk' })
  @Column({ name: 'working_limit_by', type: 'char', length: 36, nullable: true })
  workingLimitBy!: string | null

  @Column({ name: 'working_limit_at', type: 'datetime', precision: 3, nullable: true })
  workingLimitAt!: Date | null

  @Column({ name: 'working_limit_reason', type: 'varchar', length: 1000, nullable: true })
  workingLimitReason!: string | null

  /** mm */
  @Column({ type: 'double' })
  kerf!: number

  /** Degrees per side. */
  @Column({ type: 'double' })
  taper!: number

  /** mm */
  @Column({ type: 'double' })
  standoff!: number

  /** mm */
  @Column({ name: 'nozzle_diameter', type: 'double' })
  nozzleDiameter!: number

  @Column({ type: 'int' })
  version!: number
}
