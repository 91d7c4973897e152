import type { Decision, RevisionRow, Setup } from '../../shared/api/setups.ts'

/** How a revision stands: whether it may be worked from, and what has come since. */
export interface Standing {
  /** The decision that approved exactly this content; null when there is none that still holds. */
  readonly approval: Decision | null
  /** Number of a newer approved revision: this one is superseded. */
  readonly supersededBy: number | null
  /** Number of a newer revision, not approved, while this one is not superseded. */
  readonly newerDraft: number | null
  /** The newest returning of this content, for its reason. */
  readonly returned: Decision | null
}

type Revision = Pick<RevisionRow, 'number' | 'hash' | 'decisions'>

export function standingOf(
  revision: Revision,
  setup: Pick<Setup, 'approvedRevision' | 'revision'>,
): Standing {
  const last = revision.decisions.findLast(({ hash }) => hash === revision.hash)
  const approved = setup.approvedRevision
  const supersededBy = approved !== null && approved > revision.number ? approved : null
  const approval = last?.kind === 'approved' ? last : null
  const newest = setup.revision.number
  return {
    approval,
    supersededBy,
    newerDraft: supersededBy === null && newest > revision.number ? newest : null,
    returned: last?.kind === 'returned' ? last : null,
  }
}

/** Which revision a page shows: the one asked for, else the newest approved, else the newest. */
export function revisionToShow(
  asked: string | null,
  setup: Pick<Setup, 'approvedRevision' | 'revision'>,
): number {
  if (asked !== null && /^[1-9]\d{0,5}$/.test(asked)) return Number(asked)
  return setup.approvedRevision ?? setup.revision.number
}

/** `7 · approved`, as the title block says it; the word is of this revision. */
export function revisionText(revision: Pick<RevisionRow, 'number' | 'state'>, standing: Standing): string {
  return `${revision.number} · ${standing.supersededBy === null ? revision.state : 'superseded'}`
}

/** First characters of a hash: enough to compare by eye. */
export function shortHash(hash: string): string {
  return hash.slice(0, 12)
}
