import { unread, type UnreadNumber } from './parsed.ts'

/** The bare number in a typed text: decimals with point or comma, fractions, mixed numbers. */

/** One value, or two where a comma can mean decimals (first) or thousands (second). */
export type Quantity = { readonly kind: 'value'; readonly values: readonly number[] } | UnreadNumber

const FRACTION_SIGNS: Record<string, string> = {
  '½': '1/2',
  '⅓': '1/3',
  '⅔': '2/3',
  '¼': '1/4',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
}

/** One spelling for the many that keyboards and phones produce; spaces single, letters small. */
export function tidy(text: string): string {
  return text
    .replace(/[½⅓⅔¼¾⅛⅜⅝⅞]/g, (sign) => ` ${FRACTION_SIGNS[sign] ?? ''}`)
    .replace(/[−–—]/g, '-')
    .replace(/[″“”]|''/g, '"')
    .replace(/[′‘’]/g, "'")
    .replace(/º/g, '°')
    .replace(/⁄/g, '/')
    .replace(/\s+/g, ' ')
    .trim()
    .toLowerCase()
}

export function readQuantity(text: string): Quantity {
  const [, sign = '', body = ''] = /^([+-]?) ?(.*)$/.exec(text) ?? []
  const direction = sign === '-' ? -1 : 1

  const mixed = /^(?:(\d+)(?: ?- ?| ))?(\d+) ?\/ ?(\d+)$/.exec(body)
  if (mixed) {
    const divisor = Number(mixed[3])
    if (divisor === 0) return unread('division-by-zero', 'A fraction cannot be over 0. Type for example 3/8.')
    return one(direction * (Number(mixed[1] ?? 0) + Number(mixed[2]) / divisor))
  }

  if (/^(\d+\.?\d*|\.\d+)$/.test(body)) return one(direction * Number(body))
  // A point and commas together settle which is which; so do two separators of one kind.
  if (/^\d{1,3}(,\d{3})+\.\d+$/.test(body) || /^\d{1,3}(,\d{3}){2,}$/.test(body)) {
    return one(direction * Number(body.replaceAll(',', '')))
  }
  if (/^\d{1,3}(\.\d{3})+,\d+$/.test(body) || /^\d{1,3}(\.\d{3}){2,}$/.test(body)) {
    return one(direction * Number(body.replaceAll('.', '').replace(',', '.')))
  }
  if (/^(\d+,\d*|,\d+)$/.test(body)) {
    const decimal = direction * Number(body.replace(',', '.'))
    // No one writes a thousands group after a leading zero, nor of other than three digits.
    if (!/^[1-9]\d{0,2},\d{3}$/.test(body)) return one(decimal)
    return { kind: 'value', values: [decimal, direction * Number(body.replace(',', ''))] }
  }
  return unread('not-a-number', `“${text}” is not a number. Type for example 12.5 or 1 1/2.`)
}

function one(value: number): Quantity {
  return { kind: 'value', values: [value] }
}
