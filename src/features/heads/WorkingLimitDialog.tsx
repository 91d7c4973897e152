import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Controller, useForm } from 'react-hook-form'
import { workingLimitBody, type Head } from '../../../shared/api/heads.ts'
import { formatAngle } from '../../../shared/units/format.ts'
import { isCode } from '../../api/errors.ts'
import { headQuery, setWorkingLimitMutation } from '../../api/heads.ts'
import { Button } from '../../ui/Button.tsx'
import { Caution } from '../../ui/Caution.tsx'
import { Conflict } from '../../ui/Conflict.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { ErrorNotice } from '../../ui/Notice.tsx'
import { NumberField } from '../../ui/NumberField.tsx'
import { typedNumber } from '../../ui/typed-number.ts'
import * as z from 'zod'

const limit = workingLimitBody.shape.workingLimit.unwrap()

/** An engineer's limit for a head, never above the mechanical one, with the reason that goes on record. */
export function WorkingLimitDialog({ head, onClose }: { head: Head; onClose: () => void }) {
  const client = useQueryClient()
  const set = useMutation(setWorkingLimitMutation(client))
  const [base, setBase] = useState(head)
  const [theirs, setTheirs] = useState<Head | null>(null)
  const [schema] = useState(() =>
    z.strictObject({
      workingLimit: typedNumber(limit.max(head.mechanicalLimit)),
      reason: workingLimitBody.shape.reason,
    }),
  )
  const form = useForm<z.input<typeof schema>, unknown, z.output<typeof schema>>({
    resolver: zodResolver(schema),
    defaultValues: { workingLimit: head.workingLimit, reason: '' },
  })
  const { errors } = form.formState

  const save = (version: number) =>
    form.handleSubmit((body) => {
      set.mutate(
        { id: head.id, body, ifMatch: version },
        {
          onSuccess: onClose,
          onError: (error) => {
            if (isCode(error, 'version-stale')) void showTheirs()
          },
        },
      )
    })()

  async function showTheirs() {
    setTheirs(await client.fetchQuery({ ...headQuery(head.id), staleTime: 0 }))
  }

  const inWords = (value: number | null) => (value === null ? 'no working limit' : formatAngle(value))
  const stale = isCode(set.error, 'version-stale')
  return (
    <Dialog title={`Working limit of ${head.name}`} onClose={onClose}>
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          void save(base.version)
        }}
        className="flex flex-col gap-3"
      >
        {set.isError && !stale && <ErrorNotice error={set.error} />}
        {stale && theirs !== null && (
          <Conflict
            theirs={inWords(theirs.workingLimit)}
            mine={inWords(form.getValues('workingLimit'))}
            onTheirs={onClose}
            onMine={() => {
              setBase(theirs)
              void save(theirs.version)
            }}
          />
        )}
        <p>
          Now: <strong>{inWords(base.workingLimit)}</strong>. Mechanical limit:{' '}
          {formatAngle(base.mechanicalLimit)}.
        </p>
        <Controller
          control={form.control}
          name="workingLimit"
          render={({ field }) => (
            <NumberField
              label="Working limit, from vertical"
              quantity="angle"
              value={field.value}
              onChange={field.onChange}
              onBlur={field.onBlur}
              error={
                errors.workingLimit &&
                `More than 0° and at most the mechanical limit, ${formatAngle(head.mechanicalLimit)}.`
              }
            />
          )}
        />
        <Field
          label="Reason"
          hint="What it rests on: test cuts, material, thickness"
          error={errors.reason && 'Say what the limit rests on, in at most 1 000 characters.'}
        >
          {(control) => (
            <textarea {...control} {...form.register('reason')} rows={3} className={controlClass} />
          )}
        </Field>
        <Caution>
          The limit holds for set-ups saved from now on. It does not replace the maker&apos;s manual of the
          head, nor your own trial cuts.
        </Caution>
        <div className="flex flex-wrap gap-2">
          <Button type="submit" look="main" busy={set.isPending && 'Saving…'}>
            Set the limit
          </Button>
          <Button onClick={onClose}>Leave as it is</Button>
        </div>
      </form>
    </Dialog>
  )
}
