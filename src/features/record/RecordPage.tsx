import { useQuery } from '@tanstack/react-query'
import type { AuditEntry } from '../../../shared/api/record.ts'
import { recordQuery } from '../../api/record.ts'
import { useListParams } from '../../app/list-params.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { Button } from '../../ui/Button.tsx'
import { DataTable, type Column } from '../../ui/DataTable.tsx'
import { SearchField } from '../../ui/SearchField.tsx'
import { formatInstant } from '../../ui/when.ts'
import { EntryDetails } from './EntryDetails.tsx'

/** Everything that was done, by whom, in order; nothing in it can be changed. */
export default function RecordPage() {
  const list = useListParams(['q', 'action', 'subjectId'])
  const query = useQuery(recordQuery({ ...list.values, page: list.page, pageSize: 50 }))
  return (
    <Page>
      <PageHead title="Record" cells={[{ label: 'Entries', value: query.data?.total ?? '–' }]} />
      <PageBody>
        <div className="flex flex-wrap items-end gap-4">
          <SearchField
            label="Person or subject"
            value={list.values.q ?? ''}
            onChange={(q) => list.set({ q })}
          />
          <SearchField
            label="Act, for instance setup.approve"
            value={list.values.action ?? ''}
            onChange={(action) => list.set({ action })}
          />
          {list.values.subjectId !== undefined && (
            <Button onClick={() => list.set({ subjectId: undefined })}>
              Show every subject, not only one
            </Button>
          )}
        </div>
        <DataTable
          caption="Record, newest first"
          columns={columnsFor((subjectId) => list.set({ subjectId }))}
          query={query}
          keyOf={(entry) => String(entry.id)}
          list={list}
          empty={<p>Nothing on record yet.</p>}
        />
        <p className="text-small text-muted">
          Every entry carries the hash of the one before it, so that one taken out or changed would show.
        </p>
      </PageBody>
    </Page>
  )
}

function columnsFor(onlySubject: (id: string) => void): Column<AuditEntry>[] {
  return [
    { key: 'id', head: 'No.', figures: true, cell: ({ id }) => <span className="text-muted">{id}</span> },
    {
      key: 'at',
      head: 'When',
      cell: ({ at }) => <span className="whitespace-nowrap">{formatInstant(at)}</span>,
    },
    { key: 'actor', head: 'Who', cell: ({ actor }) => actor?.name ?? 'the system' },
    { key: 'action', head: 'Act', cell: ({ action }) => <span className="font-bold">{action}</span> },
    {
      key: 'subject',
      head: 'Subject',
      cell: ({ subject }) => (
        <button
          type="button"
          className="underline decoration-rule underline-offset-4 text-left break-all cursor-pointer hover:text-select min-h-6"
          onClick={() => onlySubject(subject.id)}
          title="Show only this subject"
        >
          {subject.kind} {subject.label}
        </button>
      ),
    },
    { key: 'details', head: 'Details', lead: true, cell: (entry) => <EntryDetails entry={entry} /> },
  ]
}
