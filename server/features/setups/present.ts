import { In, type EntityManager } from 'typeorm'
import type {
  Decision as DecisionAnswer,
  Revision as RevisionAnswer,
  RevisionRow,
  Setup as SetupAnswer,
  SetupRow,
} from '../../../shared/api/setups.ts'
import { Decision } from '../../db/entities/decision.ts'
import { Part } from '../../db/entities/part.ts'
import { Setup } from '../../db/entities/setup.ts'
import { SetupRevision } from '../../db/entities/setup-revision.ts'
import { notFound } from '../../http/refusal.ts'
import { Persons } from '../people/persons.ts'
import { contentFrom, findRevision } from './content.ts'

export async function findSetup(manager: EntityManager, id: string): Promise<Setup> {
  const setup = await manager.findOneBy(Setup, { id })
  if (!setup) throw notFound('This set-up')
  return setup
}

export async function presentSetup(manager: EntityManager, id: string): Promise<SetupAnswer> {
  const setup = await findSetup(manager, id)
  const { name, partId, state, approvedRevision, version } = setup
  const revision = await presentRevision(manager, setup, setup.revision)
  return { id, name, partId, state, revision, approvedRevision, version }
}

export async function presentRevision(
  manager: EntityManager,
  setup: Setup,
  number: number,
): Promise<RevisionAnswer> {
  const revision = await findRevision(manager, setup.id, number)
  const [row] = await presentRevisionRows(manager, setup, [revision])
  return { ...(row as RevisionRow), content: contentFrom(revision.content) }
}

/** Every revision without its content, newest first. */
export async function listRevisionRows(manager: EntityManager, setup: Setup): Promise<RevisionRow[]> {
  const select = { setupId: true, number: true, hash: true, savedBy: true, savedAt: true } as const
  const revisions = await manager.find(SetupRevision, {
    select,
    where: { setupId: setup.id },
    order: { number: 'DESC' },
  })
  return presentRevisionRows(manager, setup, revisions)
}

async function presentRevisionRows(
  manager: EntityManager,
  setup: Setup,
  revisions: readonly SetupRevision[],
): Promise<RevisionRow[]> {
  const numbers = revisions.map((revision) => revision.number)
  const decisions = await manager.find(Decision, {
    where: { setupId: setup.id, revision: In(numbers) },
    order: { id: 'ASC' },
  })
  const persons = await Persons.load(manager, [
    ...revisions.map((revision) => revision.savedBy),
    ...decisions.map((decision) => decision.by),
  ])
  return revisions.map(({ number, hash, savedBy, savedAt }) => ({
    number,
    state: stateOf(setup, number),
    hash,
    savedBy: persons.of(savedBy),
    savedAt: savedAt.toISOString(),
    decisions: decisions
      .filter((decision) => decision.revision === number)
      .map((decision) => presentDecision(decision, persons)),
  }))
}

function presentDecision({ kind, by, at, reason, hash }: Decision, persons: Persons): DecisionAnswer {
  return { kind, by: persons.of(by), at: at.toISOString(), reason, hash }
}

/** The newest carries the set-up's state, the newest approved stays approved, the others have had their day. */
export function stateOf(setup: Setup, number: number): RevisionRow['state'] {
  if (number === setup.revision) return setup.state
  return number === setup.approvedRevision ? 'approved' : 'superseded'
}

export async function presentSetupRows(
  manager: EntityManager,
  setups: readonly Setup[],
): Promise<SetupRow[]> {
  const parts = await loadParts(
    manager,
    setups.map((setup) => setup.partId),
  )
  const persons = await Persons.load(
    manager,
    setups.flatMap((setup) => [setup.savedBy, setup.submittedBy]),
  )
  return setups.map((setup) => ({
    id: setup.id,
    name: setup.name,
    partId: setup.partId,
    partNumber: parts.get(setup.partId)?.number ?? '',
    partName: parts.get(setup.partId)?.name ?? '',
    state: setup.state,
    revision: setup.revision,
    approvedRevision: setup.approvedRevision,
    thickness: setup.thickness,
    material: setup.material,
    headName: setup.headName,
    savedBy: persons.of(setup.savedBy),
    savedAt: setup.savedAt.toISOString(),
    submittedBy: setup.submittedBy ? persons.of(setup.submittedBy) : null,
    submittedAt: setup.submittedAt?.toISOString() ?? null,
    version: setup.version,
  }))
}

async function loadParts(manager: EntityManager, ids: readonly string[]) {
  const select = { id: true, number: true, name: true } as const
  const parts =
    ids.length > 0 ? await manager.find(Part, { select, where: { id: In([...new Set(ids)]) } }) : []
  return new Map(parts.map((part) => [part.id, part]))
}
