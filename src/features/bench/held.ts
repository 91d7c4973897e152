import { useEffect, useState } from 'react'
import { useActs } from './model/store.ts'

interface Held {
  readonly value: number | null
  readonly message: string
  /** The content's own number at that time: when it changes by other hands, what is held is let go. */
  readonly beside: number | null
}

interface HeldNumber {
  /** What the field shows: the content's number, or the one that is held back. */
  readonly shown: number | null
  readonly error: string | undefined
  readonly take: (next: number | null) => void
}

/**
 * A number on its way from a field to the content. While the text is not understood (null) or the number is not
 * allowed, the content keeps its last good one and the save waits.
 */
export function useHeldNumber(
  id: string,
  value: number | null,
  check: (value: number) => string | null,
  onChange: (value: number, run: string) => void,
): HeldNumber {
  const acts = useActs()
  const [held, setHeld] = useState<Held | null>(null)
  const current = held !== null && held.beside === value ? held : null
  const holds = current !== null
  useEffect(() => {
    acts.understood(id, !holds)
    return () => acts.understood(id, true)
  }, [acts, id, holds])

  return {
    shown: current === null ? value : current.value,
    error: current?.message,
    take: (next) => {
      const message = next === null ? 'Type a number.' : check(next)
      if (next !== null && message === null) {
        setHeld(null)
        onChange(next, id)
      } else {
        setHeld({ value: next, message: message ?? '', beside: value })
      }
    },
  }
}
