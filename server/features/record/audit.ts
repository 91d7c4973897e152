import { createHash } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import type { Person } from '../../../shared/api/common.ts'
import { AuditChain, AuditEntry } from '../../db/entities/audit.ts'

/** What is written about a change, beside who and when. */
export interface Deed {
  /** For example `setup.approve`. */
  readonly action: string
  readonly subject: { readonly kind: string; readonly id: string; readonly label: string }
  readonly details?: Readonly<Record<string, unknown>>
}

const CHAIN_ID = 1
const LABEL_LENGTH = 300

/**
 * Takes the chain's row. Audited transactions do this first, before they read anything: they then run one
 * after another and each sees all that went before.
 */
export async function lockChain(manager: EntityManager): Promise<AuditChain> {
  return manager.findOneOrFail(AuditChain, { where: { id: CHAIN_ID }, lock: { mode: 'pessimistic_write' } })
}

/** Appends one entry in the caller's transaction, bound to the entry before by its hash. */
export async function appendToRecord(
  manager: EntityManager,
  actor: Person | null,
  { action, subject, details = {} }: Deed,
): Promise<void> {
  const chain = await lockChain(manager)
  const entry = {
    id: chain.lastId + 1,
    at: new Date(),
    actorId: actor?.id ?? null,
    actorName: actor?.name ?? null,
    action,
    subjectKind: subject.kind,
    subjectId: subject.id,
    subjectLabel: subject.label.slice(0, LABEL_LENGTH),
    details: JSON.stringify(details),
    previousHash: chain.lastHash,
  }
  const hash = entryHash(entry)
  await manager.insert(AuditEntry, { ...entry, hash })
  await manager.update(AuditChain, { id: CHAIN_ID }, { lastId: entry.id, lastHash: hash })
}

/** SHA-256 over every field in a fixed order, the hash before included. */
export function entryHash(entry: Omit<AuditEntry, 'hash'>): string {
  const fields = [
    entry.id,
    entry.at.toISOString(),
    entry.actorId,
    entry.actorName,
    entry.action,
    entry.subjectKind,
    entry.subjectId,
    entry.subjectLabel,
    entry.details,
    entry.previousHash,
  ]
  return createHash('sha256').update(JSON.stringify(fields)).digest('hex')
}

/** Number of the first entry that does not follow from the one before, or null when the record is whole. */
export async function firstBrokenEntry(manager: EntityManager): Promise<number | null> {
  const chain = await manager.findOneByOrFail(AuditChain, { id: CHAIN_ID })
  const entries = await manager.find(AuditEntry, { order: { id: 'ASC' } })
  let previous = '0'.repeat(64)
  for (const [index, entry] of entries.entries()) {
    if (entry.id !== index + 1 || entry.previousHash !== previous || entryHash(entry) !== entry.hash) {
      return index + 1
    }
    previous = entry.hash
  }
  return chain.lastId === entries.length && chain.lastHash === previous ? null : entries.length + 1
}
