/** A request that passes the schema but has no sound meaning. The caller's fault, never a crash. */

export const evaluationErrorCodes = [
  'wall-names-no-edge',
  'wall-named-twice',
  'facets-out-of-order',
  'facets-miss-thickness',
  'edge-of-no-length',
  'loop-of-no-area',
  'not-finite',
] as const

export type EvaluationErrorCode = (typeof evaluationErrorCodes)[number]

export class EvaluationError extends Error {
  override readonly name = 'EvaluationError'
  readonly code: EvaluationErrorCode
  /** Caller's numbering. */
  readonly loop: number | undefined
  readonly edge: number | undefined

  constructor(code: EvaluationErrorCode, message: string, place: { loop?: number; edge?: number } = {}) {
    super(message)
    this.code = code
    this.loop = place.loop
    this.edge = place.edge
  }
}
