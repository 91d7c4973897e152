import { randomUUID } from 'node:crypto'
import type { VertexLoop } from '../../../shared/geometry/types.ts'
import type { Reading } from '../../../shared/drawing/schema.ts'
import { Part } from '../../db/entities/part.ts'
import type { HandlersOf } from '../../http/call.ts'
import { claimVersion } from '../../http/claim.ts'
import { containing, pageAsked } from '../../http/paging.ts'
import { Refusal } from '../../http/refusal.ts'
import { nameFree } from '../../http/unique.ts'
import { drawingBytes } from '../drawings/handlers.ts'
import { appendToRecord } from '../record/audit.ts'
import { presentPart, presentPartRows } from './present.ts'

const ORDERS = {
  number: ['p.number', 'ASC'],
  '-number': ['p.number', 'DESC'],
  createdAt: ['p.createdAt', 'ASC'],
  '-createdAt': ['p.createdAt', 'DESC'],
} as const

export const partHandlers: HandlersOf<'listParts' | 'createPart' | 'getPart' | 'updatePart'> = {
  listParts: async ({ services, query }) => {
    const { page, pageSize, skip } = pageAsked(query)
    const { manager } = services.dataSource
    const [column, direction] = ORDERS[query.sort ?? 'number']
    const parts = manager.createQueryBuilder(Part, 'p').orderBy(column, direction).addOrderBy('p.id')
    if (query.q) parts.where('(p.number LIKE :q OR p.name LIKE :q)', { q: containing(query.q) })
    const [rows, total] = await parts.skip(skip).take(pageSize).getManyAndCount()
    return { items: await presentPartRows(manager, rows), total, page, pageSize }
  },

  /** The profile comes from the stored drawing, read again here; what the page saw is not trusted. */
  createPart: async ({ services, user, body, write }) => {
    const bytes = await drawingBytes(services.dataSource.manager, body.drawingId)
    const picked = pickPart(await services.reader.read(bytes, body.reading), body.pick)
    const id = randomUUID()
    return write(async (manager) => {
      const { number, name, drawingId } = body
      await nameFree(
        `A part numbered ${number}`,
        manager.insert(Part, {
          id,
          number,
          name,
          drawingId,
          reading: JSON.stringify(body.reading),
          loops: JSON.stringify(picked.loops),
          area: picked.area,
          ...picked.bounds,
          createdBy: user.id,
          createdAt: new Date(),
          version: 1,
        }),
      )
      const subject = { kind: 'part', id, label: `${number} ${name}` }
      await appendToRecord(manager, user, { action: 'part.create', subject, details: { drawingId } })
      return presentPart(manager, id)
    })
  },

  getPart: ({ services, params }) => presentPart(services.dataSource.manager, params.id),

  updatePart: ({ user, params, body, version, write }) =>
    write(async (manager) => {
      const { id } = params
      await claimVersion(manager, Part, { id, version }, () => presentPart(manager, id))
      if (Object.keys(body).length > 0) {
        await nameFree(`A part numbered ${body.number}`, manager.update(Part, { id }, body))
      }
      const part = await presentPart(manager, id)
      const subject = { kind: 'part', id, label: `${part.number} ${part.name}` }
      await appendToRecord(manager, user, { action: 'part.rename', subject, details: { ...body } })
      return part
    }),
}

/** The outer loop first, then its holes. */
function pickPart(reading: Reading, pick: number) {
  const part = reading.parts[pick]
  if (!part) {
    throw new Refusal(
      'invalid-request',
      `Read like this, the drawing holds ${reading.parts.length} parts; there is no number ${pick + 1}.`,
    )
  }
  const loops: VertexLoop[] = [part.outer, ...part.holes].map((index) => {
    const loop = reading.loops[index]
    if (!loop) throw new Error(`The reading names a loop ${index} that it does not hold`)
    return loop.vertices
  })
  return { loops, area: part.area, bounds: part.bounds }
}
