import type { Change } from '../../../../shared/setup/difference.ts'

/** More changes than this are counted, not listed. */
const MOST_LISTED = 60

/** What changed, row by row: what, before, after. */
export function Changes({ changes, none }: { changes: readonly Change[]; none: string }) {
  if (changes.length === 0) return <p className="text-muted">{none}</p>
  const listed = changes.slice(0, MOST_LISTED)
  return (
    <div className="overflow-x-auto">
      <table className="w-full text-small text-left">
        <thead className="text-muted">
          <tr>
            <th className="pr-3 py-1 font-normal">What</th>
            <th className="pr-3 py-1 font-normal">Before</th>
            <th className="py-1 font-normal">After</th>
          </tr>
        </thead>
        <tbody>
          {listed.map(({ kind, what, before, after }) => (
            <tr key={`${kind} ${what}`} className="border-t border-rule align-top">
              <th className="pr-3 py-1 font-medium">{what}</th>
              <td className="pr-3 py-1 break-words">{before === '' ? 'empty' : before}</td>
              <td className="py-1 break-words">{after === '' ? 'empty' : after}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {changes.length > listed.length && (
        <p className="text-muted pt-1">and {changes.length - listed.length} more</p>
      )}
    </div>
  )
}
