import { contoursDxf } from '../../../shared/files/contours-dxf.ts'
import { edgesCsv } from '../../../shared/files/edges-csv.ts'
import type { SetupContent } from '../../../shared/setup/schema.ts'
import { Part } from '../../db/entities/part.ts'
import { Setup } from '../../db/entities/setup.ts'
import type { HandlersOf } from '../../http/call.ts'
import { safeFileName } from '../../http/download.ts'
import { containing, pageAsked } from '../../http/paging.ts'
import type { Services } from '../../services.ts'
import { contentFrom, evaluateRevision, findRevision } from './content.ts'
import {
  findSetup,
  listRevisionRows,
  presentRevision,
  stateOf,
  presentSetup,
  presentSetupRows,
} from './present.ts'

const ORDERS = {
  savedAt: ['s.savedAt', 'ASC'],
  '-savedAt': ['s.savedAt', 'DESC'],
  name: ['s.name', 'ASC'],
  '-name': ['s.name', 'DESC'],
} as const

type Names =
  | 'listSetups'
  | 'getSetup'
  | 'listRevisions'
  | 'getRevision'
  | 'revisionContent'
  | 'revisionEvaluation'
  | 'revisionContours'
  | 'revisionEdges'

export const readingHandlers: HandlersOf<Names> = {
  listSetups: async ({ services, query }) => {
    const { page, pageSize, skip } = pageAsked(query)
    const { manager } = services.dataSource
    const [column, direction] = ORDERS[query.sort ?? '-savedAt']
    const setups = manager.createQueryBuilder(Setup, 's').orderBy(column, direction).addOrderBy('s.id')
    if (query.partId) setups.andWhere('s.partId = :partId', { partId: query.partId })
    if (query.state) setups.andWhere('s.state = :state', { state: query.state })
    if (query.q) {
      setups
        .innerJoin(Part, 'p', 'p.id = s.part_id')
        .andWhere('(s.name LIKE :q OR p.number LIKE :q OR p.name LIKE :q)', { q: containing(query.q) })
    }
    const [rows, total] = await setups.offset(skip).limit(pageSize).getManyAndCount()
    return { items: await presentSetupRows(manager, rows), total, page, pageSize }
  },

  getSetup: ({ services, params }) => presentSetup(services.dataSource.manager, params.id),

  listRevisions: async ({ services, params }) => {
    const { manager } = services.dataSource
    return { items: await listRevisionRows(manager, await findSetup(manager, params.id)) }
  },

  getRevision: async ({ services, params }) => {
    const { manager } = services.dataSource
    return presentRevision(manager, await findSetup(manager, params.id), params.revision)
  },

  /** The very bytes that were hashed. */
  revisionContent: async ({ services, params }) => {
    const { content } = await findRevision(services.dataSource.manager, params.id, params.revision)
    return {
      fileName: fileName(contentFrom(content), params.revision, 'json'),
      bytes: Buffer.from(content, 'utf8'),
    }
  },

  revisionEvaluation: async ({ services, params }) => {
    const { hash, evaluation } = await evaluated(services, params)
    return { hash, evaluation }
  },

  revisionContours: async ({ services, params }) => {
    const { content, evaluation, hash } = await evaluated(services, params)
    const setup = await findSetup(services.dataSource.manager, params.id)
    const text = contoursDxf(evaluation, {
      part: `${content.part.number} ${content.part.name}`,
      setup: setup.name,
      revision: params.revision,
      state: stateOf(setup, params.revision),
      hash,
      material: content.plate.material,
      thickness: content.plate.thickness,
    })
    return { fileName: fileName(content, params.revision, 'dxf'), bytes: Buffer.from(text, 'utf8') }
  },

  revisionEdges: async ({ services, params }) => {
    const { content, evaluation } = await evaluated(services, params)
    const text = edgesCsv(content, evaluation)
    return { fileName: fileName(content, params.revision, 'csv'), bytes: Buffer.from(text, 'utf8') }
  },
}

async function evaluated(services: Services, { id, revision: number }: { id: string; revision: number }) {
  const revision = await findRevision(services.dataSource.manager, id, number)
  return {
    hash: revision.hash,
    content: contentFrom(revision.content),
    evaluation: await evaluateRevision(services, revision),
  }
}

function fileName(content: SetupContent, revision: number, extension: string): string {
  return safeFileName(
    `${content.part.number.replaceAll('/', '-')} r${revision}.${extension}`,
    `set-up.${extension}`,
  )
}
