import type { ReactNode } from 'react'

type Tone = 'plain' | 'breach' | 'good'

const tones: Record<Tone, string> = {
  plain: 'border-l-muted',
  breach: 'border-l-breach text-breach',
  good: 'border-l-good',
}

interface BannerProps {
  readonly tone?: Tone
  readonly title: string
  readonly children: ReactNode
  readonly actions?: ReactNode
}

/** A notice of one line beside the acts: the sheet needs the height. A breach is announced at once. */
export function Banner({ tone = 'plain', title, children, actions }: BannerProps) {
  return (
    <div
      role={tone === 'breach' ? 'alert' : 'note'}
      className={`grow flex flex-wrap items-center gap-x-3 gap-y-1 border-l-4 px-3 py-1 text-small ${tones[tone]}`}
    >
      <p className="grow basis-72">
        <span className="text-label uppercase pr-2">{title}</span> {children}
      </p>
      {actions !== undefined && <div className="flex flex-wrap gap-2">{actions}</div>}
    </div>
  )
}
