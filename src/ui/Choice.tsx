import { useId } from 'react'

interface ChoiceProps<T extends string> {
  readonly legend: string
  readonly value: T
  readonly options: readonly { readonly value: T; readonly label: string }[]
  readonly onChange: (value: T) => void
  /** Shows the legend above the row; otherwise only screen readers are told. */
  readonly showLegend?: boolean
}

/** One of a few, side by side in ruled cells; real radio buttons, so the arrow keys move between them. */
export function Choice<T extends string>({
  legend,
  value,
  options,
  onChange,
  showLegend = false,
}: ChoiceProps<T>) {
  const name = useId()
  return (
    <fieldset className="flex flex-col gap-1 min-w-0">
      <legend className={showLegend ? 'text-small text-muted mb-1' : 'sr-only'}>{legend}</legend>
      <div className="inline-flex flex-wrap self-start">
        {options.map((option) => (
          <label
            key={option.value}
            className="-ml-px first:ml-0 px-2 min-h-8 max-sm:min-h-11 min-w-8 inline-flex items-center justify-center border border-muted cursor-pointer hover:bg-face has-checked:bg-ink has-checked:text-sheet has-focus-visible:outline-2 has-focus-visible:outline-select has-focus-visible:outline-offset-2"
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => onChange(option.value)}
              className="sr-only"
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  )
}
