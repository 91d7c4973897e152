import type { Reading } from '../../../../shared/drawing/schema.ts'
import { useUnit } from '../../../app/preferences.ts'
import { formatSize, loopsInWords } from '../../../ui/measures.ts'

interface PartPickerProps {
  readonly reading: Reading
  readonly pick: number
  readonly onPick: (index: number) => void
}

/** One of several parts in a drawing; the picture takes a press too. */
export function PartPicker({ reading, pick, onPick }: PartPickerProps) {
  const unit = useUnit()
  return (
    <fieldset className="flex flex-col max-h-80 overflow-y-auto">
      <legend className="text-small text-muted">
        The drawing holds {reading.parts.length} parts, largest first
      </legend>
      {reading.parts.map((part, index) => (
        <label
          key={part.outer}
          className="flex gap-2 items-center min-h-9 max-sm:min-h-11 border-b border-rule cursor-pointer hover:bg-panel has-checked:text-select"
        >
          <input
            type="radio"
            name="part"
            checked={index === pick}
            onChange={() => onPick(index)}
            className="accent-select"
          />
          <span>
            Part {index + 1}: {formatSize(part.bounds, unit)}, {loopsInWords(part.holes.length)}
          </span>
        </label>
      ))}
    </fieldset>
  )
}
