import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { returnBody, type Setup } from '../../../shared/api/setups.ts'
import { returnSetupMutation } from '../../api/setups.ts'
import { Button } from '../../ui/Button.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { announce } from '../../ui/announce.ts'
import { DecisionProblem } from './DecisionProblem.tsx'

const formSchema = returnBody.omit({ hash: true })

export function ReturnForm({ setup }: { setup: Setup }) {
  const giveBack = useMutation(returnSetupMutation(useQueryClient()))
  const form = useForm({ resolver: zodResolver(formSchema), defaultValues: { reason: '' } })
  const { errors } = form.formState

  const submit = form.handleSubmit(({ reason }) => {
    giveBack.mutate(
      { id: setup.id, ifMatch: setup.version, body: { hash: setup.revision.hash, reason } },
      { onSuccess: () => announce(`Revision ${setup.revision.number} sent back`) },
    )
  })

  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
      <DecisionProblem error={giveBack.error} />
      <Field
        label="Reason"
        hint="What is wrong, where, and what you would accept"
        error={
          errors.reason && 'Say why, in at most 1 000 characters: the programmer has only this to go by.'
        }
      >
        {(control) => (
          <textarea {...control} {...form.register('reason')} rows={3} className={controlClass} />
        )}
      </Field>
      <Button type="submit" look="breach" busy={giveBack.isPending && 'Sending back…'}>
        Send back
      </Button>
    </form>
  )
}
