import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { render } from '@testing-library/react'
import type { ReactNode } from 'react'
import { MemoryRouter, useLocation } from 'react-router-dom'
import { vi } from 'vitest'

/** What the page would have shown in its address bar. */
function Address() {
  const { pathname, search } = useLocation()
  return <p data-testid="address">{pathname + search}</p>
}

/** Renders a piece of a page with what every page has: a query client and an address. */
export function renderPiece(piece: ReactNode, at = '/') {
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } })
  return {
    client,
    ...render(
      <QueryClientProvider client={client}>
        <MemoryRouter initialEntries={[at]}>
          {piece}
          <Address />
        </MemoryRouter>
      </QueryClientProvider>,
    ),
  }
}

/** jsdom knows `dialog` but not how to show one. */
export function teachDialogs() {
  HTMLDialogElement.prototype.showModal = function () {
    this.setAttribute('open', '')
  }
  HTMLDialogElement.prototype.close = function () {
    this.removeAttribute('open')
  }
}

type Answer = { status?: number; body?: unknown }
type Handler = (body: unknown, headers: Headers) => Answer

/** Serves the API from a table of `METHOD /path`; anything else fails the test. */
export function serveApi(table: Record<string, Handler>) {
  const asked: { what: string; body: unknown; headers: Headers }[] = []
  vi.stubGlobal('fetch', (url: string, init: RequestInit) => {
    const what = `${init.method} ${url}`
    const handler = table[what]
    if (handler === undefined) return Promise.reject(new Error(`unexpected ${what}`))
    const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : undefined
    const headers = new Headers(init.headers)
    asked.push({ what, body, headers })
    const { status = 200, body: answer } = handler(body, headers)
    return Promise.resolve(new Response(answer === undefined ? null : JSON.stringify(answer), { status }))
  })
  return asked
}

export const refused = (status: number, code: string, message = 'Do this instead.'): Answer => ({
  status,
  body: { error: { code, message, requestId: 'r-1' } },
})
