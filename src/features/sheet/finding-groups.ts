import { cornerName, edgeName } from '../../../shared/walls/names.ts'
import type { Finding } from '../../../shared/findings/schema.ts'

const GRAVEST_FIRST = ['stop', 'warning', 'note'] as const

/** Findings that say the same of several places, told once. */
export interface FindingGroup {
  readonly first: Finding
  /** Names of the other places, in the order found. */
  readonly alsoAt: readonly string[]
}

/**
 * The gravest first; findings of one code with the same number and limit are told once, at the first place, if
 * the place is all that differs. A cure names its own edges, so findings with one are never gathered.
 */
export function findingGroups(findings: readonly Finding[]): FindingGroup[] {
  const sorted = GRAVEST_FIRST.flatMap((severity) =>
    findings.filter((finding) => finding.severity === severity),
  )
  const groups = new Map<string, Finding[]>()
  for (const [i, finding] of sorted.entries()) {
    const { code, severity, value, limit, cure } = finding
    const key = cure || placeOf(finding) === null ? `${i}` : JSON.stringify([code, severity, value, limit])
    const group = groups.get(key)
    if (group) group.push(finding)
    else groups.set(key, [finding])
  }
  return [...groups.values()].map(([first, ...others]) => ({
    first: first!,
    alsoAt: others.flatMap((finding) => placeOf(finding) ?? []),
  }))
}

function placeOf({ loop, edge, vertex }: Finding): string | null {
  if (loop === undefined) return null
  if (vertex !== undefined) return cornerName({ loop, vertex })
  return edge === undefined ? null : edgeName({ loop, edge })
}
