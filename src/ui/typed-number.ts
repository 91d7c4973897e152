import * as z from 'zod'

/** A number of a form: null while nothing is typed or it is not understood, which does not pass. */
export function typedNumber(number: z.ZodNumber) {
  return z.union([number, z.null()]).refine((value) => value !== null)
}
