import { isCode } from '../../api/errors.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'

/** Why a decision was not taken; what changed meanwhile must be looked at again first. */
export function DecisionProblem({ error }: { error: unknown }) {
  if (error === null) return null
  if (isCode(error, 'version-stale', 'hash-mismatch', 'wrong-state'))
    return (
      <Notice
        tone="breach"
        title="Nothing was decided"
        actions={<Button onClick={() => location.reload()}>Look at it again</Button>}
      >
        The set-up has changed since you opened it. Look at what it is now, then decide.
      </Notice>
    )
  return <ErrorNotice error={error} />
}
