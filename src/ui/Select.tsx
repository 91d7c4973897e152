import type { SelectHTMLAttributes } from 'react'
import { controlClass } from './Field.tsx'

interface SelectProps extends SelectHTMLAttributes<HTMLSelectElement> {
  readonly options: readonly { readonly value: string; readonly label: string }[]
}

/** The browser's own list of choices, in our ruled box. */
export function Select({ options, className = '', ...rest }: SelectProps) {
  return (
    <select {...rest} className={`${controlClass} ${className}`}>
      {options.map(({ value, label }) => (
        <option key={value} value={value}>
          {label}
        </option>
      ))}
    </select>
  )
}
