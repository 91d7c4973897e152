import * as z from 'zod'
import { createHeadBody, type Head } from '../../../shared/api/heads.ts'
import type { Body } from '../../api/client.ts'
import { typedNumber } from '../../ui/typed-number.ts'

const { name, kind, mechanicalLimit, jet } = createHeadBody.shape

/** The dialog's flat form of a head; a number that is not understood yet is null and does not pass. */
export const headFormSchema = z.strictObject({
  name,
  kind,
  mechanicalLimit: typedNumber(mechanicalLimit),
  kerf: typedNumber(jet.shape.kerf),
  taper: typedNumber(jet.shape.taper),
  standoff: typedNumber(jet.shape.standoff),
  nozzleDiameter: typedNumber(jet.shape.nozzleDiameter),
})
export type HeadTyped = z.input<typeof headFormSchema>
export type HeadChecked = z.output<typeof headFormSchema>

export function startValues(head: Head | null): HeadTyped {
  if (head === null)
    return {
      name: '',
      kind: 'turning',
      mechanicalLimit: null,
      kerf: null,
      taper: null,
      standoff: null,
      nozzleDiameter: null,
    }
  return { name: head.name, kind: head.kind, mechanicalLimit: head.mechanicalLimit, ...head.jet }
}

export function bodyOf({ kerf, taper, standoff, nozzleDiameter, ...rest }: HeadChecked): Body<'createHead'> {
  return { ...rest, jet: { kerf, taper, standoff, nozzleDiameter } }
}
