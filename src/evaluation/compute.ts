import type { BodyMesh } from '../../shared/solid/types.ts'
import { EvaluationError } from '../../shared/evaluate/error.ts'
import { evaluateWithMesh } from '../../shared/evaluate/evaluate.ts'
import type { Evaluation, EvaluationRequest } from '../../shared/evaluate/schema.ts'
import type { Outcome } from './messages.ts'

export interface Evaluated {
  readonly evaluation: Evaluation
  readonly mesh: BodyMesh
}

/** The front door and the mesh; a refusal comes back as a value with its code. */
export function compute(request: EvaluationRequest): Outcome<Evaluated> {
  try {
    return { ok: true, result: evaluateWithMesh(request) }
  } catch (error) {
    if (error instanceof EvaluationError) return { ok: false, code: error.code, message: error.message }
    const reason = error instanceof Error ? error.message : String(error)
    return {
      ok: false,
      code: 'failed',
      message: `The part could not be computed (${reason}). Step back, or report it.`,
    }
  }
}
