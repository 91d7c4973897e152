import type { ReactNode } from 'react'

interface BalloonProps {
  readonly children: ReactNode
  readonly tone?: 'ink' | 'breach' | 'select'
}

const tones = {
  ink: 'border-ink text-ink',
  breach: 'border-breach text-breach',
  select: 'border-select text-select',
}

/** The circled number of a margin note. */
export function Balloon({ children, tone = 'ink' }: BalloonProps) {
  return (
    <span
      className={`inline-flex size-6 shrink-0 items-center justify-center rounded-full border-[1.5px] bg-sheet text-small font-bold ${tones[tone]}`}
    >
      {children}
    </span>
  )
}
