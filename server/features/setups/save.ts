import { randomUUID } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import { Decision } from '../../db/entities/decision.ts'
import { Setup } from '../../db/entities/setup.ts'
import { SetupRevision } from '../../db/entities/setup-revision.ts'
import type { HandlersOf } from '../../http/call.ts'
import { claimVersion } from '../../http/claim.ts'
import { presentHead } from '../heads/handlers.ts'
import { presentPart } from '../parts/present.ts'
import { appendToRecord } from '../record/audit.ts'
import { checkSound, contentOf, findRevision, sealed } from './content.ts'
import { findSetup, presentSetup } from './present.ts'

/** Each save writes a revision; nothing that was saved is ever changed. */
export const savingHandlers: HandlersOf<'createSetup' | 'saveSetup'> = {
  createSetup: async ({ services, user, body, write }) => {
    const { manager: reader } = services.dataSource
    const part = await presentPart(reader, body.partId)
    const head = await presentHead(reader, body.headId)
    const square = {
      plate: body.plate,
      jet: head.jet,
      datum: 'top',
      walls: [],
      joints: [],
      note: '',
    } as const
    await checkSound(services, contentOf(part, head, { ...square, walls: [], joints: [] }))
    const id = randomUUID()
    return write(async (manager) => {
      const current = await presentHead(manager, body.headId)
      const content = contentOf(await presentPart(manager, body.partId), current, {
        ...square,
        walls: [],
        joints: [],
      })
      const { text, hash } = sealed(content)
      const savedAt = new Date()
      await manager.insert(Setup, {
        id,
        name: body.name,
        partId: part.id,
        headId: head.id,
        state: 'draft',
        revision: 1,
        approvedRevision: null,
        material: body.plate.material,
        thickness: body.plate.thickness,
        headName: current.name,
        savedBy: user.id,
        savedAt,
        submittedBy: null,
        submittedAt: null,
        version: 1,
      })
      await manager.insert(SetupRevision, {
        setupId: id,
        number: 1,
        content: text,
        hash,
        savedBy: user.id,
        savedAt,
      })
      await appendToRecord(manager, user, {
        action: 'setup.create',
        subject: { kind: 'setup', id, label: body.name },
        details: { partId: part.id, hash },
      })
      return presentSetup(manager, id)
    })
  },

  saveSetup: async ({ services, user, params, body, version, write }) => {
    const { id } = params
    const { name, headId, ...choices } = body
    const { manager: reader } = services.dataSource
    const { partId } = await findSetup(reader, id)
    await checkSound(
      services,
      contentOf(await presentPart(reader, partId), await presentHead(reader, headId), choices),
    )
    return write(async (manager) => {
      await claimVersion(manager, Setup, { id, version }, () => presentSetup(manager, id))
      const setup = await findSetup(manager, id)
      const head = await presentHead(manager, headId)
      const { text, hash } = sealed(contentOf(await presentPart(manager, partId), head, choices))
      if (setup.state === 'submitted') await withdraw(manager, setup, user.id)
      const number = setup.revision + 1
      const savedAt = new Date()
      await manager.insert(SetupRevision, {
        setupId: id,
        number,
        content: text,
        hash,
        savedBy: user.id,
        savedAt,
      })
      await manager.update(
        Setup,
        { id },
        {
          name,
          headId,
          state: 'draft',
          revision: number,
          material: choices.plate.material,
          thickness: choices.plate.thickness,
          headName: head.name,
          savedBy: user.id,
          savedAt,
          submittedBy: null,
          submittedAt: null,
        },
      )
      await appendToRecord(manager, user, {
        action: 'setup.save',
        subject: { kind: 'setup', id, label: name },
        details: { revision: number, hash, from: setup.state },
      })
      return presentSetup(manager, id)
    })
  },
}

/** Saving over a submission takes it back; the record says so. */
async function withdraw(manager: EntityManager, setup: Setup, by: string): Promise<void> {
  const { hash } = await findRevision(manager, setup.id, setup.revision)
  await manager.insert(Decision, {
    setupId: setup.id,
    revision: setup.revision,
    kind: 'withdrawn',
    by,
    at: new Date(),
    reason: 'A newer revision was saved',
    meaning: 'The request for approval of this content is taken back.',
    hash,
  })
}
