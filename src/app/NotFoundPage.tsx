import { useLocation } from 'react-router-dom'
import { ButtonLink } from '../ui/Button.tsx'
import { Page, PageBody, PageHead } from './Page.tsx'

export function NotFoundPage() {
  const { pathname } = useLocation()
  return (
    <Page>
      <PageHead title="No such sheet" label="Not found" />
      <PageBody narrow>
        <p>
          Nothing stands at <strong className="break-all">{pathname}</strong>. The link may be cut short, or
          what it named may belong to another installation.
        </p>
        <p>Look the part or the set-up up by its number:</p>
        <div className="flex flex-wrap gap-2">
          <ButtonLink to="/parts">Parts</ButtonLink>
          <ButtonLink to="/setups">Set-ups</ButtonLink>
        </div>
      </PageBody>
    </Page>
  )
}
