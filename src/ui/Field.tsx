import { useId, type ReactNode } from 'react'

/** The look of every control that holds text. */
export const controlClass =
  'w-full min-h-8 max-sm:min-h-11 px-2 py-1 bg-panel border border-muted text-ink placeholder:text-muted aria-invalid:border-breach aria-invalid:border-2 disabled:bg-face disabled:text-muted'

/** What ties a control to its label, hint and error; spread it on the control. */
export interface ControlProps {
  readonly id: string
  readonly 'aria-describedby': string | undefined
  readonly 'aria-invalid': true | undefined
}

interface FieldProps {
  readonly label: ReactNode
  readonly hint?: ReactNode
  readonly error?: string | undefined
  readonly unit?: string
  readonly children: (control: ControlProps) => ReactNode
}

/** A labelled control with its unit, a hint, and the error that says what to put right. */
export function Field({ label, hint, error, unit, children }: FieldProps) {
  const id = useId()
  const described = [
    hint === undefined ? null : `${id}-hint`,
    error === undefined ? null : `${id}-error`,
  ].filter((part) => part !== null)
  return (
    <div className="flex flex-col gap-1 min-w-0">
      <label htmlFor={id} className="text-small text-muted">
        {label}
        {unit !== undefined && <span> ({unit})</span>}
      </label>
      {children({
        id,
        'aria-describedby': described.length === 0 ? undefined : described.join(' '),
        'aria-invalid': error === undefined ? undefined : true,
      })}
      {hint !== undefined && (
        <p id={`${id}-hint`} className="text-small text-muted">
          {hint}
        </p>
      )}
      {error !== undefined && (
        <p id={`${id}-error`} className="text-small text-breach" role="alert">
          {error}
        </p>
      )}
    </div>
  )
}
