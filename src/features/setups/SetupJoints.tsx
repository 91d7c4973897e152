import { useQuery } from '@tanstack/react-query'
import { edgeKey, edgeName } from '../../../shared/walls/names.ts'
import type { SetupRow } from '../../../shared/api/setups.ts'
import { describeWall } from '../../../shared/setup/describe.ts'
import { revisionQuery } from '../../api/setups.ts'
import { useUnit } from '../../app/preferences.ts'
import { Button, ButtonLink } from '../../ui/Button.tsx'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'
import { jointEdges } from './joint-edges.ts'

/** The joints of a set-up as large links: of the approved revision, or of the newest with a warning. */
export function SetupJoints({ setup }: { setup: SetupRow }) {
  const unit = useUnit()
  const revision = setup.approvedRevision ?? setup.revision
  const query = useQuery(revisionQuery(setup.id, revision))
  if (query.error !== null)
    return (
      <ErrorNotice
        error={query.error}
        actions={<Button onClick={() => void query.refetch()}>Try again</Button>}
      />
    )
  if (query.data === undefined)
    return (
      <p role="status" className="px-3 py-3">
        Reading the joints…
      </p>
    )
  const edges = jointEdges(query.data.content)
  return (
    <div className="border-t border-rule p-3 flex flex-col gap-3">
      {setup.approvedRevision === null && (
        <Notice tone="breach" title="Not approved">
          No revision of this set-up is approved. Do not fit or weld by it.
        </Notice>
      )}
      {edges.length === 0 && <p>This set-up has neither joints nor bevelled edges.</p>}
      <ul className="grid gap-2 sm:grid-cols-2 lg:grid-cols-3">
        {edges.map(({ edge, label, facets }) => (
          <li key={edgeKey(edge)}>
            <ButtonLink
              to={`/setups/${setup.id}/joint/${edgeKey(edge)}?rev=${revision}`}
              size="glove"
              className="w-full flex-col !items-start !gap-0 py-2 !text-left"
            >
              <span className="font-medium">
                {label === null ? '' : `${label} · `}
                {edgeName(edge)}
              </span>
              <span className="text-base text-muted">{describeWall(facets, unit)}</span>
            </ButtonLink>
          </li>
        ))}
      </ul>
    </div>
  )
}
