import type { SetupState } from '../../shared/api/setups.ts'

interface StateMarkProps {
  readonly state: SetupState
  readonly revision: number
  readonly approvedRevision: number | null
}

const looks: Record<SetupState, string> = {
  draft: 'border-muted border-dashed',
  submitted: 'border-select text-select',
  approved: 'border-good text-good',
  returned: 'border-breach text-breach',
}

/** Revision and state, ruled; says when an older revision is the approved one. */
export function StateMark({ state, revision, approvedRevision }: StateMarkProps) {
  return (
    <span className="inline-flex flex-wrap items-center gap-x-2">
      <span className={`border px-1.5 whitespace-nowrap ${looks[state]}`}>
        rev {revision} · {state}
      </span>
      {approvedRevision !== null && approvedRevision !== revision && (
        <span className="text-small text-good">rev {approvedRevision} approved</span>
      )}
    </span>
  )
}
