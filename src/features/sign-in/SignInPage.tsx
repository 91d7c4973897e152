import { useEffect } from 'react'
import { useNavigate, useSearchParams } from 'react-router-dom'
import { ThemeChoice } from '../../app/PreferenceChoices.tsx'
import { placeAfterSignIn } from './next.ts'
import SignInForm from './SignInForm.tsx'
import { SheetMark } from './SheetMark.tsx'

export default function SignInPage() {
  const navigate = useNavigate()
  const [search] = useSearchParams()
  useEffect(() => {
    document.title = 'Sign in · Undercant'
  }, [])
  return (
    <main className="min-h-dvh grid lg:grid-cols-[1fr_28rem]">
      <div className="hidden lg:flex items-center justify-center border-r border-rule p-10">
        <SheetMark />
      </div>
      <div className="flex flex-col bg-panel">
        <div className="border-b border-rule px-5 py-4">
          <h1 className="text-figure font-medium tracking-widest">UNDERCANT</h1>
          <p className="text-muted">
            A tilt for every edge of the plate, where the bottom edge lands, and what the head cannot do.
          </p>
        </div>
        <div className="px-5 py-6 w-full max-w-md max-lg:self-center">
          <SignInForm
            onSignedIn={() => void navigate(placeAfterSignIn(search.get('next')), { replace: true })}
          />
        </div>
        <div className="mt-auto border-t border-rule px-5 py-3">
          <ThemeChoice />
        </div>
      </div>
    </main>
  )
}
