import type { AuditEntry as EntryAnswer } from '../../../shared/api/record.ts'
import { AuditEntry } from '../../db/entities/audit.ts'
import type { HandlersOf } from '../../http/call.ts'
import { containing, pageAsked } from '../../http/paging.ts'

export const recordHandlers: HandlersOf<'listAudit'> = {
  listAudit: async ({ services, query }) => {
    const { page, pageSize, skip } = pageAsked(query)
    const entries = services.dataSource.createQueryBuilder(AuditEntry, 'e').orderBy('e.id', 'DESC')
    if (query.subjectId) entries.andWhere('e.subjectId = :subjectId', { subjectId: query.subjectId })
    if (query.action) entries.andWhere('e.action = :action', { action: query.action })
    if (query.q) {
      entries.andWhere('(e.subjectLabel LIKE :q OR e.actorName LIKE :q OR e.action LIKE :q)', {
        q: containing(query.q),
      })
    }
    const [rows, total] = await entries.skip(skip).take(pageSize).getManyAndCount()
    return { items: rows.map(presentEntry), total, page, pageSize }
  },
}

function presentEntry(entry: AuditEntry): EntryAnswer {
  const { id, at, actorId, actorName, action, previousHash, hash } = entry
  return {
    id,
    at: at.toISOString(),
    actor: actorId && actorName ? { id: actorId, name: actorName } : null,
    action,
    subject: { kind: entry.subjectKind, id: entry.subjectId, label: entry.subjectLabel },
    details: JSON.parse(entry.details) as Record<string, unknown>,
    previousHash,
    hash,
  }
}
