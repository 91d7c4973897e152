import { DrawingError } from './errors.ts'
import { MAX_LINE, MAX_MAGNITUDE } from './limits.ts'

/** One group: a code that says what the value means, and the value as text. `line` is the value's, from 1. */
export interface Tag {
  readonly code: number
  readonly value: string
  readonly line: number
}

const LINE_FEED = 10
const CARRIAGE_RETURN = 13
const COMMENT = 999

/**
 * Walks the pairs of lines of a DXF text without holding them all: a code line, a value line, until the text
 * ends. Lines may end in LF, CR LF or CR. Comments are passed over.
 */
export class TagReader {
  #text: string
  #position: number
  #line = 0
  #valueStart = 0
  #valueEnd = 0
  code = 0

  constructor(text: string) {
    this.#text = text
    this.#position = text.charCodeAt(0) === 0xfeff ? 1 : 0
  }

  /** Line of the current value, from 1. */
  get line(): number {
    return this.#line
  }

  get value(): string {
    return this.#text.slice(this.#valueStart, this.#valueEnd).trim()
  }

  get tag(): Tag {
    return { code: this.code, value: this.value, line: this.#line }
  }

  /** Moves to the next group; false when only blank lines are left. */
  next(): boolean {
    do {
      if (!this.#readLine()) return false
      const code = groupCode(this.#text, this.#valueStart, this.#valueEnd)
      if (code === null) {
        if (this.#blankFrom(this.#valueStart)) return false
        throw new DrawingError(
          this.#line === 1 ? 'drawing-not-dxf' : 'drawing-malformed',
          `Line ${this.#line} should be a DXF group code. Export the drawing as DXF in text form.`,
          this.#line,
        )
      }
      this.code = code
      if (!this.#readLine()) {
        throw new DrawingError(
          'drawing-truncated',
          'The file stops in the middle. Export it again.',
          this.#line,
        )
      }
    } while (this.code === COMMENT)
    return true
  }

  #readLine(): boolean {
    const text = this.#text
    if (this.#position >= text.length) return false
    let end = this.#position
    let unit = text.charCodeAt(end)
    while (unit !== LINE_FEED && unit !== CARRIAGE_RETURN && end < text.length) unit = text.charCodeAt(++end)
    this.#line += 1
    this.#valueStart = this.#position
    this.#valueEnd = end
    if (end - this.#position > MAX_LINE) {
      throw new DrawingError(
        this.#line === 1 ? 'drawing-not-dxf' : 'drawing-malformed',
        `Line ${this.#line} is longer than ${MAX_LINE} characters. Export the drawing again.`,
        this.#line,
      )
    }
    const pair = unit === CARRIAGE_RETURN && text.charCodeAt(end + 1) === LINE_FEED
    this.#position = end + (pair ? 2 : 1)
    return true
  }

  #blankFrom(start: number): boolean {
    for (let i = start; i < this.#text.length; i++) {
      const unit = this.#text.charCodeAt(i)
      // 0x1a ended text files once, and some exporters still write it.
      if (unit > 32 && unit !== 0x1a) return false
    }
    return true
  }
}

/** A group code is one to four digits with a sign at most, spaces around; null for anything else. */
function groupCode(text: string, start: number, end: number): number | null {
  let from = start
  let to = end
  while (from < to && text.charCodeAt(from) <= 32) from++
  while (to > from && text.charCodeAt(to - 1) <= 32) to--
  const negative = text.charCodeAt(from) === 45
  if (negative) from++
  if (to - from < 1 || to - from > 4) return null
  let code = 0
  for (let i = from; i < to; i++) {
    const digit = text.charCodeAt(i) - 48
    if (digit < 0 || digit > 9) return null
    code = code * 10 + digit
  }
  return negative ? -code : code
}

const DECIMAL = /^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d+)?$/

/**
 * The number that a group holds.
 *
 * @throws DrawingError drawing-number for decimal commas, words, infinities and values beyond 1e12
 */
export function numberOf(tag: Tag): number {
  const value = DECIMAL.test(tag.value) ? Number(tag.value.replace(/[dD]/, 'e')) : Number.NaN
  if (Math.abs(value) <= MAX_MAGNITUDE) return value
  const comma = /^[+-]?\d+,\d*$/.test(tag.value)
  const shown = tag.value.length > 40 ? `${tag.value.slice(0, 40)}…` : tag.value
  throw new DrawingError(
    'drawing-number',
    comma
      ? `Line ${tag.line} reads ${shown}: a decimal comma. Export the drawing with decimal points.`
      : `Line ${tag.line} reads ${shown}, which is not a usable number. Export the drawing again.`,
    tag.line,
  )
}

/** The same for whole numbers (flags, counts); `2.0` is one, `2.5` is refused. */
export function integerOf(tag: Tag): number {
  const value = numberOf(tag)
  if (Number.isInteger(value)) return value
  throw new DrawingError(
    'drawing-number',
    `Line ${tag.line} reads ${tag.value}, where a whole number belongs. Export the drawing again.`,
    tag.line,
  )
}
