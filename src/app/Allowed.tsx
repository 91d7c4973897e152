import type { ReactNode } from 'react'
import { policy } from '../../shared/api/policy.ts'
import type { RouteName } from '../../shared/api/routes.ts'
import { useCurrentUser, useMay } from './current-user.tsx'
import { Notice } from '../ui/Notice.tsx'
import { Page, PageBody, PageHead } from './Page.tsx'

/** Shows the page to the roles that may call its route; tells the others whom to ask. */
export function Allowed({ route, children }: { route: RouteName; children: ReactNode }) {
  const may = useMay(route)
  const { role } = useCurrentUser()
  if (may) return children
  const access = policy[route]
  const roles = typeof access === 'string' ? access : access.join(' or ')
  return (
    <Page>
      <PageHead title="Not open to your role" />
      <PageBody narrow>
        <Notice title="Not open to your role">
          You are signed in as {role}. This page is for: {roles}. Ask an administrator if your role should
          change.
        </Notice>
      </PageBody>
    </Page>
  )
}
