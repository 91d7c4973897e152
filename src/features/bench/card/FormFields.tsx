import { useState } from 'react'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { formatLength } from '../../../../shared/units/format.ts'
import { Button } from '../../../ui/Button.tsx'
import { Choice } from '../../../ui/Choice.tsx'
import { BenchNumber } from '../BenchNumber.tsx'
import { cardForms, formWords, inForm, readForm, withRootFace, type CardForm } from '../model/prep-form.ts'
import { useActs, useContent } from '../model/store.ts'
import { facetsOf, shared, withFacets } from '../model/walls.ts'
import { useScene } from '../scene.ts'
import { StartDialog } from './StartDialog.tsx'

interface FormFieldsProps {
  readonly lead: EdgeRef
  readonly selection: readonly EdgeRef[]
}

/** The form of the prep for all selected edges, its root face, and where to start from. */
export function FormFields({ lead, selection }: FormFieldsProps) {
  const { readOnly, unit } = useScene()
  const content = useContent()
  const acts = useActs()
  const [starting, setStarting] = useState(false)
  const { thickness } = content.plate
  const forms = selection.map((edge) => readForm(facetsOf(content, edge)))
  const form = shared(forms.map((each) => each.form))
  const rootFace = shared(forms.map((each) => each.rootFace))
  if (readOnly) return null

  const options = cardForms.map((value) => ({ value: value as CardForm, label: formWords[value] }))
  const shownForm = form.mixed ? null : form.value
  const takesRootFace = !form.mixed && form.value !== 'square' && form.value !== 'own'

  function choose(value: CardForm) {
    if (value === 'own') return
    acts.edit((before) => withFacets(before, selection, (facets) => inForm(facets, value, thickness)))
  }

  return (
    <div className="flex flex-col gap-2">
      <Choice
        showLegend
        legend={form.mixed ? 'Bevel: mixed' : shownForm === 'own' ? `Bevel: ${formWords.own}` : 'Bevel'}
        value={shownForm ?? ('own' as CardForm)}
        options={options}
        onChange={choose}
      />
      {takesRootFace && (
        <BenchNumber
          id={`root-face ${lead.loop}-${lead.edge}`}
          label="Root face, 0 for none"
          quantity="length"
          value={rootFace.mixed ? null : rootFace.value}
          check={(mm) =>
            mm >= 0 && mm < thickness ? null : `Less than the plate, ${formatLength(thickness, unit)}.`
          }
          onChange={(mm, run) =>
            acts.edit(
              (before) => withFacets(before, selection, (facets) => withRootFace(facets, mm) ?? facets),
              run,
            )
          }
        />
      )}
      <div>
        <Button onClick={() => setStarting(true)}>Start from a joint form…</Button>
      </div>
      {starting && <StartDialog selection={selection} onClose={() => setStarting(false)} />}
    </div>
  )
}
