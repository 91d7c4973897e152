import { useQuery } from '@tanstack/react-query'
import { setupStates } from '../../../shared/api/setups.ts'
import { setupsQuery } from '../../api/setups.ts'
import { useCurrentUser } from '../../app/current-user.tsx'
import { oneOf, useListParams } from '../../app/list-params.ts'
import { Page, PageBody, PageHead } from '../../app/Page.tsx'
import { Choice } from '../../ui/Choice.tsx'
import { DataTable } from '../../ui/DataTable.tsx'
import { SearchField } from '../../ui/SearchField.tsx'
import { setupSorts, useSetupColumns } from '../../ui/setup-columns.tsx'
import { partColumn } from './columns.tsx'
import { WelderSetups } from './WelderSetups.tsx'

const PAGE_SIZE = 50

/** Every set-up; a welder gets the approved ones first, each with its joints to open. */
export default function SetupsPage() {
  const { role } = useCurrentUser()
  const list = useListParams(['q', 'state'])
  const state = oneOf(list.values.state, setupStates)
  const sort = oneOf(list.sort, setupSorts) ?? '-savedAt'
  const query = useQuery(setupsQuery({ q: list.values.q, state, sort, page: list.page, pageSize: PAGE_SIZE }))
  const columns = [partColumn, ...useSetupColumns()]
  const empty = <p>No set-up yet. A programmer starts one from a part.</p>
  return (
    <Page>
      <PageHead title="Set-ups" cells={[{ label: 'Count', value: query.data?.total ?? '–' }]} />
      <PageBody>
        <div className="flex flex-wrap items-end gap-4">
          <SearchField
            label="Set-up, part number or name"
            value={list.values.q ?? ''}
            onChange={(q) => list.set({ q })}
          />
          <Choice
            legend="State"
            showLegend
            value={state ?? 'all'}
            options={[
              { value: 'all' as const, label: 'all' },
              ...setupStates.map((value) => ({ value, label: value })),
            ]}
            onChange={(next) => list.set({ state: next === 'all' ? undefined : next })}
          />
        </div>
        {role === 'welder' ? (
          <WelderSetups query={query} list={list} empty={empty} />
        ) : (
          <DataTable
            caption="Set-ups"
            columns={columns}
            query={query}
            keyOf={(setup) => setup.id}
            list={{ ...list, sort }}
            empty={empty}
          />
        )}
      </PageBody>
    </Page>
  )
}
