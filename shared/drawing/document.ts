import type { Point } from '../geometry/types.ts'
import { readEntities, type DrawnEntity } from './entities.ts'
import { DrawingError } from './errors.ts'
import { MAX_ENTITIES, MAX_VERTICES } from './limits.ts'
import { recordOf, type EntityRecord } from './records.ts'
import type { LengthUnit } from './schema.ts'
import { geometryTypes, readStructure, type GeometryType, type RawEntity } from './structure.ts'
import { numberOf, type Tag } from './tags.ts'

/** The drawing or one of its blocks. */
export interface Container {
  readonly entities: readonly DrawnEntity[]
  /** Types and layers of the entities that draw no outline. */
  readonly ignored: readonly { readonly type: string; readonly layer: string }[]
}

export interface Block extends Container {
  readonly base: Point
}

export interface DrawingDocument {
  /** Null when the file names none, or one that no plate is drawn in. */
  readonly unit: LengthUnit | null
  /** The file was set up for inches ($MEASUREMENT 0) or for millimetres (1); a hint, no declaration. */
  readonly system: 'imperial' | 'metric' | null
  readonly model: Container
  /** By name in capitals: names of blocks do not tell capitals from small letters. */
  readonly blocks: ReadonlyMap<string, Block>
}

/** $INSUNITS values in which a plate can be drawn. */
const UNITS: Readonly<Record<number, LengthUnit>> = { 1: 'in', 2: 'ft', 4: 'mm', 5: 'cm', 6: 'm' }

const GEOMETRY: ReadonlySet<string> = new Set(geometryTypes)

interface OpenContainer {
  base: Point
  records: EntityRecord[]
  ignored: { type: string; layer: string }[]
}

/**
 * The whole file as checked, typed entities, blocks not yet placed.
 *
 * @throws DrawingError of every code that a file's text can earn
 */
export function readDocument(text: string): DrawingDocument {
  const model: OpenContainer = { base: { x: 0, y: 0 }, records: [], ignored: [] }
  const blocks = new Map<string, OpenContainer>()
  let current = model
  let unit: LengthUnit | null = null
  let system: DrawingDocument['system'] = null
  let entities = 0
  let points = 0

  readStructure(text, {
    header(name, tag) {
      const value = numberOf(tag)
      if (name === '$INSUNITS') unit = UNITS[value] ?? null
      else system = value === 0 ? 'imperial' : 'metric'
    },
    block(tags, line) {
      const name = blockName(tags, line)
      const base = { x: firstNumber(tags, 10), y: firstNumber(tags, 20) }
      current = { base, records: [], ignored: [] }
      blocks.set(name, current)
    },
    entity(raw, inBlock) {
      if (++entities > MAX_ENTITIES) throw tooMany(`The file holds more than ${MAX_ENTITIES} entities.`)
      const container = inBlock ? current : model
      const record = isDrawn(raw) ? recordOf(raw, raw.type) : null
      if (record === null) {
        container.ignored.push({ type: raw.type.slice(0, 60), layer: textOf(raw.tags, 8) || '0' })
        return
      }
      points += record.points
      if (points > MAX_VERTICES) throw tooMany(`The file holds more than ${MAX_VERTICES} points.`)
      container.records.push(record)
    },
  })

  const close = ({ base, records, ignored }: OpenContainer): Block => ({
    base,
    entities: readEntities(records),
    ignored,
  })
  return {
    unit,
    system,
    model: close(model),
    blocks: new Map([...blocks].map(([name, block]) => [name, close(block)])),
  }
}

/** An outline entity in the drawing itself; sheets of paper (group 67) only show it again. */
function isDrawn(raw: RawEntity): raw is RawEntity & { type: GeometryType } {
  return GEOMETRY.has(raw.type) && Number(textOf(raw.tags, 67) || '0') === 0
}

function blockName(tags: readonly Tag[], line: number): string {
  const name = textOf(tags, 2).toUpperCase()
  if (name === '') {
    throw new DrawingError(
      'drawing-malformed',
      `The block at line ${line} has no name. Export it again.`,
      line,
    )
  }
  return name
}

function textOf(tags: readonly Tag[], code: number): string {
  return tags.find((tag) => tag.code === code)?.value ?? ''
}

function firstNumber(tags: readonly Tag[], code: number): number {
  const tag = tags.find((candidate) => candidate.code === code)
  return tag ? numberOf(tag) : 0
}

function tooMany(why: string): DrawingError {
  return new DrawingError('drawing-too-many-entities', `${why} Export only the part.`)
}
