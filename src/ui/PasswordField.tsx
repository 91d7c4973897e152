import type { ReactNode } from 'react'
import type { UseFormRegisterReturn } from 'react-hook-form'
import { controlClass, Field } from './Field.tsx'

interface PasswordFieldProps {
  readonly label: string
  readonly hint?: ReactNode
  readonly error?: string | undefined
  /** What the browser's keeper of passwords may fill in. */
  readonly kind: 'current' | 'new'
  readonly registration: UseFormRegisterReturn
}

/** A password of a form, never shown. */
export function PasswordField({ label, hint, error, kind, registration }: PasswordFieldProps) {
  return (
    <Field label={label} hint={hint} error={error}>
      {(control) => (
        <input
          {...control}
          {...registration}
          type="password"
          autoComplete={`${kind}-password`}
          className={controlClass}
        />
      )}
    </Field>
  )
}
