import type { ReactNode } from 'react'

/** Heading of a part of the sheet over a rule. */
export function Heading({ children, aside }: { children: ReactNode; aside?: ReactNode }) {
  return (
    <div className="flex justify-between items-baseline gap-4 border-b border-black mb-[2mm]">
      <h2 className="text-[8pt] font-bold uppercase tracking-wider">{children}</h2>
      {aside !== undefined && <span className="text-[7.5pt]">{aside}</span>}
    </div>
  )
}
