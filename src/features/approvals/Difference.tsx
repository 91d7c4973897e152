import { useQuery } from '@tanstack/react-query'
import type { Setup } from '../../../shared/api/setups.ts'
import { differenceOf } from '../../../shared/setup/difference.ts'
import type { SetupContent } from '../../../shared/setup/schema.ts'
import { revisionQuery } from '../../api/setups.ts'
import { useUnit } from '../../app/preferences.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorNotice } from '../../ui/Notice.tsx'

/** What changed from the approved revision to this one, line by line. */
export function Difference({ setup }: { setup: Setup }) {
  if (setup.approvedRevision === null) return <p>Never approved before: everything in it is new.</p>
  return <Since setup={setup} approved={setup.approvedRevision} />
}

function Since({ setup, approved }: { setup: Setup; approved: number }) {
  const query = useQuery(revisionQuery(setup.id, approved))
  if (query.error !== null)
    return (
      <ErrorNotice
        error={query.error}
        actions={<Button onClick={() => void query.refetch()}>Try again</Button>}
      />
    )
  if (query.data === undefined) return <p role="status">Comparing…</p>
  return <Changes approved={approved} before={query.data.content} after={setup.revision.content} />
}

function Changes({
  approved,
  before,
  after,
}: {
  approved: number
  before: SetupContent
  after: SetupContent
}) {
  const changes = differenceOf(before, after, useUnit())
  if (changes.length === 0) return <p>Nothing: the content equals approved revision {approved}.</p>
  return (
    <table className="w-full">
      <caption className="text-left text-small text-muted pb-1">Against approved revision {approved}</caption>
      <thead>
        <tr className="text-label uppercase text-muted text-left border-b border-muted">
          <th scope="col" className="font-normal pr-3">
            What
          </th>
          <th scope="col" className="font-normal pr-3">
            Approved
          </th>
          <th scope="col" className="font-normal">
            Now
          </th>
        </tr>
      </thead>
      <tbody>
        {changes.map((change, index) => (
          <tr key={index} className="border-b border-rule align-top">
            <th scope="row" className="font-medium text-left py-1 pr-3">
              {change.what}
            </th>
            <td className="py-1 pr-3 text-muted break-words">{change.before}</td>
            <td className="py-1 break-words">{change.after}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
