import { useQuery } from '@tanstack/react-query'
import { formatAngle } from '../../../shared/units/format.ts'
import { cornerName, edgeName } from '../../../shared/walls/names.ts'
import type { Evaluation } from '../../../shared/evaluate/schema.ts'
import type { Finding } from '../../../shared/findings/schema.ts'
import { revisionEvaluationQuery } from '../../api/setups.ts'
import { Balloon } from '../../ui/Balloon.tsx'
import { Button } from '../../ui/Button.tsx'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'
import { groupsOf } from './finding-groups.ts'

interface ReviewFindingsProps {
  readonly setupId: string
  readonly revision: number
  readonly hash: string
}

const severityWords = { stop: 'stop', warning: 'decide', note: 'good to know' } as const

/** The server's own evaluation of exactly the content that an approval would name. */
export function ReviewFindings({ setupId, revision, hash }: ReviewFindingsProps) {
  const query = useQuery(revisionEvaluationQuery(setupId, revision))
  if (query.error !== null)
    return (
      <ErrorNotice
        error={query.error}
        actions={<Button onClick={() => void query.refetch()}>Try again</Button>}
      />
    )
  if (query.data === undefined) return <p role="status">Evaluating…</p>
  if (query.data.hash !== hash)
    return <Notice tone="breach">What was evaluated is not what is shown here. Load the page again.</Notice>
  return <Findings evaluation={query.data.evaluation} />
}

function Findings({ evaluation: { findings, neededTilt } }: { evaluation: Evaluation }) {
  return (
    <div className="flex flex-col gap-2">
      {neededTilt !== null && (
        <p>
          Needed at most: <strong>{formatAngle(neededTilt.tilt)}</strong> at{' '}
          {'vertex' in neededTilt.at
            ? `corner ${cornerName(neededTilt.at)}`
            : `edge ${edgeName(neededTilt.at)}`}
        </p>
      )}
      {findings.length === 0 && <p>No finding: head, plate and part allow it.</p>}
      <ol>
        {groupsOf(findings).map(([first, ...more], index) => (
          <li key={index} className="flex gap-3 py-2 border-b border-rule">
            <Balloon tone={first.severity === 'stop' ? 'breach' : 'ink'}>{index + 1}</Balloon>
            <div className="min-w-0">
              <FindingText finding={first} />
              {more.length > 0 && (
                <details>
                  <summary className="cursor-pointer min-h-6 text-muted">and {more.length} like it</summary>
                  {more.map((finding, n) => (
                    <FindingText key={n} finding={finding} />
                  ))}
                </details>
              )}
            </div>
          </li>
        ))}
      </ol>
    </div>
  )
}

function FindingText({ finding: { severity, message, cure } }: { finding: Finding }) {
  return (
    <div className={severity === 'stop' ? 'text-breach' : ''}>
      <span className="text-label uppercase">{severityWords[severity]}</span> {message}
      {cure !== undefined && <p className="text-ink">Cure: {cure.message}</p>}
    </div>
  )
}
