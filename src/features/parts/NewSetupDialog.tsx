import { zodResolver } from '@hookform/resolvers/zod'
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { Controller, useForm } from 'react-hook-form'
import { useNavigate } from 'react-router-dom'
import * as z from 'zod'
import type { Part } from '../../../shared/api/parts.ts'
import { createSetupBody } from '../../../shared/api/setups.ts'
import { headsQuery } from '../../api/heads.ts'
import { createSetupMutation } from '../../api/setups.ts'
import { Button } from '../../ui/Button.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { controlClass, Field } from '../../ui/Field.tsx'
import { ErrorNotice, Notice } from '../../ui/Notice.tsx'
import { NumberField } from '../../ui/NumberField.tsx'
import { Select } from '../../ui/Select.tsx'
import { headInWords } from '../../ui/heads.ts'
import { typedNumber } from '../../ui/typed-number.ts'

const { name, headId, plate } = createSetupBody.shape
const formSchema = z.strictObject({
  name,
  headId,
  material: plate.shape.material,
  thickness: typedNumber(plate.shape.thickness),
})
type Typed = z.input<typeof formSchema>
type Checked = z.output<typeof formSchema>

/** Asks for plate and head; the set-up starts with square walls and opens on the bench. */
export function NewSetupDialog({ part, onClose }: { part: Part; onClose: () => void }) {
  const navigate = useNavigate()
  const heads = useQuery(headsQuery({ pageSize: 100 }))
  const create = useMutation(createSetupMutation(useQueryClient()))
  const form = useForm<Typed, unknown, Checked>({
    resolver: zodResolver(formSchema),
    defaultValues: { name: part.name, headId: '', material: '', thickness: null },
  })
  const { errors } = form.formState

  const submit = form.handleSubmit(({ material, thickness, ...rest }) => {
    create.mutate(
      { ...rest, partId: part.id, plate: { material, thickness } },
      { onSuccess: (setup) => void navigate(`/setups/${setup.id}`) },
    )
  })

  return (
    <Dialog title={`New set-up of ${part.number}`} onClose={onClose}>
      <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
        {create.isError && <ErrorNotice error={create.error} />}
        <Field label="Name" error={errors.name && 'Type a name, at most 120 characters.'}>
          {(control) => (
            <input {...control} {...form.register('name')} autoComplete="off" className={controlClass} />
          )}
        </Field>
        <Field
          label="Plate material"
          hint="As the shop names it, for instance S355"
          error={errors.material && 'Type the material, at most 120 characters.'}
        >
          {(control) => (
            <input {...control} {...form.register('material')} autoComplete="off" className={controlClass} />
          )}
        </Field>
        <Controller
          control={form.control}
          name="thickness"
          render={({ field }) => (
            <NumberField
              label="Plate thickness"
              quantity="length"
              value={field.value}
              onChange={field.onChange}
              onBlur={field.onBlur}
              error={errors.thickness && 'Type the thickness: more than 0 and at most 1 000 mm.'}
            />
          )}
        />
        <Field label="Head" error={errors.headId && 'Choose the head that cuts it.'}>
          {(control) => (
            <Select
              {...control}
              {...form.register('headId')}
              options={[
                { value: '', label: heads.isPending ? 'Reading the heads…' : 'Choose a head' },
                ...(heads.data?.items ?? []).map((head) => ({ value: head.id, label: headInWords(head) })),
              ]}
            />
          )}
        </Field>
        {heads.isError && (
          <ErrorNotice
            error={heads.error}
            actions={<Button onClick={() => void heads.refetch()}>Try again</Button>}
          />
        )}
        {heads.data?.items.length === 0 && (
          <Notice title="No head yet">
            An engineer or an administrator adds the head first, under Heads.
          </Notice>
        )}
        <div className="flex flex-wrap gap-2">
          <Button type="submit" look="main" busy={create.isPending && 'Starting…'}>
            Start the set-up
          </Button>
          <Button onClick={onClose}>Not now</Button>
        </div>
      </form>
    </Dialog>
  )
}
