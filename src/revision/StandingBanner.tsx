import { Link } from 'react-router-dom'
import type { RevisionRow } from '../../shared/api/setups.ts'
import { formatInstant } from '../ui/when.ts'
import type { Standing } from './standing.ts'

interface StandingBannerProps {
  readonly revision: Pick<RevisionRow, 'number' | 'state'>
  readonly standing: Standing
  /** Address of this page for another revision. */
  readonly linkTo: (revision: number) => string
}

const STRIPES = 'repeating-linear-gradient(135deg, var(--breach) 0 3px, transparent 3px 9px)'

/** Whether this may be worked from: in words, with a hatch where it may not. */
export function StandingBanner({ revision, standing, linkTo }: StandingBannerProps) {
  const { approval, supersededBy, newerDraft, returned } = standing
  if (approval && supersededBy === null) {
    return (
      <section aria-label="Approval" className="border-2 border-good bg-panel px-3 py-2">
        <p className="text-figure font-bold text-good">APPROVED</p>
        <p>
          Revision {revision.number}, by {approval.by.name}, {formatInstant(approval.at)}
        </p>
        {newerDraft !== null && (
          <p className="text-muted">
            Revision {newerDraft} is being worked on and is not approved. Work from this one.
          </p>
        )}
      </section>
    )
  }
  const current = supersededBy ?? newerDraft
  return (
    <section aria-label="Approval" className="border-2 border-breach bg-panel">
      <div className="h-4 border-b border-breach" style={{ backgroundImage: STRIPES }} aria-hidden="true" />
      <div className="px-3 py-2">
        <p className="text-figure font-bold text-breach">
          {supersededBy === null ? 'NOT APPROVED' : 'SUPERSEDED'}
        </p>
        {supersededBy === null ? (
          <p>
            Revision {revision.number} is {stateInWords(revision.state)}. Do not cut or weld from it.
            {returned?.reason && ` Returned by ${returned.by.name}: ${returned.reason}`}
          </p>
        ) : (
          <p>
            Revision {supersededBy} has been approved since
            {approval ? `; this one was approved by ${approval.by.name}, ${formatInstant(approval.at)}` : ''}.
            Do not work from revision {revision.number}.
          </p>
        )}
        {current !== null && (
          <Link
            to={linkTo(current)}
            className="inline-flex items-center min-h-glove text-large text-select underline underline-offset-2 print:hidden"
          >
            Open revision {current}
          </Link>
        )}
      </div>
      <div className="h-4 border-t border-breach" style={{ backgroundImage: STRIPES }} aria-hidden="true" />
    </section>
  )
}

function stateInWords(state: RevisionRow['state']): string {
  switch (state) {
    case 'draft':
      return 'a draft'
    case 'submitted':
      return 'waiting for approval'
    case 'returned':
      return 'returned to the programmer'
    case 'superseded':
      return 'superseded by a newer draft'
    case 'approved':
      return 'changed since it was approved'
  }
}
