import type { ReactNode } from 'react'
import { Button } from './Button.tsx'
import { Notice } from './Notice.tsx'

interface ConflictProps {
  readonly theirs: ReactNode
  readonly mine: ReactNode
  readonly onTheirs: () => void
  readonly onMine: () => void
}

/** Someone else saved first: both sides, and the choice between them. */
export function Conflict({ theirs, mine, onTheirs, onMine }: ConflictProps) {
  return (
    <Notice
      tone="breach"
      title="Someone else saved first"
      actions={
        <>
          <Button onClick={onTheirs}>Keep what is saved</Button>
          <Button look="breach" onClick={onMine}>
            Save mine over it
          </Button>
        </>
      }
    >
      <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-3 text-ink">
        <dt className="text-muted">Saved now</dt>
        <dd className="font-medium break-words">{theirs}</dd>
        <dt className="text-muted">Yours</dt>
        <dd className="font-medium break-words">{mine}</dd>
      </dl>
    </Notice>
  )
}
