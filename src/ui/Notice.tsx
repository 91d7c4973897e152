import type { ReactNode } from 'react'
import { messageOf, requestIdOf } from '../api/errors.ts'

type Tone = 'plain' | 'breach' | 'good'

const tones: Record<Tone, string> = {
  plain: 'border-rule border-l-muted',
  breach: 'border-breach border-l-breach text-breach',
  good: 'border-rule border-l-good',
}
const marks: Record<Tone, string> = { plain: 'Note', breach: 'Stop', good: 'Done' }

interface NoticeProps {
  readonly tone?: Tone
  readonly title?: string
  readonly children: ReactNode
  readonly actions?: ReactNode
}

/** A ruled block of words; its kind is written, not only coloured. A breach is announced at once. */
export function Notice({ tone = 'plain', title, children, actions }: NoticeProps) {
  return (
    <div
      role={tone === 'breach' ? 'alert' : 'note'}
      className={`border border-l-4 bg-panel px-3 py-2 flex flex-col gap-1 ${tones[tone]}`}
    >
      <p className="text-label uppercase">{title ?? marks[tone]}</p>
      <div>{children}</div>
      {actions !== undefined && <div className="flex flex-wrap gap-2 pt-1">{actions}</div>}
    </div>
  )
}

/** A failure in words, with the number that the logs know it by. */
export function ErrorNotice({ error, actions }: { error: unknown; actions?: ReactNode }) {
  const id = requestIdOf(error)
  return (
    <Notice tone="breach" actions={actions}>
      {messageOf(error)}
      {id !== null && <span className="block text-small text-muted">Request {id}</span>}
    </Notice>
  )
}
