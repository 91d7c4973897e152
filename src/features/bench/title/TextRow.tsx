import { useState } from 'react'
import { controlClass, Field } from '../../../ui/Field.tsx'
import { useActs } from '../model/store.ts'
import { useScene } from '../scene.ts'

interface TextRowProps {
  readonly id: string
  readonly label: string
  readonly value: string
  readonly most: number
  readonly required?: boolean
  readonly onChange: (value: string, run: string) => void
}

/** A short text of the content. One that may not be empty holds the save back while it is. */
export function TextRow({ id, label, value, most, required = false, onChange }: TextRowProps) {
  const acts = useActs()
  const { readOnly } = useScene()
  const [emptied, setEmptied] = useState(false)

  function take(text: string) {
    const missing = required && text.trim() === ''
    setEmptied(missing)
    acts.understood(id, !missing)
    if (!missing) onChange(text, id)
  }

  return (
    <Field label={label} error={emptied ? 'It needs a name.' : undefined}>
      {(control) => (
        <input
          {...control}
          type="text"
          maxLength={most}
          disabled={readOnly}
          value={emptied ? '' : value}
          onChange={(event) => take(event.target.value)}
          onBlur={() => {
            setEmptied(false)
            acts.understood(id, true)
            acts.settle()
          }}
          className={controlClass}
        />
      )}
    </Field>
  )
}
