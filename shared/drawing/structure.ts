import { DrawingError } from './errors.ts'
import { MAX_ENTITY_TAGS, MAX_VERTICES } from './limits.ts'
import { TagReader, type Tag } from './tags.ts'

/** An entity's own groups, and those of the VERTEX groups that follow a POLYLINE. */
export interface RawEntity {
  readonly type: string
  readonly line: number
  readonly tags: readonly Tag[]
  readonly vertices: readonly (readonly Tag[])[]
}

/** Entity types that draw the outline of a part. All others are counted and passed over. */
export const geometryTypes = [
  'LINE',
  'ARC',
  'CIRCLE',
  'LWPOLYLINE',
  'POLYLINE',
  'ELLIPSE',
  'SPLINE',
  'INSERT',
] as const

export type GeometryType = (typeof geometryTypes)[number]

const KEPT_WHOLE: ReadonlySet<string> = new Set([...geometryTypes, 'BLOCK', 'VERTEX'])

/** Of every other entity: its layer, and whether it lies on a sheet of paper. */
const KEPT_ALWAYS: ReadonlySet<number> = new Set([8, 67])

/** Receives the drawing piece by piece, so that no more than one entity is held as tags. */
export interface StructureSink {
  /** First value of a header variable that is one of `HEADER_VARIABLES`. */
  header(name: string, tag: Tag): void
  /** The groups before a block's first entity. */
  block(tags: readonly Tag[], line: number): void
  /** An entity of the block begun last, or of the drawing itself. */
  entity(entity: RawEntity, inBlock: boolean): void
}

const HEADER_VARIABLES = new Set(['$INSUNITS', '$MEASUREMENT'])

/** Extended data starts here: applications' own, never geometry. */
const FIRST_EXTENDED_CODE = 1000
const EMBEDDED_OBJECT = 101
const GROUP_BRACKET = 102

/**
 * Walks the sections in whatever order they come and hands over what geometry needs. Everything that opens must
 * close: a section, table, block or polyline left open is refused here, because a lenient reader would wait
 * for its end for ever.
 *
 * @throws DrawingError drawing-not-dxf, drawing-malformed, drawing-truncated, drawing-too-many-entities
 */
export function readStructure(text: string, sink: StructureSink): void {
  const reader = new TagReader(text)
  let first = true
  while (true) {
    advance(reader)
    if (reader.code !== 0) throw first ? notDxf(reader) : stray(reader)
    const value = reader.value
    if (value === 'EOF') return
    if (value !== 'SECTION') throw first ? notDxf(reader) : stray(reader)
    first = false
    readSection(reader, sink)
  }
}

function readSection(reader: TagReader, sink: StructureSink): void {
  advance(reader)
  if (reader.code !== 2) throw malformed('A section without a name', reader.line)
  switch (reader.value) {
    case 'HEADER':
      return readHeader(reader, sink)
    case 'TABLES':
      return readTables(reader)
    case 'BLOCKS':
      return readBlocks(reader, sink)
    case 'ENTITIES':
      advance(reader)
      readEntities(reader, 'ENDSEC', (entity) => sink.entity(entity, false))
      return
    default:
      return skipSection(reader)
  }
}

function readHeader(reader: TagReader, sink: StructureSink): void {
  let wanted: string | null = null
  while (true) {
    advance(reader)
    if (endsSection(reader)) return
    if (reader.code === 9) {
      const name = reader.value.toUpperCase()
      wanted = HEADER_VARIABLES.has(name) ? name : null
    } else if (wanted !== null) {
      sink.header(wanted, reader.tag)
      wanted = null
    }
  }
}

function readTables(reader: TagReader): void {
  let openedAt: number | null = null
  while (true) {
    advance(reader)
    if (reader.code !== 0) continue
    const value = reader.value
    if (value === 'TABLE') {
      if (openedAt !== null) throw malformed('A table without its end (ENDTAB)', openedAt)
      openedAt = reader.line
    } else if (value === 'ENDTAB') {
      if (openedAt === null) throw malformed('The end of a table that did not start', reader.line)
      openedAt = null
    } else if (endsSection(reader)) {
      if (openedAt !== null) throw malformed('A table without its end (ENDTAB)', openedAt)
      return
    }
  }
}

