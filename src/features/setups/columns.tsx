import type { SetupRow } from '../../../shared/api/setups.ts'
import type { Column } from '../../ui/DataTable.tsx'

/** Which part a set-up is of. */
export const partColumn: Column<SetupRow> = {
  key: 'part',
  head: 'Part',
  lead: true,
  cell: ({ partNumber, partName }) => (
    <>
      <span className="font-medium">{partNumber}</span> {partName}
    </>
  ),
}
