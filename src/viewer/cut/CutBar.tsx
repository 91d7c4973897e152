import { formatLength } from '../../../shared/units/format.ts'
import { Button } from '../../ui/Button.tsx'
import { NumberField } from '../../ui/NumberField.tsx'
import { useUnit } from '../../app/preferences.ts'
import type { ChosenCut, CutChoice } from './cut-choice.ts'

interface CutBarProps {
  readonly choice: CutChoice
  /** Null: there is no edge to cut across. */
  readonly cut: ChosenCut | null
  readonly area: number
  readonly onChange: (choice: CutChoice | null) => void
}

const words: Record<CutChoice['direction'], string> = {
  X: 'Cut at X',
  Y: 'Cut at Y',
  Z: 'Cut at Z (0 is the top face)',
  edge: 'Cut across the edge',
}

/** Where the part is cut open: a slider, a number, and the other half. */
export function CutBar({ choice, cut, area, onChange }: CutBarProps) {
  const unit = useUnit()
  const label = words[choice.direction]
  return (
    <div
      role="group"
      aria-label="Place of the cut"
      className="flex flex-wrap items-end gap-3 border-t border-rule bg-panel px-3 py-1.5"
    >
      {cut === null ? (
        <p className="grow text-muted">Select an edge to cut across it.</p>
      ) : (
        <>
          <input
            type="range"
            aria-label={label}
            min={cut.from}
            max={cut.to}
            step={(cut.to - cut.from) / 400}
            value={cut.at}
            aria-valuetext={formatLength(cut.at, unit)}
            onChange={(event) => onChange({ ...choice, at: event.target.valueAsNumber })}
            className="grow basis-40 min-h-8 accent-[var(--select)]"
          />
          <div className="w-40">
            <NumberField
              label={label}
              quantity="length"
              value={cut.at}
              onChange={(at) => at !== null && onChange({ ...choice, at })}
            />
          </div>
          <output className="text-small text-muted self-center">{areaText(area, unit)}</output>
          <Button
            aria-pressed={choice.turned}
            onClick={() => onChange({ ...choice, turned: !choice.turned })}
          >
            Other half
          </Button>
        </>
      )}
      <Button onClick={() => onChange(null)}>Whole part</Button>
    </div>
  )
}

function areaText(area: number, unit: 'mm' | 'in'): string {
  return unit === 'mm' ? `${area.toFixed(1)} mm²` : `${(area / 25.4 ** 2).toFixed(3)} in²`
}
