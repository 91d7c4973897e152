import { Link, useRouteError } from 'react-router-dom'
import { isCode } from '../api/errors.ts'
import { Button } from '../ui/Button.tsx'
import { ErrorNotice } from '../ui/Notice.tsx'
import { NotFoundPage } from './NotFoundPage.tsx'
import { Page, PageBody, PageHead } from './Page.tsx'

/** What stands in a page's place when it failed; the shell round it stays usable. */
export function RouteError() {
  const error = useRouteError()
  if (isCode(error, 'not-found')) return <NotFoundPage />
  return (
    <Page>
      <PageHead title="This page stopped" label="Error" />
      <PageBody narrow>
        <ErrorNotice
          error={error}
          actions={
            <>
              <Button onClick={() => location.reload()}>Load the page again</Button>
              <Link to="/" className="underline self-center">
                Go to the parts
              </Link>
            </>
          }
        />
        <p className="text-muted">What was saved before is safe on the server.</p>
      </PageBody>
    </Page>
  )
}
