import type { JetSpec } from '../../../../shared/evaluate/schema.ts'
import type { SaveSetup } from '../../../../shared/api/setups.ts'
import { Button } from '../../../ui/Button.tsx'
import { Choice } from '../../../ui/Choice.tsx'
import { Dialog } from '../../../ui/Dialog.tsx'
import { Facts } from '../../../ui/Facts.tsx'
import { controlClass, Field } from '../../../ui/Field.tsx'
import { Select } from '../../../ui/Select.tsx'
import { formatAngle } from '../../../../shared/units/format.ts'
import { useActs, useContent } from '../model/store.ts'
import { withThickness } from '../model/walls.ts'
import { BenchNumber } from '../BenchNumber.tsx'
import { useScene } from '../scene.ts'
import { TextRow } from './TextRow.tsx'

const datums: readonly { value: SaveSetup['datum']; label: string }[] = [
  { value: 'top', label: 'the top edge' },
  { value: 'bottom', label: 'the bottom edge' },
  { value: 'root', label: 'the root line' },
]

/** Plate, head, jet and the rest that holds for the whole part; every change is seen on the sheet at once. */
export function SetupDialog({ onClose }: { onClose: () => void }) {
  const { heads, head, stored, readOnly } = useScene()
  const content = useContent()
  const acts = useActs()
  const { plate, jet, datum, note, name, headId } = content
  const set = (change: Partial<SaveSetup>, run?: string) =>
    acts.edit((before) => ({ ...before, ...change }), run)
  const setJet = (key: keyof JetSpec) => (value: number, run: string) =>
    acts.edit((before) => ({ ...before, jet: { ...before.jet, [key]: value } }), run)

  const known = heads.some(({ id }) => id === headId)
  const options = heads.map(({ id, name: label }) => ({ value: id, label }))
  if (!known) options.unshift({ value: headId, label: `${stored.head.name} (no longer listed)` })

  function chooseHead(id: string) {
    const chosen = heads.find((each) => each.id === id)
    if (chosen !== undefined) set({ headId: id, jet: chosen.jet })
  }

  return (
    <Dialog wide title="Plate, head, jet" onClose={onClose}>
      <div className="grid sm:grid-cols-2 gap-x-6 gap-y-3">
        <TextRow
          label="Name of the set-up"
          id="name"
          value={name}
          most={120}
          required
          onChange={(value, run) => set({ name: value }, run)}
        />
        <TextRow
          label="Material, as the shop names it"
          id="material"
          value={plate.material}
          most={120}
          onChange={(material, run) => set({ plate: { ...plate, material } }, run)}
        />
        <BenchNumber
          id="thickness"
          label="Plate thickness"
          quantity="length"
          value={plate.thickness}
          check={(mm) => (mm > 0 && mm <= 1_000 ? null : 'More than 0 and at most 1000 mm.')}
          onChange={(thickness, run) => acts.edit((before) => withThickness(before, thickness), run)}
          hint="Root faces keep their height; bevels take up the rest."
        />
        <Field label="Head" hint="Choosing a head brings its jet values along.">
          {(control) => (
            <Select
              {...control}
              disabled={readOnly}
              value={headId}
              options={options}
              onChange={(event) => chooseHead(event.target.value)}
            />
          )}
        </Field>
      </div>
      <Facts
        facts={[
          ['mechanical limit, never passed', formatAngle(head.mechanicalLimit)],
          [
            'working limit, set by an engineer',
            head.workingLimit === null ? 'none yet' : formatAngle(head.workingLimit),
          ],
        ]}
      />
      <fieldset disabled={readOnly} className="contents">
        <Choice
          showLegend
          legend="The drawing’s outline is"
          value={datum}
          options={datums}
          onChange={(value) => set({ datum: value })}
        />
      </fieldset>
      <section className="flex flex-col gap-3">
        <h3 className="text-label uppercase text-muted border-b border-rule pb-1">
          Jet, as the shop measures it
        </h3>
        <div className="grid sm:grid-cols-2 gap-x-6 gap-y-3">
          <BenchNumber
            id="kerf"
            label="Kerf at the top face"
            quantity="length"
            value={jet.kerf}
            check={(mm) => (mm > 0 && mm <= 10 ? null : 'More than 0 and at most 10 mm.')}
            onChange={setJet('kerf')}
          />
          <BenchNumber
            id="taper"
            label="Taper per side"
            quantity="angle"
            value={jet.taper}
            check={(degrees) => (Math.abs(degrees) <= 10 ? null : 'Between −10° and 10°.')}
            onChange={setJet('taper')}
            hint="Positive when the kerf narrows downward."
          />
          <BenchNumber
            id="standoff"
            label="Stand-off"
            quantity="length"
            value={jet.standoff}
            check={(mm) => (mm > 0 && mm <= 100 ? null : 'More than 0 and at most 100 mm.')}
            onChange={setJet('standoff')}
          />
          <BenchNumber
            id="nozzle"
            label="Nozzle diameter, outside"
            quantity="length"
            value={jet.nozzleDiameter}
            check={(mm) => (mm > 0 && mm <= 100 ? null : 'More than 0 and at most 100 mm.')}
            onChange={setJet('nozzleDiameter')}
          />
        </div>
      </section>
      <Field label="Note">
        {(control) => (
          <textarea
            {...control}
            rows={3}
            maxLength={4_000}
            disabled={readOnly}
            value={note}
            onChange={(event) => set({ note: event.target.value }, 'note')}
            onBlur={acts.settle}
            className={controlClass}
          />
        )}
      </Field>
      <div>
        <Button onClick={onClose}>Back to the part</Button>
      </div>
    </Dialog>
  )
}
