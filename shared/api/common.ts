import * as z from 'zod'

export const roles = ['programmer', 'engineer', 'welder', 'administrator'] as const
export const roleSchema = z.enum(roles)
export type Role = z.infer<typeof roleSchema>

export const idParams = z.strictObject({ id: z.uuid() })

/** Instants travel as ISO 8601 in UTC. */
export const instant = z.iso.datetime()

/** Version of a row; also its ETag, quoted: `"3"`. */
export const version = z.int().min(1)

export const personSchema = z.strictObject({ id: z.uuid(), name: z.string() })
export type Person = z.infer<typeof personSchema>

/** Query text arrives as strings; numbers are read strictly. */
const wholeNumber = z
  .string()
  .regex(/^\d{1,6}$/)
  .transform(Number)

export const pageQuery = {
  page: wholeNumber.pipe(z.number().min(1)).optional(),
  pageSize: wholeNumber.pipe(z.number().min(1).max(100)).optional(),
  q: z.string().max(120).optional(),
}

export function pageOf<T extends z.ZodType>(item: T) {
  return z.strictObject({
    items: z.array(item),
    total: z.int(),
    page: z.int(),
    pageSize: z.int(),
  })
}
