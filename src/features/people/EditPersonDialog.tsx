import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import * as z from 'zod'
import { roles } from '../../../shared/api/common.ts'
import { createUserBody, passwordSchema, type User } from '../../../shared/api/people.ts'
import { isCode } from '../../api/errors.ts'
import { updatePersonMutation } from '../../api/people.ts'
import { useCurrentUser } from '../../app/current-user.tsx'
import { Button } from '../../ui/Button.tsx'
import { Checkbox } from '../../ui/Checkbox.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'
import { Select } from '../../ui/Select.tsx'
import { changesOf } from './changes.ts'
import { roleWords } from './role-words.ts'
import { PasswordField } from '../../ui/PasswordField.tsx'

const formSchema = z.strictObject({
  name: createUserBody.shape.name,
  role: createUserBody.shape.role,
  disabled: z.boolean(),
  password: z.union([z.literal(''), passwordSchema]),
})

/** Name, role, whether they may sign in, a new password; only what was changed is sent. */
export function EditPersonDialog({ person, onClose }: { person: User; onClose: () => void }) {
  const me = useCurrentUser()
  const client = useQueryClient()
  const update = useMutation(updatePersonMutation(client))
  const form = useForm({
    resolver: zodResolver(formSchema),
    defaultValues: { name: person.name, role: person.role, disabled: person.disabled, password: '' },
  })
  const { errors } = form.formState
  const stale = isCode(update.error, 'version-stale')
  const submit = form.handleSubmit((values) => {
    const body = changesOf(person, values)
    if (Object.keys(body).length === 0) {
      onClose()
      return
    }
    update.mutate({ id: person.id, body, ifMatch: person.version }, { onSuccess: onClose })
  })
  return (
    <Dialog title={`Change ${person.name}`} onClose={onClose}>
      <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
        {stale ? (
          <Notice
            tone="breach"
            title="Someone else saved first"
            actions={
              <Button
                onClick={() => {
                  void client.invalidateQueries({ queryKey: ['people'] })
                  onClose()
                }}
              >
                Close and read the list again
              </Button>
            }
          >
            Nothing of yours was saved. Close this, look at what was changed, then change the rest.
          </Notice>
        ) : (
          update.isError && <ErrorNotice error={update.error} />
        )}
        <p className="text-muted break-all">{person.email}</p>
        <Field label="Name" error={errors.name && 'Type the name, at most 120 characters.'}>
          {(control) => (
            <input {...control} {...form.register('name')} autoComplete="off" className={controlClass} />
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
        {person.id !== me.id && <Checkbox {...form.register('disabled')}>Disabled: may not sign in</Checkbox>}
        <PasswordField
          label="New password"
          hint="Leave it empty to keep the old one"
          error={errors.password && 'At least 8 and at most 256 characters.'}
          kind="new"
          registration={form.register('password')}
        />
        <p className="text-small text-muted">
          A new role, a new password or disabling ends their sessions at once.
        </p>
        <div className="flex flex-wrap gap-2">
          <Button type="submit" look="main" busy={update.isPending && 'Saving…'}>
            Save
          </Button>
          <Button onClick={onClose}>Leave as it is</Button>
        </div>
      </form>
    </Dialog>
  )
}
