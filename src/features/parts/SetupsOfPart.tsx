import { useQuery } from '@tanstack/react-query'
import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { setupsQuery } from '../../api/setups.ts'
import { useListParams } from '../../app/list-params.ts'
import { useUnit } from '../../app/preferences.ts'
import { formatLength } from '../../../shared/units/format.ts'
import { DataTable } from '../../ui/DataTable.tsx'
import { StateMark } from '../../ui/StateMark.tsx'
import { formatInstant } from '../../ui/when.ts'

/** The set-ups of one part, newest save first. */
export function SetupsOfPart({ partId, start }: { partId: string; start: ReactNode }) {
  const unit = useUnit()
  const list = useListParams([])
  const query = useQuery(setupsQuery({ partId, sort: '-savedAt', page: list.page, pageSize: 50 }))
  return (
    <DataTable
      caption="Set-ups of this part"
      query={query}
      keyOf={(setup) => setup.id}
      list={list}
      columns={[
        {
          key: 'name',
          head: 'Name',
          lead: true,
          cell: ({ id, name }) => (
            <Link to={`/setups/${id}`} className="row-link font-bold hover:underline">
              {name}
            </Link>
          ),
        },
        { key: 'state', head: 'State', cell: (setup) => <StateMark {...setup} /> },
        {
          key: 'plate',
          head: 'Plate',
          cell: ({ material, thickness }) => `${material} · ${formatLength(thickness, unit)}`,
        },
        { key: 'head', head: 'Head', cell: ({ headName }) => headName },
        {
          key: 'saved',
          head: 'Saved',
          cell: ({ savedAt, savedBy }) => (
            <span className="text-muted">
              {formatInstant(savedAt)}, {savedBy.name}
            </span>
          ),
        },
      ]}
      empty={
        <>
          <p>No set-up yet. A set-up gives this part a plate, a head and a tilt for every edge.</p>
          {start}
        </>
      }
    />
  )
}
