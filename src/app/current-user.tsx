import { createContext, use } from 'react'
import type { CurrentUser } from '../../shared/api/people.ts'
import { mayCall } from '../../shared/api/policy.ts'
import type { RouteName } from '../../shared/api/routes.ts'

const CurrentUserContext = createContext<CurrentUser | null>(null)

export const CurrentUserProvider = CurrentUserContext.Provider

/** Who is signed in; every page inside the shell has one. */
export function useCurrentUser(): CurrentUser {
  const user = use(CurrentUserContext)
  if (user === null) throw new Error('useCurrentUser is for pages inside the shell')
  return user
}

/** Whether the person signed in may call a route; the server decides again on every call. */
export function useMay(route: RouteName): boolean {
  return mayCall(useCurrentUser().role, route)
}
