import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { useNavigate } from 'react-router-dom'
import { createPartBody, type Drawing } from '../../../../shared/api/parts.ts'
import { isCode } from '../../../api/errors.ts'
import { createPartMutation } from '../../../api/parts.ts'
import { Button } from '../../../ui/Button.tsx'
import { controlClass, Field } from '../../../ui/Field.tsx'
import { ErrorNotice } from '../../../ui/Notice.tsx'
import type { Options } from './options.ts'

interface NewPartFormProps {
  readonly drawing: Drawing
  readonly options: Options
  readonly pick: number
  /** The picture is behind the choices: the part would not be the one that is shown. */
  readonly busy: boolean
}

const bodySchema = createPartBody.pick({ number: true, name: true })

/** Number and name; what is created goes on to its first set-up. */
export function NewPartForm({ drawing, options, pick, busy }: NewPartFormProps) {
  const navigate = useNavigate()
  const create = useMutation(createPartMutation(useQueryClient()))
  const form = useForm({
    resolver: zodResolver(bodySchema),
    defaultValues: { number: '', name: nameFrom(drawing.fileName) },
  })
  const { errors } = form.formState
  const taken = isCode(create.error, 'name-taken')

  const submit = form.handleSubmit((body) => {
    create.mutate(
      { ...body, drawingId: drawing.id, reading: options, pick },
      {
        onSuccess: (part) => void navigate(`/parts/${part.id}?start=setup`),
        onError: (error) => {
          if (isCode(error, 'name-taken')) form.setFocus('number')
        },
      },
    )
  })

  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
      {create.isError && !taken && <ErrorNotice error={create.error} />}
      <Field
        label="Part number"
        hint="As on the drawing, for instance BP-04"
        error={
          taken ? create.error?.message : errors.number && 'Type the part number, at most 60 characters.'
        }
      >
        {(control) => (
          <input {...control} {...form.register('number')} className={controlClass} autoComplete="off" />
        )}
      </Field>
      <Field label="Name" error={errors.name && 'Type a name, at most 120 characters.'}>
        {(control) => (
          <input {...control} {...form.register('name')} className={controlClass} autoComplete="off" />
        )}
      </Field>
      <Button
        type="submit"
        look="main"
        size="glove"
        busy={create.isPending ? 'Making the part…' : busy && 'Reading again…'}
      >
        Make the part
      </Button>
      <p className="text-small text-muted">The set-up comes next: plate, thickness and head.</p>
    </form>
  )
}

/** A first guess from the file's name: `bearing-plate.dxf` gives `Bearing plate`. */
export function nameFrom(fileName: string): string {
  const words = fileName
    .replace(/\.[^.]*$/, '')
    .replace(/[-_]+/g, ' ')
    .trim()
  return (words.charAt(0).toUpperCase() + words.slice(1)).slice(0, 120)
}
