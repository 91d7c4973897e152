import { useEffect, useState } from 'react'
import { controlClass } from './Field.tsx'

/** Long enough that a word is typed before the list is asked for again. */
const PAUSE_MS = 250

interface SearchFieldProps {
  readonly label: string
  readonly value: string
  readonly onChange: (value: string) => void
}

/** Text that filters a list once the typing pauses. */
export function SearchField({ label, value, onChange }: SearchFieldProps) {
  const [draft, setDraft] = useState<string | null>(null)
  useEffect(() => {
    if (draft === null) return
    const timer = setTimeout(() => {
      onChange(draft)
      setDraft(null)
    }, PAUSE_MS)
    return () => clearTimeout(timer)
  }, [draft, onChange])
  return (
    <label className="flex flex-col gap-1 max-sm:w-full sm:w-72">
      <span className="text-small text-muted">{label}</span>
      <input
        type="search"
        value={draft ?? value}
        onChange={(event) => setDraft(event.target.value)}
        className={controlClass}
        maxLength={120}
      />
    </label>
  )
}
