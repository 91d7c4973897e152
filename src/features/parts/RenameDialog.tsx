import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { createPartBody, type Part } from '../../../shared/api/parts.ts'
import { isCode } from '../../api/errors.ts'
import { partQuery, updatePartMutation } from '../../api/parts.ts'
import { Button } from '../../ui/Button.tsx'
import { Conflict } from '../../ui/Conflict.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { ErrorNotice } from '../../ui/Notice.tsx'

const bodySchema = createPartBody.pick({ number: true, name: true })

/** Number and name. When someone else was first, both are shown and the person decides. */
export function RenameDialog({ part, onClose }: { part: Part; onClose: () => void }) {
  const client = useQueryClient()
  const update = useMutation(updatePartMutation(client))
  const [base, setBase] = useState(part)
  const [theirs, setTheirs] = useState<Part | null>(null)
  const form = useForm({
    resolver: zodResolver(bodySchema),
    defaultValues: { number: part.number, name: part.name },
  })
  const { errors } = form.formState

  const save = (version: number) =>
    form.handleSubmit((body) => {
      update.mutate(
        { id: part.id, body, ifMatch: version },
        {
          onSuccess: onClose,
          onError: (error) => {
            if (isCode(error, 'version-stale')) void showTheirs()
          },
        },
      )
    })()

  async function showTheirs() {
    setTheirs(await client.fetchQuery({ ...partQuery(part.id), staleTime: 0 }))
  }

  const stale = isCode(update.error, 'version-stale')
  const taken = isCode(update.error, 'name-taken')
  return (
    <Dialog title={`Rename ${part.number}`} onClose={onClose}>
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          void save(base.version)
        }}
        className="flex flex-col gap-3"
      >
        {update.isError && !stale && !taken && <ErrorNotice error={update.error} />}
        {stale && theirs !== null && (
          <Conflict
            theirs={`${theirs.number} ${theirs.name}`}
            mine={`${form.getValues('number')} ${form.getValues('name')}`}
            onTheirs={onClose}
            onMine={() => {
              setBase(theirs)
              void save(theirs.version)
            }}
          />
        )}
        <Field
          label="Part number"
          error={
            taken ? update.error?.message : errors.number && 'Type the part number, at most 60 characters.'
          }
        >
          {(control) => <input {...control} {...form.register('number')} className={controlClass} />}
        </Field>
        <Field label="Name" error={errors.name && 'Type a name, at most 120 characters.'}>
          {(control) => <input {...control} {...form.register('name')} className={controlClass} />}
        </Field>
        <p className="text-small text-muted">Approved set-ups keep the number and name that were approved.</p>
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