function readBlocks(reader: TagReader, sink: StructureSink): void {
  advance(reader)
  while (!endsSection(reader)) {
    if (reader.code !== 0 || reader.value !== 'BLOCK') {
      advance(reader)
      continue
    }
    const line = reader.line
    sink.block(entityTags(reader, 'BLOCK'), line)
    readEntities(reader, 'ENDBLK', (entity) => sink.entity(entity, true))
    // The end of a block is an entity with groups of its own.
    entityTags(reader, 'ENDBLK')
  }
}

/** From the group that names the first entity up to the group `end`, which stays current. */
function readEntities(reader: TagReader, end: 'ENDSEC' | 'ENDBLK', take: (entity: RawEntity) => void): void {
  while (reader.code !== 0) advance(reader)
  while (reader.value !== end) {
    const type = reader.value
    const line = reader.line
    if (type === 'SECTION' || type === 'ENDSEC' || type === 'BLOCK' || type === 'ENDBLK' || type === 'EOF') {
      throw type === 'EOF' ? truncated(line) : malformed(`${type} where ${end} belongs`, line)
    }
    if (type === 'VERTEX') throw malformed('A VERTEX outside a POLYLINE', line)
    const tags = entityTags(reader, type)
    const vertices = type === 'POLYLINE' ? polylineVertices(reader, line) : []
    take({ type, line, tags, vertices })
  }
}

function polylineVertices(reader: TagReader, line: number): (readonly Tag[])[] {
  const vertices: (readonly Tag[])[] = []
  while (reader.value === 'VERTEX') {
    vertices.push(entityTags(reader, 'VERTEX'))
    if (vertices.length > MAX_VERTICES) throw tooMany(line)
  }
  if (reader.value !== 'SEQEND') throw malformed('A POLYLINE without its end (SEQEND)', line)
  entityTags(reader, 'SEQEND')
  return vertices
}

/**
 * Groups up to the next group 0, which becomes current. Applications' groups, extended data and embedded
 * objects are left out: their codes mean other things.
 */
function entityTags(reader: TagReader, type: string): Tag[] {
  const whole = KEPT_WHOLE.has(type)
  const line = reader.line
  const tags: Tag[] = []
  let bracketed = false
  let embedded = false
  while (true) {
    advance(reader)
    if (reader.code === 0) return tags
    if (reader.code === EMBEDDED_OBJECT) embedded = true
    if (reader.code === GROUP_BRACKET) bracketed = reader.value.startsWith('{')
    else if (!bracketed && !embedded && reader.code < FIRST_EXTENDED_CODE) {
      if (!whole && !KEPT_ALWAYS.has(reader.code)) continue
      tags.push(reader.tag)
      if (tags.length > MAX_ENTITY_TAGS) throw tooMany(line)
    }
  }
}

function skipSection(reader: TagReader): void {
  do advance(reader)
  while (!endsSection(reader))
}

/** True at ENDSEC; a new section or the end of the file before it is refused. */
function endsSection(reader: TagReader): boolean {
  if (reader.code !== 0) return false
  const value = reader.value
  if (value === 'EOF') throw truncated(reader.line)
  if (value === 'SECTION') throw malformed('A section starts before the last one ended (ENDSEC)', reader.line)
  return value === 'ENDSEC'
}

function advance(reader: TagReader): void {
  if (!reader.next()) throw truncated(reader.line)
}

function truncated(line: number): DrawingError {
  return new DrawingError(
    'drawing-truncated',
    `The file stops early, at line ${line}. Export it again.`,
    line,
  )
}

function malformed(what: string, line: number): DrawingError {
  return new DrawingError('drawing-malformed', `${what}, at line ${line}. Export the drawing again.`, line)
}

function tooMany(line: number): DrawingError {
  return new DrawingError(
    'drawing-too-many-entities',
    `The entity at line ${line} has more points than can be read. Export only the part.`,
    line,
  )
}

function stray(reader: TagReader): DrawingError {
  return malformed('A group outside every section', reader.line)
}

function notDxf(reader: TagReader): DrawingError {
  return new DrawingError(
    'drawing-not-dxf',
    'The file does not start as a DXF does. Export it as DXF.',
    reader.line,
  )
}
