import type { InputHTMLAttributes, ReactNode } from 'react'

/** A square that is ticked or not, its words beside it; the whole row takes the press. */
export function Checkbox({
  children,
  ...rest
}: InputHTMLAttributes<HTMLInputElement> & { children: ReactNode }) {
  return (
    <label className="flex items-start gap-2 min-h-8 max-sm:min-h-11 py-1 cursor-pointer">
      <input {...rest} type="checkbox" className="size-4 mt-0.5 shrink-0 accent-select" />
      <span>{children}</span>
    </label>
  )
}
