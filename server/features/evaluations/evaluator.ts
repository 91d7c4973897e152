import type { Evaluation, EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import { Refusal } from '../../http/refusal.ts'
import { runInWorker, workerFile, type WorkerOutcome } from '../../workers/run-in-worker.ts'
import { Slots } from '../../workers/slots.ts'
import { answerTo, type EvaluationFailure } from './answer.ts'

/** Up to so many edges an evaluation takes a few milliseconds and stays in the main thread. */
const SMALL = 500
const AT_ONCE = 2
const MAY_WAIT = 20
const MEMORY_MB = 1_024

/** The server's own evaluations: small ones at once, large ones in a thread with a deadline. */
export class Evaluator {
  readonly #slots = new Slots(AT_ONCE, MAY_WAIT)
  readonly #deadline: number

  constructor(deadline: number) {
    this.#deadline = deadline
  }

  /** Refuses with `unusable-geometry` when the request has no sound meaning. */
  async evaluate(request: EvaluationRequest): Promise<Evaluation> {
    const edges = request.loops.reduce((sum, loop) => sum + loop.length, 0)
    const outcome = edges < SMALL ? answerTo(request) : await this.#inThread(request)
    if ('value' in outcome) return outcome.value
    if ('failure' in outcome) {
      const { message, ...details } = outcome.failure
      throw new Refusal('unusable-geometry', message, { details })
    }
    throw new Refusal(
      'unusable-geometry',
      'Evaluating this takes too long. Simplify the profile and try again.',
    )
  }

  #inThread(request: EvaluationRequest): Promise<WorkerOutcome<Evaluation, EvaluationFailure>> {
    return this.#slots.run(() =>
      runInWorker(workerFile('evaluate-worker', import.meta.url), request, {
        deadline: this.#deadline,
        memoryMb: MEMORY_MB,
      }),
    )
  }
}
