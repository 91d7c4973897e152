/**
 * One text for one content: keys sorted by code unit, no spaces, numbers in their shortest form that reads back
 * to the same bits (−0 as 0). What is hashed and approved is the UTF-8 of this text, whoever computes it.
 */

export type Json =
  null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json | undefined }

/** Throws on what JSON cannot hold (NaN, infinities): such content never passes the schema. */
export function canonicalText(value: Json): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value)
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new Error('a number that is not finite cannot be stored')
    return JSON.stringify(value)
  }
  if (isList(value)) return `[${value.map(canonicalText).join(',')}]`
  const entries = Object.keys(value)
    .sort()
    .flatMap((key) => {
      const item = value[key]
      return item === undefined ? [] : [`${JSON.stringify(key)}:${canonicalText(item)}`]
    })
  return `{${entries.join(',')}}`
}

function isList(
  value: readonly Json[] | { readonly [key: string]: Json | undefined },
): value is readonly Json[] {
  return Array.isArray(value)
}
