import type { LengthUnit, Reading } from '../../../../shared/drawing/schema.ts'
import { useUnit } from '../../../app/preferences.ts'
import { Button } from '../../../ui/Button.tsx'
import { formatSize } from '../../../ui/measures.ts'
import { Notice } from '../../../ui/Notice.tsx'
import { boundsIn, unitWords } from './options.ts'

/** Asks about the unit when the size is improbable in the one used. */
export function UnitQuestion({
  reading,
  onChoose,
}: {
  reading: Reading
  onChoose: (unit: LengthUnit) => void
}) {
  const shown = useUnit()
  const { used, suggested, declared } = reading.unit
  if (suggested === null || reading.bounds === null) return null
  const source = declared === null ? 'The file names no unit; read' : 'Read'
  return (
    <Notice
      title="Is the unit right?"
      actions={
        <>
          <Button look="main" onClick={() => onChoose(suggested)}>
            Read it in {unitWords[suggested]}
          </Button>
          <Button onClick={() => onChoose(used)}>Keep {unitWords[used]}</Button>
        </>
      }
    >
      {source} in {unitWords[used]}, the drawing is <strong>{formatSize(reading.bounds, shown)}</strong>. In{' '}
      {unitWords[suggested]} it would be{' '}
      <strong>{formatSize(boundsIn(reading.bounds, used, suggested), shown)}</strong>. Did you mean{' '}
      {unitWords[suggested]}?
    </Notice>
  )
}
