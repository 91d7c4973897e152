import { In, type EntityManager } from 'typeorm'
import type { Part as PartAnswer, PartRow } from '../../../shared/api/parts.ts'
import { readingOptionsSchema } from '../../../shared/drawing/schema.ts'
import { vertexLoopsSchema } from '../../../shared/geometry/schema.ts'
import { Part } from '../../db/entities/part.ts'
import { Setup } from '../../db/entities/setup.ts'
import { notFound } from '../../http/refusal.ts'
import { presentDrawing } from '../drawings/handlers.ts'
import { Persons } from '../people/persons.ts'

export async function presentPart(manager: EntityManager, id: string): Promise<PartAnswer> {
  const part = await manager.findOneBy(Part, { id })
  if (!part) throw notFound('This part')
  const persons = await Persons.load(manager, [part.createdBy])
  return {
    ...sharedFields(part, persons),
    drawing: await presentDrawing(manager, part.drawingId),
    reading: readingOptionsSchema.parse(JSON.parse(part.reading)),
  }
}

export async function presentPartRows(manager: EntityManager, parts: readonly Part[]): Promise<PartRow[]> {
  const persons = await Persons.load(
    manager,
    parts.map((part) => part.createdBy),
  )
  const setups = await setupCounts(
    manager,
    parts.map((part) => part.id),
  )
  return parts.map((part) => ({ ...sharedFields(part, persons), setups: setups.get(part.id) ?? 0 }))
}

function sharedFields(part: Part, persons: Persons) {
  const { id, number, name, area, minX, minY, maxX, maxY, version } = part
  return {
    id,
    number,
    name,
    loops: vertexLoopsSchema.parse(JSON.parse(part.loops)),
    area,
    bounds: { minX, minY, maxX, maxY },
    createdBy: persons.of(part.createdBy),
    createdAt: part.createdAt.toISOString(),
    version,
  }
}

async function setupCounts(manager: EntityManager, partIds: readonly string[]): Promise<Map<string, number>> {
  if (partIds.length === 0) return new Map()
  const rows = await manager
    .createQueryBuilder(Setup, 's')
    .select('s.part_id', 'partId')
    .addSelect('COUNT(*)', 'count')
    .where({ partId: In([...partIds]) })
    .groupBy('s.part_id')
    .getRawMany<{ partId: string; count: string }>()
  return new Map(rows.map(({ partId, count }) => [partId, Number(count)]))
}
