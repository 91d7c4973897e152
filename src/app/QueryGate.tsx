import type { ReactNode } from 'react'
import { isCode } from '../api/errors.ts'
import { Button } from '../ui/Button.tsx'
import { ErrorNotice } from '../ui/Notice.tsx'
import { Loading } from './Loading.tsx'
import { NotFoundPage } from './NotFoundPage.tsx'
import { Page, PageBody, PageHead } from './Page.tsx'

interface QueryGateProps<T> {
  readonly query: { readonly data: T | undefined; readonly error: unknown; readonly refetch: () => unknown }
  readonly children: (data: T) => ReactNode
}

/** A page that lives on one thing: shows it once it is there, says so when it does not exist or cannot be read. */
export function QueryGate<T>({ query, children }: QueryGateProps<T>) {
  if (query.data !== undefined) return children(query.data)
  if (query.error === null) return <Loading />
  if (isCode(query.error, 'not-found', 'invalid-request')) return <NotFoundPage />
  return (
    <Page>
      <PageHead title="Not read" label="Error" />
      <PageBody narrow>
        <ErrorNotice
          error={query.error}
          actions={<Button onClick={() => query.refetch()}>Try again</Button>}
        />
      </PageBody>
    </Page>
  )
}
