import { cornerName, edgeName } from '../../../shared/walls/names.ts'
import type { Evaluation } from '../../../shared/evaluate/schema.ts'
import type { SetupContent } from '../../../shared/setup/schema.ts'
import { formatAngle, formatLength, formatVolume } from '../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { Heading } from './Heading.tsx'

interface SetupFactsProps {
  readonly content: SetupContent
  readonly evaluation: Evaluation
  readonly unit: DisplayUnit
}

/** Limits, jet and plate. */
export function SetupFacts({ content, evaluation, unit }: SetupFactsProps) {
  const { head, jet, plate } = content
  const { neededTilt, volume, firstEvent } = evaluation
  const length = (mm: number) => formatLength(mm, unit)
  const columns: readonly (readonly [string, readonly (readonly [string, string])[]])[] = [
    [
      'Limits of the head',
      [
        ['Mechanical', formatAngle(head.mechanicalLimit)],
        ['Working', head.workingLimit === null ? 'none set' : formatAngle(head.workingLimit)],
        [
          'Needed at most',
          neededTilt === null
            ? '–'
            : `${formatAngle(neededTilt.tilt)} at ${'vertex' in neededTilt.at ? cornerName(neededTilt.at) : edgeName(neededTilt.at)}`,
        ],
      ],
    ],
    [
      'Jet',
      [
        ['Kerf at the top', length(jet.kerf)],
        ['Taper, each side', formatAngle(jet.taper)],
        ['Stand-off', length(jet.standoff)],
        ['Nozzle diameter', length(jet.nozzleDiameter)],
      ],
    ],
    [
      'Part',
      [
        ['Material', plate.material],
        ['Thickness', length(plate.thickness)],
        ['Volume', volume === null ? '–' : formatVolume(volume, unit)],
        ['Sound down to', firstEvent ? length(firstEvent.depth) : 'the bottom'],
      ],
    ],
  ]
  return (
    <div className="grid grid-cols-3 gap-[5mm] print:mt-[5mm] sheet-keep">
      {columns.map(([title, facts]) => (
        <section key={title}>
          <Heading>{title}</Heading>
          <dl>
            {facts.map(([label, value]) => (
              <div
                key={label}
                className="flex justify-between gap-[2mm] border-b border-neutral-400 py-[0.4mm]"
              >
                <dt>{label}</dt>
                <dd className="font-bold text-right">{value}</dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
    </div>
  )
}
