import type { ReactNode } from 'react'
import { NetworkError } from '../api/errors.ts'
import { Button } from './Button.tsx'
import { ErrorNotice, Notice } from './Notice.tsx'

export interface ListPage<Row> {
  readonly items: readonly Row[]
  readonly total: number
  readonly page: number
  readonly pageSize: number
}

/** What a list needs of a query's result. */
export interface ListQuery<Row> {
  readonly data: ListPage<Row> | undefined
  readonly error: unknown
  readonly fetchStatus: 'fetching' | 'paused' | 'idle'
  readonly isPlaceholderData?: boolean
  readonly refetch: () => unknown
}

interface ListStateProps<Row> {
  readonly query: ListQuery<Row>
  readonly filtered: boolean
  readonly onClear: () => void
  readonly empty: ReactNode
  readonly children: (page: ListPage<Row>) => ReactNode
}

/** The five states of a list: being read, nothing yet, nothing left by the filters, failed, offline. */
export function ListState<Row>({ query, filtered, onClear, empty, children }: ListStateProps<Row>) {
  const { data, error } = query
  const again = <Button onClick={() => query.refetch()}>Try again</Button>
  const offline = query.fetchStatus === 'paused' || error instanceof NetworkError
  if (data === undefined) {
    if (offline)
      return (
        <Notice title="No connection" actions={again}>
          The list cannot be read now. It is read again as soon as the connection is back.
        </Notice>
      )
    if (error !== null) return <ErrorNotice error={error} actions={again} />
    return <LoadingRows />
  }
  return (
    <div className="flex flex-col gap-3">
      {(offline || error !== null) && (
        <Notice title={offline ? 'No connection' : 'Not up to date'} actions={again}>
          This is the list as it was last read.
        </Notice>
      )}
      {data.items.length > 0 ? (
        children(data)
      ) : filtered ? (
        <Notice title="Nothing fits" actions={<Button onClick={onClear}>Take the filters off</Button>}>
          No entry fits these filters.
        </Notice>
      ) : (
        <div className="border border-dashed border-muted px-4 py-8 flex flex-col items-start gap-3">
          {empty}
        </div>
      )}
    </div>
  )
}

const ROWS = 4

function LoadingRows() {
  return (
    <div role="status" className="appear-late">
      <p className="text-muted pb-2">Reading…</p>
      {Array.from({ length: ROWS }, (_, i) => (
        <div key={i} className="h-10 border-b border-rule" />
      ))}
    </div>
  )
}
