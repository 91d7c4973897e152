// @vitest-environment jsdom
import { cleanup, fireEvent, screen } from '@testing-library/react'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { ApiError, NetworkError } from '../../../src/api/errors.ts'
import { useListParams } from '../../../src/app/list-params.ts'
import { DataTable } from '../../../src/ui/DataTable.tsx'
import type { ListQuery } from '../../../src/ui/ListState.tsx'
import { renderPiece } from './render.tsx'

interface Row {
  readonly name: string
}
const query = (over: Partial<ListQuery<Row>>): ListQuery<Row> => ({
  data: undefined,
  error: null,
  fetchStatus: 'idle',
  refetch: vi.fn(),
  ...over,
})
const page = (items: Row[], over = {}) => ({ items, total: items.length, page: 1, pageSize: 50, ...over })

function Table({ query: shown }: { query: ListQuery<Row> }) {
  const list = useListParams(['q'])
  return (
    <DataTable
      caption="Things"
      columns={[
        { key: 'name', head: 'Name', sort: 'name', cell: ({ name }) => name },
        { key: 'more', head: 'More', cell: () => 'x' },
      ]}
      query={shown}
      keyOf={({ name }) => name}
      list={list}
      empty={<p>Nothing here yet.</p>}
    />
  )
}

afterEach(cleanup)

describe('the states of a list', () => {
  it('says that it is being read', () => {
    renderPiece(<Table query={query({ fetchStatus: 'fetching' })} />)
    expect(screen.getByRole('status').textContent).toContain('Reading')
  })

  it('says what to do when there is nothing yet', () => {
    renderPiece(<Table query={query({ data: page([]) })} />)
    expect(screen.getByText('Nothing here yet.')).toBeDefined()
  })

  it('offers to take the filters off when they leave nothing', () => {
    renderPiece(<Table query={query({ data: page([]) })} />, '/things?q=zzz&page=3&sort=name')
    expect(screen.queryByText('Nothing here yet.')).toBeNull()
    fireEvent.click(screen.getByRole('button', { name: 'Take the filters off' }))
    expect(screen.getByTestId('address').textContent).toBe('/things?sort=name')
  })

  it('shows a refusal with its request and tries again', () => {
    const failed = query({ error: new ApiError(500, 'internal', 'It failed.', 'r-77') })
    renderPiece(<Table query={failed} />)
    expect(screen.getByRole('alert').textContent).toContain('r-77')
    fireEvent.click(screen.getByRole('button', { name: 'Try again' }))
    expect(failed.refetch).toHaveBeenCalledOnce()
  })

  it.each([query({ fetchStatus: 'paused' }), query({ error: new NetworkError() })])(
    'knows that it is offline',
    (away) => {
      renderPiece(<Table query={away} />)
      expect(screen.getByRole('note').textContent).toContain('No connection')
    },
  )

  it('keeps the rows that it had when the connection goes', () => {
    renderPiece(<Table query={query({ data: page([{ name: 'Gusset' }]), error: new NetworkError() })} />)
    expect(screen.getByText('Gusset')).toBeDefined()
    expect(screen.getByRole('note').textContent).toContain('as it was last read')
  })
})

describe('sort and pages', () => {
  it('stand in the URL and keep the filters', () => {
    renderPiece(<Table query={query({ data: page([{ name: 'a' }]) })} />, '/things?q=a&page=2')
    const head = () => screen.getByRole('columnheader', { name: /Name/ })
    expect(head().getAttribute('aria-sort')).toBe('none')
    fireEvent.click(screen.getByRole('link', { name: 'Name' }))
    expect(screen.getByTestId('address').textContent).toBe('/?q=a&sort=name'.replace('/?', '/things?'))
    expect(head().getAttribute('aria-sort')).toBe('ascending')
    fireEvent.click(screen.getByRole('link', { name: /Name/ }))
    expect(screen.getByTestId('address').textContent).toContain('sort=-name')
    expect(head().getAttribute('aria-sort')).toBe('descending')
  })

  it('lead on while there is more', () => {
    renderPiece(
      <Table query={query({ data: page([{ name: 'a' }], { total: 3, pageSize: 1, page: 2 }) })} />,
      '/things?page=2',
    )
    expect(screen.getByText('2 to 2 of 3')).toBeDefined()
    expect(screen.getByRole('link', { name: 'Back' }).getAttribute('href')).not.toContain('page=')
    expect(screen.getByRole('link', { name: 'Further' }).getAttribute('href')).toContain('page=3')
  })
})
