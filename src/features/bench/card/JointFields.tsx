import { Link } from 'react-router-dom'
import { edgeKey } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import type { JointSpec } from '../../../../shared/setup/schema.ts'
import { Button } from '../../../ui/Button.tsx'
import { Choice } from '../../../ui/Choice.tsx'
import { controlClass, Field } from '../../../ui/Field.tsx'
import { BenchNumber } from '../BenchNumber.tsx'
import { useActs, useContent } from '../model/store.ts'
import { jointOf, shared, withJoint } from '../model/walls.ts'
import { useScene } from '../scene.ts'

interface JointFieldsProps {
  readonly lead: EdgeRef
  readonly selection: readonly EdgeRef[]
}

const BAND = 100

const mates: readonly { value: JointSpec['mate']; label: string }[] = [
  { value: 'same', label: 'the same prep' },
  { value: 'square', label: 'a square edge' },
]

const firstTolerance: NonNullable<JointSpec['tolerance']> = {
  angle: { plus: 0, minus: 0 },
  rootOpening: { plus: 0, minus: 0 },
  rootFace: { plus: 0, minus: 0 },
}

/** How the selected edges should fit their other plates; what the welder's page shows. */
export function JointFields({ lead, selection }: JointFieldsProps) {
  const { setup, newest, readOnly } = useScene()
  const content = useContent()
  const acts = useActs()
  const joints = selection.flatMap((edge) => jointOf(content, edge) ?? [])
  const change = (next: (joint: JointSpec) => JointSpec | null, run?: string) =>
    acts.edit((before) => withJoint(before, selection, next), run)
  const all = joints.length === selection.length
  const one = <T,>(read: (joint: JointSpec) => T) => {
    const value = shared(joints.map(read))
    return all && !value.mixed ? value.value : null
  }
  const id = (name: string) => `joint-${name} ${edgeKey(lead)} ${selection.length}`

  if (joints.length === 0) {
    return readOnly ? null : (
      <div>
        <Button onClick={() => change((joint) => joint)}>Add a joint</Button>
      </div>
    )
  }
  const label = one((joint) => joint.label)
  const toleranced = joints.filter(({ tolerance }) => tolerance !== undefined).length
  return (
    <fieldset className="flex flex-col gap-2 border-t border-ink pt-2 min-w-0">
      <legend className="sr-only">Joint</legend>
      <div className="flex flex-wrap justify-between items-baseline gap-x-3">
        <p className="text-label uppercase text-muted">
          Joint{all ? '' : ` on ${joints.length} of ${selection.length}`}
        </p>
        {selection.length === 1 && (
          <Link
            className="text-select underline underline-offset-2"
            to={`/setups/${setup.id}/joint/${edgeKey(lead)}${newest === null ? '' : `?rev=${setup.revision.number}`}`}
          >
            joint page
          </Link>
        )}
      </div>
      <Field label="Joint number on the drawing">
        {(control) => (
          <input
            {...control}
            type="text"
            maxLength={120}
            disabled={readOnly}
            placeholder={label === null ? 'mixed' : ''}
            value={label ?? ''}
            onChange={(event) => change((joint) => ({ ...joint, label: event.target.value }), id('label'))}
            onBlur={acts.settle}
            className={controlClass}
          />
        )}
      </Field>
      <BenchNumber
        key={id('gap')}
        id={id('gap')}
        label="Root opening"
        quantity="length"
        value={one((joint) => joint.rootOpening)}
        check={withinBand}
        onChange={(rootOpening, run) => change((joint) => ({ ...joint, rootOpening }), run)}
      />
      <fieldset disabled={readOnly} className="contents">
        <Choice
          showLegend
          legend="The other plate has"
          value={one((joint) => joint.mate) ?? ('' as JointSpec['mate'])}
          options={mates}
          onChange={(mate) => change((joint) => ({ ...joint, mate }))}
        />
      </fieldset>
      {toleranced > 0 ? (
        <Tolerances one={one} change={change} id={id} />
      ) : (
        !readOnly && (
          <div>
            <Button look="quiet" onClick={() => change((joint) => ({ ...joint, tolerance: firstTolerance }))}>
              Add tolerances from the welding procedure
            </Button>
          </div>
        )
      )}
      {!readOnly && (
        <div>
          <Button look="quiet" onClick={() => change(() => null)}>
            Take the joint away
          </Button>
        </div>
      )}
    </fieldset>
  )
}

function withinBand(value: number): string | null {
  return value >= 0 && value <= BAND ? null : `Between 0 and ${BAND}.`
}

const bands: readonly { key: keyof typeof firstTolerance; name: string; quantity: 'angle' | 'length' }[] = [
  { key: 'angle', name: 'Groove angle', quantity: 'angle' },
  { key: 'rootOpening', name: 'Root opening', quantity: 'length' },
  { key: 'rootFace', name: 'Root face', quantity: 'length' },
]

interface TolerancesProps {
  readonly one: <T>(read: (joint: JointSpec) => T) => T | null
  readonly change: (next: (joint: JointSpec) => JointSpec, run?: string) => void
  readonly id: (name: string) => string
}

function Tolerances({ one, change, id }: TolerancesProps) {
  return (
    <div className="grid grid-cols-2 gap-2">
      {bands.flatMap(({ key, name, quantity }) =>
        (['plus', 'minus'] as const).map((side) => (
          <BenchNumber
            key={id(`${key}-${side}`)}
            id={id(`${key}-${side}`)}
            label={`${name} ${side === 'plus' ? '+' : '−'}`}
            quantity={quantity}
            value={one((joint) => joint.tolerance?.[key][side] ?? null)}
            check={withinBand}
            onChange={(value, run) =>
              change((joint) => {
                const tolerance = joint.tolerance ?? firstTolerance
                return { ...joint, tolerance: { ...tolerance, [key]: { ...tolerance[key], [side]: value } } }
              }, run)
            }
          />
        )),
      )}
    </div>
  )
}
