import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { approveBody, type Setup } from '../../../shared/api/setups.ts'
import { isCode } from '../../api/errors.ts'
import { approveSetupMutation } from '../../api/setups.ts'
import { useCurrentUser } from '../../app/current-user.tsx'
import { Button } from '../../ui/Button.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { announce } from '../../ui/announce.ts'
import { DecisionProblem } from './DecisionProblem.tsx'
import { PasswordField } from '../../ui/PasswordField.tsx'

const formSchema = approveBody.omit({ hash: true })

export function ApproveForm({ setup }: { setup: Setup }) {
  const me = useCurrentUser()
  const approve = useMutation(approveSetupMutation(useQueryClient()))
  const form = useForm({ resolver: zodResolver(formSchema), defaultValues: { password: '', remark: '' } })
  const { errors } = form.formState
  const { revision } = setup
  const wrong = isCode(approve.error, 'wrong-password')

  const submit = form.handleSubmit(({ password, remark }) => {
    approve.mutate(
      {
        id: setup.id,
        ifMatch: setup.version,
        body: { hash: revision.hash, password, ...(remark === '' ? {} : { remark }) },
      },
      {
        onSuccess: () => announce(`Revision ${revision.number} approved`),
        onError: () => form.setFocus('password', { shouldSelect: true }),
      },
    )
  })

  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
      <p>
        By approving, you, <strong>{me.name}</strong>, state that you have checked revision {revision.number}{' '}
        with the content hash <code className="text-small">{revision.hash.slice(0, 12)}…</code>: its angles
        suit the joints and the welding procedure, and the head may cut them. Your name, the time and the hash
        go on record; the approved content cannot change, a later change is a new revision.
      </p>
      <DecisionProblem error={wrong ? null : approve.error} />
      <Field label="Remark (optional)" error={errors.remark && 'At most 1 000 characters.'}>
        {(control) => (
          <textarea {...control} {...form.register('remark')} rows={2} className={controlClass} />
        )}
      </Field>
      <PasswordField
        label="Your password, as your signature"
        error={wrong ? 'That is not your password. Type it again.' : errors.password && 'Type your password.'}
        kind="current"
        registration={form.register('password')}
      />
      <Button type="submit" look="main" size="glove" busy={approve.isPending && 'Approving…'}>
        Approve revision {revision.number}
      </Button>
    </form>
  )
}
