import { EvaluationError, type EvaluationErrorCode } from '../../../shared/evaluate/error.ts'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { Evaluation, EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import type { WorkerAnswer } from '../../workers/run-in-worker.ts'

export interface EvaluationFailure {
  readonly code: EvaluationErrorCode
  readonly message: string
  readonly loop: number | undefined
  readonly edge: number | undefined
}

/** The evaluation, or why there is none, as a value that can leave a thread. */
export function answerTo(request: EvaluationRequest): WorkerAnswer<Evaluation, EvaluationFailure> {
  try {
    return { value: evaluate(request) }
  } catch (error) {
    if (!(error instanceof EvaluationError)) throw error
    const { code, message, loop, edge } = error
    return { failure: { code, message, loop, edge } }
  }
}
