import { formatAngle, formatLength } from './format.ts'
import { MM_PER_INCH, type DisplayUnit } from './length.ts'
import { readQuantity, tidy, type Quantity } from './quantity.ts'
import { unread, type ParsedNumber, type ReadNumber } from './parsed.ts'
import { readSum } from './sum.ts'

/** Reading lengths and angles as people type them. */

const MM_PER_UNIT: Record<string, number> = {
  mm: 1,
  cm: 10,
  m: 1_000,
  in: MM_PER_INCH,
  inch: MM_PER_INCH,
  inches: MM_PER_INCH,
  '"': MM_PER_INCH,
  ft: 12 * MM_PER_INCH,
  feet: 12 * MM_PER_INCH,
  foot: 12 * MM_PER_INCH,
  "'": 12 * MM_PER_INCH,
}

/**
 * A length: `12,5`, `12.5`, `1 1/2 in`, `1-1/2"`, `3/8"`, `38.1mm`, `1' 6"`, or a simple sum of such. Without a
 * unit it is in the display unit. `value` is in millimetres; `1,234` comes back as a question.
 */
export function parseLength(text: string, displayUnit: DisplayUnit): ParsedNumber {
  const typed = tidy(text)
  const checked = checkTyped(typed, displayUnit === 'mm' ? '12.5 or 1/2 in' : '0.5, 1/2 or 12.7 mm')
  if (checked) return checked
  const one = readLength(typed, displayUnit)
  if (one.kind !== 'error') return one
  const sum = readSum(
    typed,
    (term, unit) =>
      readLength(term === '' || /[a-z"']$/.test(term) ? term : `${term} ${unit}`.trim(), displayUnit),
    (mm) => formatLength(mm, displayUnit, { decimals: 6 }),
  )
  return sum ?? one
}

function readLength(typed: string, displayUnit: DisplayUnit): ParsedNumber {
  const feet = /^(-?)([^'a-z"]+?) ?(?:'|ft|feet|foot) ?-? ?([\d][^'a-z]*?) ?(?:"|in|inch|inches)?$/.exec(
    typed,
  )
  if (feet) return readFeetAndInches(feet[1] === '-', feet[2] ?? '', feet[3] ?? '', displayUnit)

  const [, number = '', unit = ''] = /^(.*?) ?([a-z"'°]*)$/.exec(typed) ?? []
  const scale = unit === '' ? (displayUnit === 'mm' ? 1 : MM_PER_INCH) : MM_PER_UNIT[unit]
  if (scale === undefined) {
    return unread('wrong-unit', `“${unit}” is not a length unit here. Use mm, cm, m, in (or ") or ft.`)
  }
  const shown: DisplayUnit = unit === '' ? displayUnit : scale % MM_PER_INCH === 0 ? 'in' : 'mm'
  return finish(readQuantity(number), scale, (mm) => formatLength(mm, shown, { decimals: 6 }))
}

/**
 * An angle in degrees: `45`, `45°`, `22,5`, `22 1/2 deg`, `-30`, `45° 30'`, or a simple sum (`90 - 52.5`).
 * `value` is in degrees.
 */
export function parseAngle(text: string): ParsedNumber {
  const typed = tidy(text)
  const checked = checkTyped(typed, "30, 22.5 or 45° 30'")
  if (checked) return checked
  const one = readAngle(typed)
  if (one.kind !== 'error') return one
  return readSum(typed, readAngle, (degrees) => formatAngle(degrees, { decimals: 6 })) ?? one
}

function readAngle(typed: string): ParsedNumber {
  const sixtieths = /^(-?)([\d.,]+) ?(?:°|deg) ?([\d.,]+) ?'(?: ?([\d.,]+) ?")?$/.exec(typed)
  if (sixtieths) return readSixtieths(sixtieths[1] === '-', sixtieths.slice(2))

  const [, number = '', unit = ''] = /^(.*?) ?([a-z"'°]*)$/.exec(typed) ?? []
  if (!['', '°', 'deg', 'degree', 'degrees'].includes(unit)) {
    return unread('wrong-unit', `“${unit}” is not an angle unit here. Type degrees, for example 30 or 22.5°.`)
  }
  return finish(readQuantity(number), 1, (degrees) => formatAngle(degrees, { decimals: 6 }))
}

/**
 * What a length field holds after an edit. Text that still reads as the stored value is shown gives back the
 * stored value bit for bit, so looking at a number in inches never changes it.
 */
export function readLengthField(text: string, stored: number, unit: DisplayUnit): ParsedNumber {
  const shown = formatLength(stored, unit)
  if (text === shown || text === formatLength(stored, unit, { bare: true })) {
    return { kind: 'value', value: stored, echo: shown }
  }
  return parseLength(text, unit)
}

function checkTyped(typed: string, example: string): ParsedNumber | null {
  if (typed === '') return unread('empty', `Type a number, for example ${example}.`)
  if (typed.length > 40)
    return unread('too-long', 'That is too long for a number. Type at most 40 characters.')
  return null
}

function finish(quantity: Quantity, scale: number, echo: (value: number) => string): ParsedNumber {
  if (quantity.kind === 'error') return quantity
  const [first, second] = quantity.values.map((value): ReadNumber => {
    return { kind: 'value', value: value * scale, echo: echo(value * scale) }
  })
  if (!first) throw new Error('a quantity has at least one value')
  if (!second) return first
  return {
    kind: 'ambiguous',
    readings: [first, second],
    message: `Is that ${first.echo} or ${second.echo}? Type a point for decimals, and no comma for thousands.`,
  }
}

function readFeetAndInches(negative: boolean, feet: string, inches: string, unit: DisplayUnit): ParsedNumber {
  const parts = [readQuantity(feet), readQuantity(inches)] as const
  for (const part of parts) if (part.kind === 'error') return part
  const [whole, rest] = parts.map((part) =>
    part.kind === 'value' && part.values.length === 1 ? part.values[0] : undefined,
  )
  if (whole === undefined || rest === undefined) {
    return unread('not-a-number', 'Type feet and inches without a comma, for example 1\' 6 1/2".')
  }
  const value = (negative ? -1 : 1) * (whole * 12 + rest) * MM_PER_INCH
  return { kind: 'value', value, echo: formatLength(value, unit === 'mm' ? 'mm' : 'in', { decimals: 6 }) }
}

function readSixtieths(negative: boolean, texts: readonly (string | undefined)[]): ParsedNumber {
  let value = 0
  for (const [i, text] of texts.entries()) {
    if (text === undefined) continue
    const part = readQuantity(text)
    if (part.kind === 'error') return part
    const [only, another] = part.values
    if (only === undefined || another !== undefined || (i > 0 && only >= 60)) {
      return unread('not-a-number', "Minutes and seconds run from 0 to 59, for example 45° 30'.")
    }
    value += only / 60 ** i
  }
  if (negative) value = -value
  return { kind: 'value', value, echo: formatAngle(value, { decimals: 6 }) }
}
