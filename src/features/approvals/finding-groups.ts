import { findingSeverities, type Finding } from '../../../shared/findings/schema.ts'

/** Findings of one kind together, never empty. */
export type FindingGroup = readonly [Finding, ...Finding[]]

/** By severity, the worst first, then by code in the order of first mention: sixteen fillets read as one. */
export function groupsOf(findings: readonly Finding[]): FindingGroup[] {
  return findingSeverities.flatMap((severity) => {
    const groups = new Map<string, [Finding, ...Finding[]]>()
    for (const finding of findings) {
      if (finding.severity !== severity) continue
      const group = groups.get(finding.code)
      if (group === undefined) groups.set(finding.code, [finding])
      else group.push(finding)
    }
    return [...groups.values()]
  })
}
