import { useState } from 'react'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import type { DisplayUnit } from '../../../../shared/units/length.ts'
import { parseAngle, readLengthField } from '../../../../shared/units/parse.ts'
import type { Quantity } from '../../../ui/NumberField.tsx'
import { useHeldNumber } from '../held.ts'
import { useActs } from '../model/store.ts'
import { useScene } from '../scene.ts'

interface SlotInputProps {
  readonly id: string
  readonly name: string
  readonly caption: string
  readonly quantity: Quantity
  /** mm or degrees; null where the selected edges differ. */
  readonly value: number | null
  readonly check: (value: number) => string | null
  readonly onChange: (value: number, run: string) => void
}

/** A number of the section drawing that is its own input: as wide as its text, its caption beneath. */
export function SlotInput({ id, name, caption, quantity, value, check, onChange }: SlotInputProps) {
  const { unit } = useScene()
  const acts = useActs()
  const { shown, error, take } = useHeldNumber(id, value, check, onChange)
  const [draft, setDraft] = useState<{ text: string; emitted: number | null; unit: DisplayUnit } | null>(null)
  const current = draft !== null && draft.emitted === shown && draft.unit === unit ? draft : null
  const text = current?.text ?? written(shown, quantity, unit)
  const parsed = current === null ? null : read(current.text, value, quantity, unit)
  const problem = parsed !== null && parsed.kind !== 'value' ? parsed.message : error

  function typed(next: string) {
    const result = read(next, value, quantity, unit)
    const emitted = result.kind === 'value' ? result.value : null
    setDraft({ text: next, emitted, unit })
    take(emitted)
  }

  function step(direction: number, event: { preventDefault: () => void }) {
    if (shown === null) return
    event.preventDefault()
    const next = Math.round((shown + direction * STEP[quantity]) * 1e6) / 1e6
    setDraft(null)
    take(next)
  }

  return (
    <label className="flex flex-col min-w-0">
      <input
        type="text"
        inputMode="text"
        autoComplete="off"
        data-landing
        aria-label={name}
        aria-invalid={problem !== undefined}
        aria-describedby={problem === undefined ? undefined : `${id}-problem`}
        value={text}
        placeholder="mixed"
        onChange={(event) => typed(event.target.value)}
        onFocus={(event) => event.target.select()}
        onBlur={() => {
          if (problem === undefined) setDraft(null)
          acts.settle()
        }}
        onKeyDown={(event) => {
          if (event.key === 'ArrowUp') step(1, event)
          if (event.key === 'ArrowDown') step(-1, event)
        }}
        className="w-full h-7 px-1.5 bg-panel border border-muted text-base font-medium focus:border-select focus:border-2 aria-invalid:border-breach aria-invalid:border-2 placeholder:text-muted"
      />
      <span
        id={`${id}-problem`}
        className={`text-[0.6875rem] leading-4 ${problem === undefined ? 'text-muted whitespace-nowrap' : 'text-breach bg-sheet z-10'}`}
      >
        {problem ?? caption}
      </span>
    </label>
  )
}

/** What an arrow key adds: a degree or a millimetre. */
const STEP: Record<Quantity, number> = { angle: 1, length: 1 }

function written(value: number | null, quantity: Quantity, unit: DisplayUnit): string {
  if (value === null) return ''
  return quantity === 'angle' ? formatAngle(value, { sign: true }) : formatLength(value, unit)
}

function read(text: string, stored: number | null, quantity: Quantity, unit: DisplayUnit) {
  return quantity === 'angle' ? parseAngle(text) : readLengthField(text, stored ?? Number.NaN, unit)
}
