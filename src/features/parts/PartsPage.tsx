import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import type { PartRow } from '../../../shared/api/parts.ts'
import { partsQuery } from '../../api/parts.ts'
import { useMay } from '../../app/current-user.tsx'
import { oneOf, useListParams } from '../../app/list-params.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { useUnit } from '../../app/preferences.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { DataTable, type Column } from '../../ui/DataTable.tsx'
import { formatSize } from '../../ui/measures.ts'
import { ProfileOutline } from '../../ui/ProfileOutline.tsx'
import { SearchField } from '../../ui/SearchField.tsx'
import { formatInstant } from '../../ui/when.ts'

const sorts = ['number', '-number', 'createdAt', '-createdAt'] as const

export default function PartsPage() {
  const list = useListParams(['q'])
  const query = useQuery(
    partsQuery({ ...list.values, sort: oneOf(list.sort, sorts) ?? 'number', page: list.page, pageSize: 50 }),
  )
  const mayAdd = useMay('createPart')
  const add = (
    <ButtonLink to="/parts/new" look="main">
      New part from a drawing
    </ButtonLink>
  )
  return (
    <Page>
      <PageHead
        title="Parts"
        cells={[{ label: 'Count', value: query.data?.total ?? '–' }]}
        actions={mayAdd ? add : undefined}
      />
      <PageBody>
        <SearchField label="Number or name" value={list.values.q ?? ''} onChange={(q) => list.set({ q })} />
        <DataTable
          caption="Parts"
          columns={useColumns()}
          query={query}
          keyOf={(part) => part.id}
          list={{ ...list, sort: list.sort ?? 'number' }}
          empty={
            <>
              <p>No part yet. A part begins with a drawing of its flat outline, as a DXF file.</p>
              {mayAdd ? add : <p className="text-muted">A programmer or an engineer adds the first one.</p>}
            </>
          }
        />
      </PageBody>
    </Page>
  )
}

function useColumns(): Column<PartRow>[] {
  const unit = useUnit()
  return [
    {
      key: 'outline',
      head: 'Outline',
      lead: true,
      cell: ({ loops, bounds }) => (
        <ProfileOutline loops={loops} bounds={bounds} className="h-14 w-24 max-sm:h-24 max-sm:w-full" />
      ),
    },
    {
      key: 'number',
      head: 'Number',
      sort: 'number',
      lead: true,
      cell: ({ id, number }) => (
        <Link to={`/parts/${id}`} className="row-link font-bold hover:underline">
          {number}
        </Link>
      ),
    },
    { key: 'name', head: 'Name', lead: true, cell: ({ name }) => name },
    {
      key: 'size',
      head: 'Size',
      figures: true,
      cell: ({ bounds }) => <span className="whitespace-nowrap">{formatSize(bounds, unit)}</span>,
    },
    { key: 'setups', head: 'Set-ups', figures: true, cell: ({ setups }) => setups },
    {
      key: 'createdAt',
      head: 'Added',
      sort: 'createdAt',
      cell: ({ createdAt, createdBy }) => (
        <span className="text-muted">
          {formatInstant(createdAt)}, {createdBy.name}
        </span>
      ),
    },
  ]
}
