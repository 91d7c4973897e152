import { lengthUnits, type Reading } from '../../../../shared/drawing/schema.ts'
import { Checkbox } from '../../../ui/Checkbox.tsx'
import { Choice } from '../../../ui/Choice.tsx'
import { NumberField } from '../../../ui/NumberField.tsx'
import { withLayer, type Options } from './options.ts'

interface ReadingChoicesProps {
  readonly reading: Reading
  readonly options: Options
  readonly change: (change: Partial<Options>) => void
}

/** Largest gap and largest distance that the API takes, mm. */
const MAX_JOIN = 5
const ARC_RANGE = [0.0001, 1] as const

export function ReadingChoices({ reading, options, change }: ReadingChoicesProps) {
  const { declared, used } = reading.unit
  return (
    <div className="flex flex-col gap-4">
      <Choice
        legend={`Unit of the drawing (the file says ${declared ?? 'nothing'})`}
        showLegend
        value={options.unit ?? used}
        options={lengthUnits.map((unit) => ({ value: unit, label: unit }))}
        onChange={(unit) => change({ unit })}
      />
      <NumberField
        label="Largest gap that is joined"
        quantity="length"
        value={options.joinTolerance}
        hint="Ends nearer than this count as one. A large gap can join what should stay apart."
        onChange={(mm) => {
          if (mm !== null && mm >= 0 && mm <= MAX_JOIN) change({ joinTolerance: mm })
        }}
      />
      <div>
        <Checkbox
          checked={options.recogniseArcs}
          onChange={(event) => change({ recogniseArcs: event.target.checked })}
        >
          Take a run of short lines that lies on an arc for that arc
        </Checkbox>
        {options.recogniseArcs && (
          <NumberField
            label="Largest distance from the arc"
            quantity="length"
            value={options.arcTolerance}
            onChange={(mm) => {
              if (mm !== null && mm >= ARC_RANGE[0] && mm <= ARC_RANGE[1]) change({ arcTolerance: mm })
            }}
          />
        )}
      </div>
      <fieldset>
        <legend className="text-small text-muted">Layers</legend>
        {reading.layers.map((layer) => (
          <Checkbox
            key={layer.name}
            checked={options.layers === undefined ? layer.read : options.layers.includes(layer.name)}
            onChange={(event) =>
              change({ layers: withLayer(reading.layers, layer.name, event.target.checked) })
            }
          >
            <span className="break-all">{layer.name}</span>{' '}
            <span className="text-muted">
              {layer.entities} {layer.entities === 1 ? 'entity' : 'entities'}
            </span>
          </Checkbox>
        ))}
      </fieldset>
    </div>
  )
}
