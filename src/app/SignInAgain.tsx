import { useQueryClient } from '@tanstack/react-query'
import { lazy, Suspense, useEffect, useState } from 'react'
import type { CurrentUser } from '../../shared/api/people.ts'
import { answerGate, watchGate } from '../api/sign-in-gate.ts'
import { Dialog } from '../ui/Dialog.tsx'
import { useCurrentUser } from './current-user.tsx'

const SignInForm = lazy(() => import('../features/sign-in/SignInForm.tsx'))

/**
 * The session ended in mid-work: signs the person in where they are. The page behind keeps all that was typed,
 * and the calls that failed are sent again. Someone else signing in starts afresh instead.
 */
export function SignInAgain() {
  const [open, setOpen] = useState(false)
  const user = useCurrentUser()
  const client = useQueryClient()
  useEffect(() => watchGate(setOpen), [])
  if (!open) return null

  async function signedIn(next: CurrentUser) {
    if (next.id !== user.id) {
      answerGate(false)
      await client.resetQueries()
      return
    }
    answerGate(true)
  }

  return (
    <Dialog title="Your session has ended" onClose={() => answerGate(false)}>
      <p>Sign in again to go on. What you typed is still here, and it is saved once you are signed in.</p>
      <Suspense fallback={<p>Reading…</p>}>
        <SignInForm email={user.email} onSignedIn={(next) => void signedIn(next)} />
      </Suspense>
    </Dialog>
  )
}
