import { unread, type ParsedNumber, type ReadNumber } from './parsed.ts'

/**
 * Simple sums as people type them into a field: `12.5 + 3`, `2 x 37.5 mm`, `1 1/2 + 3/8 in`, `100 - 2*6.35`,
 * `62.5 / 4`. Terms and factors only, no brackets. A term without a unit takes that of the next term that has one.
 */

/** Reads one term as if it stood alone; `unit` is for a term without its own. */
export type ReadTerm = (term: string, unit: string) => ParsedNumber

/** Null where the text is no sum. An ambiguous or unread term makes the whole so. */
export function readSum(
  typed: string,
  readTerm: ReadTerm,
  echo: (value: number) => string,
): ParsedNumber | null {
  const terms = termsOf(typed)
  if (terms.length === 1 && !FACTORS.test(terms[0]?.text ?? '')) return null
  let value = 0
  let unit = ''
  // From the end, so that each term knows the unit of the one after it.
  for (const { sign, text } of terms.reverse()) {
    unit = unitOf(text) || unit
    const term = readProduct(text, unit, readTerm)
    if (term.kind === 'ambiguous')
      return unread('not-a-number', `${term.message} A sum needs numbers that can be read one way only.`)
    if (term.kind === 'error') return term
    value += sign * term.value
  }
  return { kind: 'value', value, echo: echo(value) }
}

/** A number, an x, *, × or a division that is no fraction of whole numbers. */
const FACTORS = /[*×]|\d ?x ?[\d.]|\d[.,]\d* ?\/|\/ ?\d*[.,]\d/

interface Term {
  readonly sign: 1 | -1
  readonly text: string
}

/** Splits at plus and minus, but not at a leading sign nor at the hyphen of a mixed number (`1-1/2`). */
function termsOf(typed: string): Term[] {
  const terms: Term[] = []
  let sign: 1 | -1 = 1
  let text = ''
  for (const [i, letter] of [...typed].entries()) {
    const before = text.trim()
    const isSign = (letter === '+' || letter === '-') && before !== '' && !/[*×x/]$/.test(before)
    const isMixed = letter === '-' && /(^| )\d+$/.test(text) && /^-\d+ ?\/ ?\d/.test(typed.slice(i))
    if (!isSign || isMixed) {
      text += letter
      continue
    }
    terms.push({ sign, text: before })
    sign = letter === '+' ? 1 : -1
    text = ''
  }
  terms.push({ sign, text: text.trim() })
  return terms
}

function unitOf(text: string): string {
  return /[a-wyz"'°][a-z"'°]*$/.exec(text)?.[0] ?? ''
}

/** One quantity times or divided by bare numbers: whichever factor bears the unit is the quantity. */
function readProduct(text: string, unit: string, readTerm: ReadTerm): ParsedNumber {
  if (!FACTORS.test(text)) return readTerm(text, unit)
  const parts = text.split(/ ?([*×/]|(?<=[\d. ])x(?=[ \d.])) ?/)
  let value = 1
  let withUnit = 0
  for (let i = 0; i < parts.length; i += 2) {
    const part = parts[i] ?? ''
    const own = unitOf(part)
    if (own !== '') withUnit++
    const last = i === parts.length - 1
    const isQuantity = own !== '' || (last && withUnit === 0)
    const read = isQuantity && parts[i - 1] !== '/' ? readTerm(part, unit) : bareNumber(part)
    if (read.kind !== 'value') return read
    value = parts[i - 1] === '/' ? value / read.value : value * read.value
  }
  if (withUnit > 1) return unread('wrong-unit', 'Only one factor of a product can be a length.')
  return Number.isFinite(value)
    ? { kind: 'value', value, echo: '' }
    : unread('division-by-zero', 'That divides by 0. Type another divisor.')
}

function bareNumber(text: string): ReadNumber | ReturnType<typeof unread> {
  const value = Number(text.replace(',', '.'))
  return text === '' || Number.isNaN(value)
    ? unread('not-a-number', `“${text}” is not a number to multiply or divide by.`)
    : { kind: 'value', value, echo: '' }
}
