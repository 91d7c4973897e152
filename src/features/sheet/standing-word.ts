import type { Standing } from '../../revision/standing.ts'

/** The one word that paper must not be without. */
export function standingWord({ approval, supersededBy }: Standing): string {
  if (supersededBy !== null) return `SUPERSEDED BY REV ${supersededBy}`
  return approval ? 'APPROVED' : 'NOT APPROVED'
}
