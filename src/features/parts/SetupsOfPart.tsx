import { useQuery } from '@tanstack/react-query'
import type { ReactNode } from 'react'
import { setupsQuery } from '../../api/setups.ts'
import { oneOf, useListParams } from '../../app/list-params.ts'
import { DataTable } from '../../ui/DataTable.tsx'
import { setupSorts, useSetupColumns } from '../../ui/setup-columns.tsx'

/** The set-ups of one part, newest save first. */
export function SetupsOfPart({ partId, start }: { partId: string; start: ReactNode }) {
  const columns = useSetupColumns()
  const list = useListParams([])
  const sort = oneOf(list.sort, setupSorts) ?? '-savedAt'
  const query = useQuery(setupsQuery({ partId, sort, page: list.page, pageSize: 50 }))
  return (
    <DataTable
      caption="Set-ups of this part"
      query={query}
      keyOf={(setup) => setup.id}
      list={{ ...list, sort }}
      columns={columns}
      empty={
        <>
          <p>No set-up yet. A set-up gives this part a plate, a head and a tilt for every edge.</p>
          {start}
        </>
      }
    />
  )
}
