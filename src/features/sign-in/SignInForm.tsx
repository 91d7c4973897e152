import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { signInBody, type CurrentUser } from '../../../shared/api/people.ts'
import { isCode } from '../../api/errors.ts'
import { aboutQuery, signInMutation } from '../../api/session.ts'
import { Button } from '../../ui/Button.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'
import { PasswordField } from '../../ui/PasswordField.tsx'

interface SignInFormProps {
  /** Filled in beforehand when someone signs in again. */
  readonly email?: string
  readonly onSignedIn: (user: CurrentUser) => void
}

/** The demo's one password, as the README gives it. */
const DEMO_PASSWORD = 'tidal-footbridge'

export default function SignInForm({ email = '', onSignedIn }: SignInFormProps) {
  const about = useQuery(aboutQuery)
  const signIn = useMutation(signInMutation(useQueryClient()))
  const form = useForm({ resolver: zodResolver(signInBody), defaultValues: { email, password: '' } })
  const { errors } = form.formState
  // Someone who signs in again goes on as who they were.
  const accounts = (about.data?.demoAccounts ?? []).filter(
    (account) => email === '' || account.email === email,
  )

  const submit = form.handleSubmit((body) => {
    signIn.mutate(body, {
      onSuccess: ({ user }) => onSignedIn(user),
      onError: () => form.setFocus('password', { shouldSelect: true }),
    })
  })

  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
      {signIn.isError && <SignInProblem error={signIn.error} />}
      <Field label="Email" error={errors.email && 'Type the email address of your account.'}>
        {(control) => (
          <input
            {...control}
            {...form.register('email')}
            type="email"
            autoComplete="username"
            autoCapitalize="off"
            spellCheck={false}
            className={controlClass}
          />
        )}
      </Field>
      <PasswordField
        label="Password"
        error={errors.password && 'Type your password.'}
        kind="current"
        registration={form.register('password')}
      />
      <Button type="submit" look="main" size="glove" busy={signIn.isPending && 'Signing in…'}>
        Sign in
      </Button>
      {accounts.length > 0 && (
        <fieldset className="border-t border-rule pt-3 flex flex-col gap-2">
          <legend className="text-label uppercase text-muted pr-2">Demo accounts</legend>
          <p className="text-small text-muted">
            This installation shows invented data. Press one to fill it in.
          </p>
          <div className="grid grid-cols-2 gap-2">
            {accounts.map((account) => (
              <Button
                key={account.email}
                onClick={() => {
                  form.setValue('email', account.email, { shouldValidate: true })
                  form.setValue('password', DEMO_PASSWORD, { shouldValidate: true })
                }}
              >
                {account.role}
              </Button>
            ))}
          </div>
        </fieldset>
      )}
    </form>
  )
}

function SignInProblem({ error }: { error: unknown }) {
  if (isCode(error, 'wrong-sign-in'))
    return (
      <Notice tone="breach" title="Not signed in">
        Email and password do not belong together. Check both and try again; an administrator can give you a
        new password.
      </Notice>
    )
  if (isCode(error, 'too-many-attempts', 'too-many-requests'))
    return (
      <Notice tone="breach" title="Too many attempts">
        {error.message}
      </Notice>
    )
  return <ErrorNotice error={error} />
}
