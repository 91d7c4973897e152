import type { Finding } from '../../../shared/findings/schema.ts'
import { findingGroups } from './finding-groups.ts'
import { Heading } from './Heading.tsx'

const WORDS = { stop: 'STOP', warning: 'Warning', note: 'Note' } as const

/** What the evaluation found, the gravest first. */
export function FindingsList({ findings }: { findings: readonly Finding[] }) {
  const groups = findingGroups(findings)
  return (
    <section className="print:mt-[5mm]">
      <Heading aside={`${findings.length}`}>Findings</Heading>
      {groups.length === 0 ? (
        <p>None.</p>
      ) : (
        <ol>
          {groups.map(({ first: { severity, message, cure }, alsoAt }, i) => (
            <li
              key={i}
              className="sheet-keep grid grid-cols-[6mm_18mm_1fr] gap-x-[2mm] py-[0.6mm] border-b border-neutral-400"
            >
              <span>{i + 1}</span>
              <strong>{WORDS[severity]}</strong>
              <span>
                {message}
                {alsoAt.length > 0 && (
                  <span className="block">
                    The same at {alsoAt.length} more: {alsoAt.join(', ')}.
                  </span>
                )}
                {cure && <span className="block">Cure: {cure.message}</span>}
              </span>
            </li>
          ))}
        </ol>
      )}
    </section>
  )
}
