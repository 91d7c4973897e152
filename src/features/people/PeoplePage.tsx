import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { roles } from '../../../shared/api/common.ts'
import type { User } from '../../../shared/api/people.ts'
import { peopleQuery } from '../../api/people.ts'
import { oneOf, useListParams } from '../../app/list-params.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { Button } from '../../ui/Button.tsx'
import { Choice } from '../../ui/Choice.tsx'
import { DataTable, type Column } from '../../ui/DataTable.tsx'
import { SearchField } from '../../ui/SearchField.tsx'
import { formatInstant } from '../../ui/when.ts'
import { AddPersonDialog } from './AddPersonDialog.tsx'
import { EditPersonDialog } from './EditPersonDialog.tsx'

/** Who may sign in, as what. */
export default function PeoplePage() {
  const list = useListParams(['q', 'role'])
  const role = oneOf(list.values.role, roles)
  const query = useQuery(peopleQuery({ q: list.values.q, role, page: list.page, pageSize: 50 }))
  const [open, setOpen] = useState<'add' | User | null>(null)
  const add = (
    <Button look="main" onClick={() => setOpen('add')}>
      Add a person
    </Button>
  )
  return (
    <Page>
      <PageHead title="People" cells={[{ label: 'Count', value: query.data?.total ?? '–' }]} actions={add} />
      <PageBody>
        <div className="flex flex-wrap items-end gap-4">
          <SearchField label="Name or email" value={list.values.q ?? ''} onChange={(q) => list.set({ q })} />
          <Choice
            legend="Role"
            showLegend
            value={role ?? 'all'}
            options={[
              { value: 'all' as const, label: 'all' },
              ...roles.map((value) => ({ value, label: value })),
            ]}
            onChange={(next) => list.set({ role: next === 'all' ? undefined : next })}
          />
        </div>
        <DataTable
          caption="People"
          columns={columnsFor(setOpen)}
          query={query}
          keyOf={(user) => user.id}
          list={list}
          empty={add}
        />
      </PageBody>
      {open === 'add' && <AddPersonDialog onClose={() => setOpen(null)} />}
      {open !== null && open !== 'add' && <EditPersonDialog person={open} onClose={() => setOpen(null)} />}
    </Page>
  )
}

function columnsFor(edit: (user: User) => void): Column<User>[] {
  return [
    {
      key: 'name',
      head: 'Name',
      lead: true,
      cell: ({ name, disabled }) => (
        <span className={disabled ? 'line-through text-muted' : 'font-bold'}>{name}</span>
      ),
    },
    { key: 'email', head: 'Email', cell: ({ email }) => <span className="break-all">{email}</span> },
    { key: 'role', head: 'Role', cell: ({ role }) => role },
    { key: 'state', head: 'State', cell: ({ disabled }) => (disabled ? 'disabled' : 'may sign in') },
    {
      key: 'since',
      head: 'Since',
      cell: ({ createdAt }) => <span className="text-muted">{formatInstant(createdAt)}</span>,
    },
    {
      key: 'acts',
      head: 'Change',
      lead: true,
      cell: (user) => (
        <Button onClick={() => edit(user)} aria-label={`Change ${user.name}`}>
          Change
        </Button>
      ),
    },
  ]
}
