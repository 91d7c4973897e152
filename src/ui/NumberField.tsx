import { useState, type ReactNode } from 'react'
import { formatAngle, formatLength } from '../../shared/units/format.ts'
import type { DisplayUnit } from '../../shared/units/length.ts'
import { parseAngle, parseLength, readLengthField } from '../../shared/units/parse.ts'
import type { ParsedNumber } from '../../shared/units/parsed.ts'
import { useUnit } from '../app/preferences.ts'
import { controlClass, Field } from './Field.tsx'

export type Quantity = 'length' | 'angle'

interface NumberFieldProps {
  readonly label: string
  readonly quantity: Quantity
  /** Millimetres or degrees; null while there is none. */
  readonly value: number | null
  /** Called on every keystroke: the value, or null while the text is not understood. */
  readonly onChange: (value: number | null) => void
  readonly onBlur?: () => void
  readonly hint?: ReactNode
  /** What the form holds against the value; shown once the text itself is understood. */
  readonly error?: string | undefined
  readonly disabled?: boolean
  readonly required?: boolean
  readonly className?: string
}

function shownAs(value: number | null, quantity: Quantity, unit: DisplayUnit): string {
  if (value === null) return ''
  return quantity === 'angle' ? formatAngle(value, { bare: true }) : formatLength(value, unit, { bare: true })
}

function read(text: string, stored: number | null, quantity: Quantity, unit: DisplayUnit): ParsedNumber {
  if (quantity === 'angle') return parseAngle(text)
  return stored === null ? parseLength(text, unit) : readLengthField(text, stored, unit)
}

/**
 * A number as people type it (`12,5`, `1 1/2 in`, `22.5°`), with how it was understood repeated beneath while
 * it differs from what was typed, and a question where it can be read two ways.
 */
export function NumberField(props: NumberFieldProps) {
  const { label, quantity, value, onChange, hint, error, disabled, required, className = '' } = props
  const unit = useUnit()
  const shown = shownAs(value, quantity, unit)
  const [draft, setDraft] = useState<{ text: string; emitted: number | null; unit: DisplayUnit } | null>(null)
  // A value that changed elsewhere (undo, another selection) or another unit ends the draft.
  const current = draft !== null && draft.emitted === value && draft.unit === unit ? draft : null
  const text = current?.text ?? shown
  const parsed = read(text, value, quantity, unit)
  const empty = text.trim() === ''

  function take(next: string) {
    const result = read(next, value, quantity, unit)
    const emitted = result.kind === 'value' ? result.value : null
    setDraft({ text: next, emitted, unit })
    onChange(emitted)
  }

  const problem = current !== null && !empty && parsed.kind !== 'value' ? parsed.message : error
  const echo = current !== null && parsed.kind === 'value' && parsed.echo !== text ? parsed.echo : null
  return (
    <Field label={label} unit={quantity === 'angle' ? '°' : unit} hint={hint} error={problem}>
      {(control) => (
        <>
          <input
            {...control}
            type="text"
            inputMode="text"
            autoComplete="off"
            value={text}
            disabled={disabled}
            aria-required={required}
            onChange={(event) => take(event.target.value)}
            onFocus={(event) => event.target.select()}
            onBlur={() => {
              if (parsed.kind === 'value') setDraft(null)
              props.onBlur?.()
            }}
            className={`${controlClass} font-medium ${className}`}
          />
          {echo !== null && (
            <output htmlFor={control.id} className="text-small text-select">
              = {echo}
            </output>
          )}
          {current !== null && parsed.kind === 'ambiguous' && (
            <span className="flex flex-wrap gap-2">
              {parsed.readings.map((reading) => (
                <button
                  key={reading.echo}
                  type="button"
                  className="border border-select text-select px-2 min-h-8 cursor-pointer hover:bg-face"
                  onClick={() => {
                    setDraft(null)
                    onChange(reading.value)
                  }}
                >
                  {reading.echo}
                </button>
              ))}
            </span>
          )}
        </>
      )}
    </Field>
  )
}
