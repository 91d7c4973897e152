import type { EdgeRef } from '../../../../shared/walls/types.ts'
import {
  CHECK_EDITION,
  startingValuesFor,
  type Range,
  type StartingValue,
} from '../../../../shared/prep/starting-values.ts'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../../shared/units/length.ts'
import { Button } from '../../../ui/Button.tsx'
import { Caution } from '../../../ui/Caution.tsx'
import { Dialog } from '../../../ui/Dialog.tsx'
import { startFrom } from '../model/start.ts'
import { useActs, useContent } from '../model/store.ts'
import { withFacets, withJoint } from '../model/walls.ts'
import { wallWords } from '../model/words.ts'
import { useScene } from '../scene.ts'

interface StartDialogProps {
  readonly selection: readonly EdgeRef[]
  readonly onClose: () => void
}

/** Joint forms that suit the plate's thickness, with their ranges and where each was read. */
export function StartDialog({ selection, onClose }: StartDialogProps) {
  const { unit } = useScene()
  const { plate } = useContent()
  const acts = useActs()
  const rows = startingValuesFor(plate.thickness).flatMap((row) => {
    const start = startFrom(row, plate.thickness)
    return start === null ? [] : [{ row, start }]
  })
  return (
    <Dialog wide title="Start from a joint form" onClose={onClose}>
      <Caution>{CHECK_EDITION}</Caution>
      <p>
        The middle of each range is set on {selection.length === 1 ? 'the edge' : `${selection.length} edges`}
        , with the root opening of its joint. All of it can be changed afterwards.
      </p>
      <ul className="flex flex-col">
        {rows.map(({ row, start }, i) => (
          <li key={i} className="border-t border-rule py-2 flex flex-wrap justify-between gap-x-4 gap-y-1">
            <div className="grow basis-64">
              <p className="font-medium">
                {row.standard} {row.detail}: {row.form}
              </p>
              <p className="text-small">{rangesText(row, unit)}</p>
              <p className="text-small">gives {wallWords(start.facets, unit)}</p>
              <p className="text-small text-muted">
                {row.source}
                {row.known === 'memory' && !row.source.includes('memory') ? ', from memory' : ''}
              </p>
            </div>
            <Button
              className="self-center"
              aria-label={`Set ${row.standard} ${row.detail}, ${row.form}`}
              onClick={() => {
                acts.edit((before) =>
                  withJoint(
                    withFacets(before, selection, () => start.facets),
                    selection,
                    (joint) => ({ ...joint, ...start.joint }),
                  ),
                )
                onClose()
              }}
            >
              Set it
            </Button>
          </li>
        ))}
      </ul>
    </Dialog>
  )
}

function rangesText({ angleOf, angle, rootOpening, rootFace }: StartingValue, unit: DisplayUnit): string {
  const length = (mm: number) => formatLength(mm, unit)
  return [
    `${angleOf} angle ${rangeText(angle, formatAngle)}`,
    `root opening ${rangeText(rootOpening, length)}`,
    `root face ${rangeText(rootFace, length)}`,
  ].join(', ')
}

function rangeText({ from, to }: Range, write: (value: number) => string): string {
  if (to === null) return `${write(from)} and more`
  return from === to ? write(from) : `${write(from)} to ${write(to)}`
}
