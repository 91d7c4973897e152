import type { ReactNode } from 'react'
import { NumberField, type Quantity } from '../../ui/NumberField.tsx'
import { useHeldNumber } from './held.ts'
import { useActs } from './model/store.ts'
import { useScene } from './scene.ts'

interface BenchNumberProps {
  /** Unique on the bench: it names the run of keystrokes and the field that holds a save back. */
  readonly id: string
  readonly label: string
  readonly quantity: Quantity
  /** mm or degrees; null where several edges differ. */
  readonly value: number | null
  /** What is wrong with a number, or null. */
  readonly check: (value: number) => string | null
  /** Called for every number that is understood and allowed. */
  readonly onChange: (value: number, run: string) => void
  readonly hint?: ReactNode
}

/** A labelled number that writes to the content on every keystroke; its keystrokes are one step of undo. */
export function BenchNumber({ id, label, quantity, value, check, onChange, hint }: BenchNumberProps) {
  const acts = useActs()
  const { readOnly } = useScene()
  const { shown, error, take } = useHeldNumber(id, value, check, onChange)
  return (
    <NumberField
      label={label}
      quantity={quantity}
      value={shown}
      onChange={take}
      onBlur={acts.settle}
      error={error}
      hint={hint}
      disabled={readOnly}
    />
  )
}
