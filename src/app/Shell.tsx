import { useSuspenseQuery } from '@tanstack/react-query'
import { Suspense } from 'react'
import { Navigate, Outlet, useLocation } from 'react-router-dom'
import { sessionQuery } from '../api/session.ts'
import { Announcer } from '../ui/Announcer.tsx'
import { CurrentUserProvider } from './current-user.tsx'
import { Loading } from './Loading.tsx'
import { ShellHead } from './ShellHead.tsx'
import { SignInAgain } from './SignInAgain.tsx'

/** The frame of every page for someone signed in; anyone else is sent to sign in and brought back. */
export function Shell() {
  return (
    <Suspense fallback={<Loading />}>
      <SignedInShell />
    </Suspense>
  )
}

function SignedInShell() {
  const { data: user } = useSuspenseQuery(sessionQuery)
  const { pathname, search } = useLocation()
  if (user === null) {
    const next = pathname === '/' ? '' : `?next=${encodeURIComponent(pathname + search)}`
    return <Navigate to={`/sign-in${next}`} replace />
  }
  return (
    <CurrentUserProvider value={user}>
      <a
        href="#main"
        className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-panel focus:px-3 focus:py-2"
      >
        Skip to the sheet
      </a>
      <div className="min-h-dvh has-data-fill:h-dvh flex flex-col print:block">
        <ShellHead />
        <main id="main" tabIndex={-1} className="flex-1 min-h-0 flex flex-col outline-none print:block">
          <Suspense fallback={<Loading />}>
            <Outlet />
          </Suspense>
        </main>
      </div>
      <Announcer />
      <SignInAgain />
    </CurrentUserProvider>
  )
}
