/** Pieces of a DXF text: tags, numbers, safe strings. R2000 (AC1015), ASCII. */

export type Tag = readonly [code: number, value: string | number]

export function tagsText(tags: readonly Tag[]): string {
  return tags.map(([code, value]) => `${code}\r\n${value}\r\n`).join('')
}

/** A plain decimal, never an exponent; 1e-12 mm is a thousandth of an atom. */
const DECIMALS = 12

export function real(value: number): string {
  const text = value.toFixed(DECIMALS).replace(/\.?0+$/, '')
  return text === '-0' || text === '' ? '0.0' : text.includes('.') ? text : `${text}.0`
}

/** One line of ASCII: control characters would end the tag early, others are written as the format's escapes. */
export function plainLine(text: string): string {
  return [...text]
    .map((character) => {
      const code = character.codePointAt(0) ?? 0
      if (code < 32 || code === 127) return ' '
      if (code < 127) return character
      return code > 0xffff ? '?' : `\\U+${code.toString(16).toUpperCase().padStart(4, '0')}`
    })
    .join('')
}

/** Handles count up in hex; none is used twice. */
export function handles(): { next(): string; peek(): string } {
  let last = 0
  const text = (value: number) => value.toString(16).toUpperCase()
  return {
    next() {
      last += 1
      return text(last)
    },
    peek() {
      return text(last + 1)
    },
  }
}
