import type { ReactNode } from 'react'

/** Words of care that go with everything the shop takes away. */
export function Caution({ children }: { children: ReactNode }) {
  return (
    <aside aria-label="Caution" className="border-t border-b border-muted py-2 text-small">
      <p className="text-label uppercase text-muted">Caution</p>
      {children}
    </aside>
  )
}
