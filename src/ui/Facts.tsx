import type { ReactNode } from 'react'

export type Fact = readonly [label: string, value: ReactNode]

/** Ruled rows of a label and its value, as the foot of a drawing has them. */
export function Facts({ facts }: { facts: readonly Fact[] }) {
  return (
    <dl className="flex flex-col">
      {facts.map(([label, value]) => (
        <div key={label} className="flex flex-wrap justify-between gap-x-4 py-1 border-b border-rule">
          <dt className="text-muted">{label}</dt>
          <dd className="font-medium text-right break-words min-w-0">{value}</dd>
        </div>
      ))}
    </dl>
  )
}
