import { Link } from 'react-router-dom'
import type { SetupRow } from '../../shared/api/setups.ts'
import { formatLength } from '../../shared/units/format.ts'
import { useUnit } from '../app/preferences.ts'
import type { Column } from './DataTable.tsx'
import { StateMark } from './StateMark.tsx'
import { formatInstant } from './when.ts'

/** What such a list can be sorted by; the newest save comes first where nothing is asked. */
export const setupSorts = ['savedAt', '-savedAt', 'name', '-name'] as const

/** The columns of a list of set-ups, wherever one stands; the name leads to the bench. */
export function useSetupColumns(): Column<SetupRow>[] {
  const unit = useUnit()
  return [
    {
      key: 'name',
      head: 'Set-up',
      sort: 'name',
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
      key: 'savedAt',
      head: 'Saved',
      sort: 'savedAt',
      cell: ({ savedAt, savedBy }) => (
        <span className="text-muted">
          {formatInstant(savedAt)}, {savedBy.name}
        </span>
      ),
    },
  ]
}
