import { randomUUID } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import type { Head as HeadAnswer } from '../../../shared/api/heads.ts'
import { Head } from '../../db/entities/head.ts'
import type { HandlersOf } from '../../http/call.ts'
import { claimVersion } from '../../http/claim.ts'
import { containing, pageAsked } from '../../http/paging.ts'
import { notFound, Refusal } from '../../http/refusal.ts'
import { nameFree } from '../../http/unique.ts'
import { Persons } from '../people/persons.ts'
import { appendToRecord } from '../record/audit.ts'

type Names = 'listHeads' | 'getHead' | 'createHead' | 'updateHead' | 'setWorkingLimit'

export const headHandlers: HandlersOf<Names> = {
  listHeads: async ({ services, query }) => {
    const { page, pageSize, skip } = pageAsked(query)
    const { manager } = services.dataSource
    const heads = manager.createQueryBuilder(Head, 'h').orderBy('h.name').addOrderBy('h.id')
    if (query.q) heads.where('h.name LIKE :q', { q: containing(query.q) })
    const [rows, total] = await heads.skip(skip).take(pageSize).getManyAndCount()
    return { items: await presentHeads(manager, rows), total, page, pageSize }
  },

  getHead: ({ services, params }) => presentHead(services.dataSource.manager, params.id),

  createHead: ({ user, body, write }) =>
    write(async (manager) => {
      const id = randomUUID()
      const { name, kind, mechanicalLimit, jet } = body
      await nameFree(
        `A head named ${name}`,
        manager.insert(Head, { id, name, kind, mechanicalLimit, ...jet, workingLimit: null, version: 1 }),
      )
      await appendToRecord(manager, user, {
        action: 'head.create',
        subject: { kind: 'head', id, label: name },
        details: { kind, mechanicalLimit, jet },
      })
      return presentHead(manager, id)
    }),

  updateHead: ({ user, params, body, version, write }) =>
    write(async (manager) => {
      const { id } = params
      await claimVersion(manager, Head, { id, version }, () => presentHead(manager, id))
      const { jet, ...rest } = body
      const changes = { ...rest, ...jet }
      if (Object.keys(changes).length > 0) {
        await nameFree(`A head named ${body.name}`, manager.update(Head, { id }, changes))
      }
      const head = await presentHead(manager, id)
      refuseWorkingAboveMechanical(head)
      const subject = { kind: 'head', id, label: head.name }
      await appendToRecord(manager, user, { action: 'head.update', subject, details: { ...body } })
      return head
    }),

  setWorkingLimit: ({ user, params, body, version, write }) =>
    write(async (manager) => {
      const { id } = params
      const before = await presentHead(manager, id)
      await claimVersion(manager, Head, { id, version }, () => presentHead(manager, id))
      const { workingLimit, reason } = body
      await manager.update(
        Head,
        { id },
        {
          workingLimit,
          workingLimitBy: user.id,
          workingLimitAt: new Date(),
          workingLimitReason: reason,
        },
      )
      const head = await presentHead(manager, id)
      refuseWorkingAboveMechanical(head)
      await appendToRecord(manager, user, {
        action: 'head.working-limit',
        subject: { kind: 'head', id, label: head.name },
        details: { from: before.workingLimit, to: workingLimit, reason },
      })
      return head
    }),
}

/** Thrown inside the transaction, so the change is undone. */
function refuseWorkingAboveMechanical({ workingLimit, mechanicalLimit }: HeadAnswer): void {
  if (workingLimit !== null && workingLimit > mechanicalLimit) {
    throw new Refusal(
      'invalid-request',
      `The working limit (${workingLimit}°) cannot pass the mechanical limit (${mechanicalLimit}°).`,
      { details: { workingLimit, mechanicalLimit } },
    )
  }
}

export async function presentHead(manager: EntityManager, id: string): Promise<HeadAnswer> {
  const head = await manager.findOneBy(Head, { id })
  if (!head) throw notFound('This head')
  const [answer] = await presentHeads(manager, [head])
  return answer as HeadAnswer
}

async function presentHeads(manager: EntityManager, heads: readonly Head[]): Promise<HeadAnswer[]> {
  const persons = await Persons.load(
    manager,
    heads.map((head) => head.workingLimitBy),
  )
  return heads.map((head) => ({
    id: head.id,
    name: head.name,
    kind: head.kind,
    mechanicalLimit: head.mechanicalLimit,
    workingLimit: head.workingLimit,
    workingLimitSet:
      head.workingLimitBy && head.workingLimitAt
        ? {
            by: persons.of(head.workingLimitBy),
            at: head.workingLimitAt.toISOString(),
            reason: head.workingLimitReason ?? '',
          }
        : null,
    jet: {
      kerf: head.kerf,
      taper: head.taper,
      standoff: head.standoff,
      nozzleDiameter: head.nozzleDiameter,
    },
    version: head.version,
  }))
}
