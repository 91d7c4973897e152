/** Why a drawing could not be read at all; a closed union shared by the worker, the server and the pages. */
export const drawingErrorCodes = [
  'drawing-empty',
  'drawing-too-large',
  'drawing-binary',
  'drawing-compressed',
  'drawing-not-dxf',
  'drawing-truncated',
  'drawing-malformed',
  'drawing-number',
  'drawing-too-many-entities',
  'drawing-block-recursion',
  'drawing-lost-vertices',
  'drawing-too-slow',
  'drawing-no-geometry',
] as const

export type DrawingErrorCode = (typeof drawingErrorCodes)[number]

/** A refusal with a code, and a message that says what to do. `line` counts from 1 in the file. */
export class DrawingError extends Error {
  readonly code: DrawingErrorCode
  readonly line: number | undefined

  constructor(code: DrawingErrorCode, message: string, line?: number) {
    super(message)
    this.name = 'DrawingError'
    this.code = code
    this.line = line
  }
}
