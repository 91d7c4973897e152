import { useQuery } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { Link } from 'react-router-dom'
import type { SetupRow } from '../../../shared/api/setups.ts'
import { formatLength } from '../../../shared/units/format.ts'
import { setupsQuery } from '../../api/setups.ts'
import { useCurrentUser } from '../../app/current-user.tsx'
import { useListParams } from '../../app/list-params.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { useUnit } from '../../app/preferences.ts'
import { DataTable, type Column } from '../../ui/DataTable.tsx'
import { SearchField } from '../../ui/SearchField.tsx'
import { formatWait } from '../../ui/when.ts'

const MINUTE_MS = 60_000

/** What waits for an engineer, and how long; the longest wait first. */
export default function ApprovalsPage() {
  const list = useListParams(['q'])
  const query = useQuery({
    ...setupsQuery({ q: list.values.q, state: 'submitted', sort: 'savedAt', page: list.page, pageSize: 50 }),
    refetchInterval: MINUTE_MS,
  })
  return (
    <Page>
      <PageHead title="Approvals" cells={[{ label: 'Waiting', value: query.data?.total ?? '–' }]} />
      <PageBody>
        <SearchField
          label="Set-up, part number or name"
          value={list.values.q ?? ''}
          onChange={(q) => list.set({ q })}
        />
        <DataTable
          caption="Set-ups that wait for approval"
          columns={useColumns()}
          query={query}
          keyOf={(setup) => setup.id}
          list={list}
          empty={<p>Nothing waits. A set-up stands here once its programmer submits it.</p>}
        />
      </PageBody>
    </Page>
  )
}

function useColumns(): Column<SetupRow>[] {
  const unit = useUnit()
  const now = useNow()
  const me = useCurrentUser()
  return [
    {
      key: 'name',
      head: 'Part and set-up',
      lead: true,
      cell: ({ id, name, partNumber, partName }) => (
        <Link to={`/approvals/${id}`} className="row-link hover:underline">
          <span className="font-bold">{partNumber}</span> {partName} · {name}
        </Link>
      ),
    },
    { key: 'revision', head: 'Rev', figures: true, cell: ({ revision }) => revision },
    {
      key: 'before',
      head: 'Approved before',
      cell: ({ approvedRevision }) => (approvedRevision === null ? 'never' : `rev ${approvedRevision}`),
    },
    {
      key: 'plate',
      head: 'Plate',
      cell: ({ material, thickness }) => `${material} · ${formatLength(thickness, unit)}`,
    },
    { key: 'head', head: 'Head', cell: ({ headName }) => headName },
    {
      key: 'by',
      head: 'Submitted by',
      cell: ({ submittedBy }) =>
        submittedBy === null
          ? '–'
          : submittedBy.id === me.id
            ? `${submittedBy.name} (you)`
            : submittedBy.name,
    },
    {
      key: 'waits',
      head: 'Waits',
      figures: true,
      cell: ({ submittedAt }) => (
        <span className="font-medium whitespace-nowrap">
          {submittedAt === null ? '–' : formatWait(submittedAt, now)}
        </span>
      ),
    },
  ]
}

/** The time now, renewed every minute. */
function useNow(): Date {
  const [now, setNow] = useState(() => new Date())
  useEffect(() => {
    const timer = setInterval(() => setNow(new Date()), MINUTE_MS)
    return () => clearInterval(timer)
  }, [])
  return now
}
