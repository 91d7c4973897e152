import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { Controller, useForm, type Control } from 'react-hook-form'
import { headKinds, type Head } from '../../../shared/api/heads.ts'
import { isCode } from '../../api/errors.ts'
import { createHeadMutation, headQuery, updateHeadMutation } from '../../api/heads.ts'
import { Button } from '../../ui/Button.tsx'
import { Conflict } from '../../ui/Conflict.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { headInWords, headKindWords } from '../../ui/heads.ts'
import { ErrorNotice } from '../../ui/Notice.tsx'
import { NumberField, type Quantity } from '../../ui/NumberField.tsx'
import { Select } from '../../ui/Select.tsx'
import { bodyOf, headFormSchema, startValues, type HeadChecked, type HeadTyped } from './head-form.ts'

/** Adds a head, or changes one; the working limit is not changed here. */
export function HeadDialog({ head, onClose }: { head: Head | null; onClose: () => void }) {
  const client = useQueryClient()
  const create = useMutation(createHeadMutation(client))
  const update = useMutation(updateHeadMutation(client))
  const [base, setBase] = useState(head)
  const [theirs, setTheirs] = useState<Head | null>(null)
  const form = useForm<HeadTyped, unknown, HeadChecked>({
    resolver: zodResolver(headFormSchema),
    defaultValues: startValues(head),
  })
  const { errors } = form.formState
  const failed = create.error ?? update.error
  const taken = isCode(failed, 'name-taken')

  const save = (version: number | null) =>
    form.handleSubmit((values) => {
      const body = bodyOf(values)
      if (head === null || version === null) {
        create.mutate(body, { onSuccess: onClose })
        return
      }
      update.mutate(
        { id: head.id, body, ifMatch: version },
        {
          onSuccess: onClose,
          onError: (error) => {
            if (isCode(error, 'version-stale')) void showTheirs(head.id)
          },
        },
      )
    })()

  async function showTheirs(id: string) {
    setTheirs(await client.fetchQuery({ ...headQuery(id), staleTime: 0 }))
  }

  const stale = isCode(failed, 'version-stale')
  return (
    <Dialog title={head === null ? 'Add a head' : `Edit ${head.name}`} onClose={onClose}>
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          void save(base?.version ?? null)
        }}
        className="flex flex-col gap-3"
      >
        {failed !== null && !stale && !taken && <ErrorNotice error={failed} />}
        {stale && theirs !== null && (
          <Conflict
            theirs={headInWords(theirs)}
            mine={`${form.getValues('name')} · ${form.getValues('mechanicalLimit') ?? '–'}° mechanical`}
            onTheirs={onClose}
            onMine={() => {
              setBase(theirs)
              void save(theirs.version)
            }}
          />
        )}
        <Field
          label="Name"
          error={taken ? failed?.message : errors.name && 'Type a name, at most 120 characters.'}
        >
          {(control) => (
            <input {...control} {...form.register('name')} autoComplete="off" className={controlClass} />
          )}
        </Field>
        <Field label="How it tilts">
          {(control) => (
            <Select
              {...control}
              {...form.register('kind')}
              options={headKinds.map((kind) => ({ value: kind, label: headKindWords[kind] }))}
            />
          )}
        </Field>
        <NumberOf
          control={form.control}
          name="mechanicalLimit"
          label="Mechanical limit, from vertical"
          quantity="angle"
          problem="More than 0° and at most 90°."
        />
        <fieldset className="flex flex-col gap-3 border-t border-rule pt-2">
          <legend className="text-label uppercase text-muted pr-2">Jet that a new set-up starts with</legend>
          <p className="text-small text-muted">
            Starting values only: measure kerf and taper on your own test cuts.
          </p>
          <div className="grid gap-3 sm:grid-cols-2">
            <NumberOf
              control={form.control}
              name="kerf"
              label="Kerf at the top face"
              quantity="length"
              problem="More than 0 and at most 10 mm."
            />
            <NumberOf
              control={form.control}
              name="taper"
              label="Taper a side, + narrows downward"
              quantity="angle"
              problem="Between −10° and 10°."
            />
            <NumberOf
              control={form.control}
              name="standoff"
              label="Stand-off along the axis"
              quantity="length"
              problem="More than 0 and at most 100 mm."
            />
            <NumberOf
              control={form.control}
              name="nozzleDiameter"
              label="Nozzle, outside diameter"
              quantity="length"
              problem="More than 0 and at most 100 mm."
            />
          </div>
        </fieldset>
        <div className="flex flex-wrap gap-2">
          <Button type="submit" look="main" busy={(create.isPending || update.isPending) && 'Saving…'}>
            Save
          </Button>
          <Button onClick={onClose}>Leave as it is</Button>
        </div>
      </form>
    </Dialog>
  )
}

interface NumberOfProps {
  readonly control: Control<HeadTyped, unknown, HeadChecked>
  readonly name: Exclude<keyof HeadTyped, 'name' | 'kind'>
  readonly label: string
  readonly quantity: Quantity
  readonly problem: string
}

function NumberOf({ control, name, label, quantity, problem }: NumberOfProps) {
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <NumberField
          label={label}
          quantity={quantity}
          value={field.value}
          onChange={field.onChange}
          onBlur={field.onBlur}
          error={fieldState.error && problem}
        />
      )}
    />
  )
}
