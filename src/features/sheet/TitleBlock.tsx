import type { Revision, Setup } from '../../../shared/api/setups.ts'
import { formatLength } from '../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../shared/units/length.ts'
import { revisionText, shortHash, type Standing } from '../../revision/standing.ts'
import { formatInstant } from '../../ui/when.ts'
import { QrCode } from './QrCode.tsx'
import { qrTarget } from './qr.ts'
import type { SheetRow } from './sheet-model.ts'

interface TitleBlockProps {
  readonly setup: Setup
  readonly revision: Revision
  readonly standing: Standing
  readonly rows: readonly SheetRow[]
  readonly unit: DisplayUnit
}

/** The ruled cells at the head of the sheet, with the code that opens this revision on a phone. */
export function TitleBlock({ setup, revision, standing, rows, unit }: TitleBlockProps) {
  const { content } = revision
  const target = qrTarget(setup.id, revision.number, rows)
  const cells: readonly (readonly [string, string, string?])[] = [
    ['Part', `${content.part.number} ${content.part.name}`, 'col-span-2'],
    ['Rev', revisionText(revision, standing)],
    ['Set-up', setup.name, 'col-span-2'],
    ['Hash', shortHash(revision.hash)],
    ['Plate', `${content.plate.material} · ${formatLength(content.plate.thickness, unit)}`],
    ['Head', content.head.name],
    ['Outline is', DATUMS[content.datum]],
    ['Saved', `${revision.savedBy.name}, ${formatInstant(revision.savedAt)}`, 'col-span-2'],
    ['Lengths in', unit === 'mm' ? 'millimetres' : 'inches'],
  ]
  return (
    <header className="flex border border-black sheet-keep">
      <div className="grow min-w-0">
        <p className="px-[2mm] py-[1mm] text-[11pt] font-bold tracking-widest border-b border-black">
          UNDERCANT <span className="font-normal">set-up sheet</span>
        </p>
        <dl className="grid grid-cols-3">
          {cells.map(([label, value, span = '']) => (
            <div key={label} className={`px-[2mm] py-[0.8mm] border-b border-r border-neutral-500 ${span}`}>
              <dt className="text-[6.5pt] uppercase tracking-wider">{label}</dt>
              <dd className="font-bold break-words">{value}</dd>
            </div>
          ))}
        </dl>
      </div>
      <div className="shrink-0 w-[38mm] p-[2mm] border-l border-black flex flex-col items-center gap-[1mm]">
        <QrCode text={`${location.origin}${target.path}`} size="30mm" label={target.label} />
        <p className="text-[6.5pt] text-center">{target.label}</p>
      </div>
    </header>
  )
}

const DATUMS = { top: 'the top edge', bottom: 'the bottom edge', root: 'the root' } as const
