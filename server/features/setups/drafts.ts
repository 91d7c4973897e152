import { saveSetupBody } from '../../../shared/api/setups.ts'
import { SetupDraft } from '../../db/entities/setup-draft.ts'
import type { HandlersOf } from '../../http/call.ts'
import { findSetup } from './present.ts'

/** One's own unsaved changes: kept as they come, the last one counts. No part of the record. */
export const draftHandlers: HandlersOf<'getDraft' | 'keepDraft' | 'dropDraft'> = {
  getDraft: async ({ services, user, params }) => {
    const { manager } = services.dataSource
    const { id: setupId } = await findSetup(manager, params.id)
    const row = await manager.findOneBy(SetupDraft, { setupId, userId: user.id })
    if (!row) return { draft: null }
    // A draft of an older form is of no use to anyone; what was saved is not touched by that.
    const read = saveSetupBody.safeParse(JSON.parse(row.content))
    if (!read.success) return { draft: null }
    const { revision, version, keptAt } = row
    return { draft: { revision, version, keptAt: keptAt.toISOString(), content: read.data } }
  },

  keepDraft: async ({ services, user, params, body }) => {
    const { manager } = services.dataSource
    const { id: setupId } = await findSetup(manager, params.id)
    const { revision, version, content } = body
    const keptAt = new Date()
    await manager.upsert(
      SetupDraft,
      { setupId, userId: user.id, revision, version, content: JSON.stringify(content), keptAt },
      ['setupId', 'userId'],
    )
    return { keptAt: keptAt.toISOString() }
  },

  dropDraft: async ({ services, user, params }) => {
    const { manager } = services.dataSource
    const { id: setupId } = await findSetup(manager, params.id)
    await manager.delete(SetupDraft, { setupId, userId: user.id })
  },
}
