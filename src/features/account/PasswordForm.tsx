import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { changePasswordBody } from '../../../shared/api/people.ts'
import { isCode } from '../../api/errors.ts'
import { changePasswordMutation } from '../../api/session.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'
import { PasswordField } from '../../ui/PasswordField.tsx'

export function PasswordForm() {
  const change = useMutation(changePasswordMutation(useQueryClient()))
  const form = useForm({
    resolver: zodResolver(changePasswordBody),
    defaultValues: { current: '', next: '' },
  })
  const { errors } = form.formState
  const wrong = isCode(change.error, 'wrong-password')
  const submit = form.handleSubmit((body) => change.mutate(body, { onSuccess: () => form.reset() }))
  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3 max-w-md">
      {change.isSuccess && (
        <Notice tone="good">The password is changed. Your other sessions have ended.</Notice>
      )}
      {change.isError && !wrong && <ErrorNotice error={change.error} />}
      <PasswordField
        label="Password now"
        error={wrong ? 'That is not your password. Type it again.' : errors.current && 'Type your password.'}
        kind="current"
        registration={form.register('current')}
      />
      <PasswordField
        label="New password"
        hint="8 to 256 characters; several words are easier to remember than signs"
        error={errors.next && 'At least 8 and at most 256 characters.'}
        kind="new"
        registration={form.register('next')}
      />
      <Button type="submit" look="main" className="self-start" busy={change.isPending && 'Changing…'}>
        Change the password
      </Button>
    </form>
  )
}
