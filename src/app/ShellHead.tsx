import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, NavLink, useLocation } from 'react-router-dom'
import { mayCall } from '../../shared/api/policy.ts'
import type { RouteName } from '../../shared/api/routes.ts'
import { signOutMutation } from '../api/session.ts'
import { useCurrentUser } from './current-user.tsx'
import { ThemeChoice, UnitChoice } from './PreferenceChoices.tsx'

const places: readonly { to: string; label: string; needs: RouteName }[] = [
  { to: '/parts', label: 'Parts', needs: 'listParts' },
  { to: '/setups', label: 'Set-ups', needs: 'listSetups' },
  { to: '/approvals', label: 'Approvals', needs: 'approveSetup' },
  { to: '/heads', label: 'Heads', needs: 'listHeads' },
  { to: '/people', label: 'People', needs: 'listUsers' },
  { to: '/record', label: 'Record', needs: 'listAudit' },
]

const cell = 'flex items-center px-3 min-h-10 border-r border-rule hover:bg-face'

/** The sheet's top row: name, places, person, unit and theme in ruled cells. What does not fit goes to a menu. */
export function ShellHead() {
  const { pathname } = useLocation()
  // The menu belongs to the place where it was opened: going elsewhere closes it.
  const [openAt, setOpenAt] = useState<string | null>(null)
  const open = openAt === pathname
  return (
    <header
      className="bg-panel border-b border-rule print:hidden"
      onKeyDown={(event) => {
        if (event.key === 'Escape') setOpenAt(null)
      }}
    >
      <div className="flex items-stretch">
        <Link to="/" className={`${cell} text-large font-medium tracking-widest`}>
          UNDERCANT
        </Link>
        <nav aria-label="Places" className="hidden md:flex">
          <Places inRow />
        </nav>
        <div className="hidden xl:flex ml-auto items-stretch">
          <Person />
        </div>
        <button
          type="button"
          className={`${cell} xl:hidden ml-auto border-l cursor-pointer min-w-11`}
          aria-expanded={open}
          aria-controls="shell-menu"
          onClick={() => setOpenAt(open ? null : pathname)}
        >
          {open ? 'Close' : 'Menu'}
        </button>
      </div>
      {open && (
        <div id="shell-menu" className="xl:hidden border-t border-rule flex flex-col">
          <nav aria-label="Places" className="md:hidden flex flex-col">
            <Places />
          </nav>
          <Person />
        </div>
      )}
    </header>
  )
}

function Places({ inRow = false }: { inRow?: boolean }) {
  const { role } = useCurrentUser()
  const shape = inRow
    ? cell
    : 'flex items-center px-3 min-h-glove text-large border-b border-rule hover:bg-face'
  return places
    .filter(({ needs }) => mayCall(role, needs))
    .map(({ to, label }) => (
      <NavLink
        key={to}
        to={to}
        className={({ isActive }) =>
          `${shape} ${isActive ? 'text-select shadow-none underline decoration-2 underline-offset-4' : ''}`
        }
      >
        {label}
      </NavLink>
    ))
}

function Person() {
  const user = useCurrentUser()
  const signOut = useMutation(signOutMutation(useQueryClient()))
  return (
    <>
      <div className="flex items-center px-3 max-xl:py-2 xl:border-l border-rule max-xl:border-b">
        <UnitChoice />
      </div>
      <div className="flex items-center px-3 max-xl:py-2 xl:border-l border-rule max-xl:border-b">
        <ThemeChoice />
      </div>
      <Link
        to="/account"
        className="flex items-center px-3 min-h-10 max-xl:min-h-glove xl:border-l border-rule max-xl:border-b hover:bg-face"
      >
        {user.name} · {user.role}
      </Link>
      <button
        type="button"
        disabled={signOut.isPending}
        onClick={() => signOut.mutate()}
        className="flex items-center px-3 min-h-10 max-xl:min-h-glove xl:border-l border-rule hover:bg-face cursor-pointer"
      >
        {signOut.isError ? 'Sign out failed, try again' : 'Sign out'}
      </button>
    </>
  )
}
