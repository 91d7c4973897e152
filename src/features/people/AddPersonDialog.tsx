import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { roles } from '../../../shared/api/common.ts'
import { createUserBody } from '../../../shared/api/people.ts'
import { isCode } from '../../api/errors.ts'
import { createPersonMutation } from '../../api/people.ts'
import { Button } from '../../ui/Button.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { ErrorNotice } from '../../ui/Notice.tsx'
import { Select } from '../../ui/Select.tsx'
import { roleWords } from './role-words.ts'
import { PasswordField } from '../../ui/PasswordField.tsx'

export function AddPersonDialog({ onClose }: { onClose: () => void }) {
  const create = useMutation(createPersonMutation(useQueryClient()))
  const form = useForm({
    resolver: zodResolver(createUserBody),
    defaultValues: { email: '', name: '', role: 'programmer' as const, password: '' },
  })
  const { errors } = form.formState
  const taken = isCode(create.error, 'name-taken')
  const submit = form.handleSubmit((body) => create.mutate(body, { onSuccess: onClose }))
  return (
    <Dialog title="Add a person" onClose={onClose}>
      <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
        {create.isError && !taken && <ErrorNotice error={create.error} />}
        <Field label="Name" error={errors.name && 'Type the name, at most 120 characters.'}>
          {(control) => (
            <input {...control} {...form.register('name')} autoComplete="off" className={controlClass} />
          )}
        </Field>
        <Field
          label="Email"
          hint="They sign in with it"
          error={
            taken
              ? create.error?.message
              : errors.email && 'Type an email address, for instance name@shop.example.'
          }
        >
          {(control) => (
            <input
              {...control}
              {...form.register('email')}
              type="email"
              autoComplete="off"
              className={controlClass}
            />
          )}
        </Field>
        <Field label="Role">
          {(control) => (
            <Select
              {...control}
              {...form.register('role')}
              options={roles.map((role) => ({ value: role, label: roleWords[role] }))}
            />
          )}
        </Field>
        <PasswordField
          label="First password"
          hint="8 to 256 characters. Give it to them in person; they change it under their account."
          error={errors.password && 'At least 8 and at most 256 characters.'}
          kind="new"
          registration={form.register('password')}
        />
        <div className="flex flex-wrap gap-2">
          <Button type="submit" look="main" busy={create.isPending && 'Adding…'}>
            Add
          </Button>
          <Button onClick={onClose}>Not now</Button>
        </div>
      </form>
    </Dialog>
  )
}
