import type { Finding } from '../../../shared/findings/schema.ts'
import { Heading } from './Heading.tsx'

const WORDS = { stop: 'STOP', warning: 'Warning', note: 'Note' } as const
const ORDER = ['stop', 'warning', 'note'] as const

/** What the evaluation found, the gravest first. */
export function FindingsList({ findings }: { findings: readonly Finding[] }) {
  const sorted = ORDER.flatMap((severity) => findings.filter((finding) => finding.severity === severity))
  return (
    <section className="print:mt-[5mm]">
      <Heading aside={`${findings.length}`}>Findings</Heading>
      {sorted.length === 0 ? (
        <p>None.</p>
      ) : (
        <ol>
          {sorted.map(({ severity, message, cure }, i) => (
            <li
              key={i}
              className="sheet-keep grid grid-cols-[6mm_18mm_1fr] gap-x-[2mm] py-[0.6mm] border-b border-neutral-400"
            >
              <span>{i + 1}</span>
              <strong>{WORDS[severity]}</strong>
              <span>
                {message}
                {cure && <span className="block">Cure: {cure.message}</span>}
              </span>
            </li>
          ))}
        </ol>
      )}
    </section>
  )
}
