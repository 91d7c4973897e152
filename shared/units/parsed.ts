/** What reading a typed number gives: a value, a question, or an error that says what to do. */

/** `value` is in millimetres or degrees; `echo` repeats how the text was understood, with its unit. */
export interface ReadNumber {
  readonly kind: 'value'
  readonly value: number
  readonly echo: string
}

/** The text has two sound readings; the person must pick one. */
export interface AmbiguousNumber {
  readonly kind: 'ambiguous'
  readonly readings: readonly [ReadNumber, ReadNumber]
  readonly message: string
}

export const unreadCodes = ['empty', 'not-a-number', 'wrong-unit', 'division-by-zero', 'too-long'] as const
export type UnreadCode = (typeof unreadCodes)[number]

export interface UnreadNumber {
  readonly kind: 'error'
  readonly code: UnreadCode
  readonly message: string
}

export type ParsedNumber = ReadNumber | AmbiguousNumber | UnreadNumber

export function unread(code: UnreadCode, message: string): UnreadNumber {
  return { kind: 'error', code, message }
}
