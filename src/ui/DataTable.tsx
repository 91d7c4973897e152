import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import type { ListParams } from '../app/list-params.ts'
import { ListState, type ListQuery } from './ListState.tsx'

export interface Column<Row> {
  readonly key: string
  readonly head: string
  readonly cell: (row: Row) => ReactNode
  /** Name that the API sorts this column by. */
  readonly sort?: string
  /** Figures stand on the right. */
  readonly figures?: boolean
  /** Takes no label of its own in the stacked rows of a phone: pictures and the row's name. */
  readonly lead?: boolean
}

interface DataTableProps<Row> {
  readonly caption: string
  readonly columns: readonly Column<Row>[]
  readonly query: ListQuery<Row>
  readonly keyOf: (row: Row) => string
  readonly list: Pick<ListParams<string>, 'sort' | 'filtered' | 'clear' | 'hrefWith'>
  /** What to say, and to offer, when there is nothing yet. */
  readonly empty: ReactNode
}

/**
 * A ruled table whose sort, filters and page live in the URL. On a phone every row becomes a block. The first
 * column that holds a link with the class `row-link` makes the whole row take the press.
 */
export function DataTable<Row>({ caption, columns, query, keyOf, list, empty }: DataTableProps<Row>) {
  return (
    <ListState query={query} filtered={list.filtered} onClear={list.clear} empty={empty}>
      {(page) => (
        <>
          <table
            role="table"
            className="w-full border-collapse max-sm:block"
            aria-busy={query.isPlaceholderData}
          >
            <caption className="sr-only">{caption}</caption>
            <thead role="rowgroup" className="max-sm:sr-only">
              <tr role="row" className="border-b border-muted">
                {columns.map((column) => (
                  <Head key={column.key} column={column} list={list} />
                ))}
              </tr>
            </thead>
            <tbody role="rowgroup" className="max-sm:block">
              {page.items.map((row) => (
                <tr
                  role="row"
                  key={keyOf(row)}
                  className="relative border-b border-rule hover:bg-panel max-sm:flex max-sm:flex-wrap max-sm:gap-x-4 max-sm:items-baseline max-sm:py-3 max-sm:min-h-glove"
                >
                  {columns.map((column) => (
                    <td
                      role="cell"
                      key={column.key}
                      className={`py-2 pr-6 align-middle max-sm:p-0 max-sm:text-left max-sm:max-w-full break-words ${column.figures ? 'text-right' : ''} ${column.lead ? 'max-sm:w-full' : ''}`}
                    >
                      {!column.lead && (
                        <span className="sm:hidden text-label uppercase text-muted mr-2" aria-hidden="true">
                          {column.head}
                        </span>
                      )}
                      {column.cell(row)}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
          <Pages page={page} hrefWith={list.hrefWith} />
        </>
      )}
    </ListState>
  )
}

function Head<Row>({
  column,
  list,
}: {
  column: Column<Row>
  list: Pick<ListParams<string>, 'sort' | 'hrefWith'>
}) {
  const side = column.figures ? 'text-right' : 'text-left'
  const shape = `${side} font-normal text-label leading-6 uppercase text-muted pr-6 align-bottom whitespace-nowrap`
  if (column.sort === undefined)
    return (
      <th role="columnheader" scope="col" className={shape}>
        {column.head}
      </th>
    )
  const up = list.sort === column.sort
  const down = list.sort === `-${column.sort}`
  return (
    <th
      role="columnheader"
      scope="col"
      className={shape}
      aria-sort={up ? 'ascending' : down ? 'descending' : 'none'}
    >
      <Link
        to={list.hrefWith({ sort: up ? `-${column.sort}` : column.sort })}
        className="inline-block underline decoration-rule underline-offset-4 hover:text-ink"
      >
        {column.head} {up ? '↑' : down ? '↓' : ''}
      </Link>
    </th>
  )
}

function Pages({
  page,
  hrefWith,
}: {
  page: { page: number; pageSize: number; total: number; items: readonly unknown[] }
  hrefWith: ListParams<string>['hrefWith']
}) {
  const first = (page.page - 1) * page.pageSize
  if (page.total <= page.items.length) return <p className="text-small text-muted">{page.total} in all</p>
  return (
    <nav aria-label="Pages of the list" className="flex flex-wrap items-center gap-4">
      <p className="text-small text-muted">
        {first + 1} to {first + page.items.length} of {page.total}
      </p>
      {page.page > 1 && (
        <Link className="underline min-h-6" to={hrefWith({ page: page.page - 1 })}>
          Back
        </Link>
      )}
      {first + page.items.length < page.total && (
        <Link className="underline min-h-6" to={hrefWith({ page: page.page + 1 })}>
          Further
        </Link>
      )}
    </nav>
  )
}
