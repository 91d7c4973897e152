import { useEffect, useRef, useState } from 'react'
import type { BodyMesh } from '../../shared/solid/types.ts'
import type { Evaluation, EvaluationRequest } from '../../shared/evaluate/schema.ts'
import type { Evaluated } from './compute.ts'
import { LatestQueue, type WorkerLike } from './queue.ts'

export interface EvaluationError {
  readonly code: string
  readonly message: string
}

export interface EvaluationState {
  /** The newest good answer and the request that it belongs to; they stay while a newer one is computed. */
  readonly evaluation: Evaluation | null
  readonly mesh: BodyMesh | null
  readonly request: EvaluationRequest | null
  /** Why the present request has no answer. */
  readonly error: EvaluationError | null
  /** The present request is not answered yet. */
  readonly pending: boolean
}

interface Known {
  readonly good: (Evaluated & { readonly request: EvaluationRequest }) | null
  readonly answered: EvaluationRequest | null
  readonly error: EvaluationError | null
}

const nothing: Known = { good: null, answered: null, error: null }

function spawn(): WorkerLike<EvaluationRequest, Evaluated> {
  const worker = new Worker(new URL('./evaluation.worker.ts', import.meta.url), { type: 'module' })
  return worker as unknown as WorkerLike<EvaluationRequest, Evaluated>
}

/**
 * Evaluates a set-up in a worker, for every keystroke. Give the same object for the same request: a new
 * object is a new question. Null asks nothing.
 */
export function useEvaluation(request: EvaluationRequest | null): EvaluationState {
  const queue = useRef<LatestQueue<EvaluationRequest, Evaluated> | null>(null)
  const [known, setKnown] = useState<Known>(nothing)

  useEffect(() => {
    const opened = new LatestQueue<EvaluationRequest, Evaluated>(spawn, ({ request: answered, outcome }) => {
      setKnown(({ good }) =>
        outcome.ok
          ? { good: { ...outcome.result, request: answered }, answered, error: null }
          : { good, answered, error: { code: outcome.code, message: outcome.message } },
      )
    })
    queue.current = opened
    return () => {
      opened.close()
      queue.current = null
    }
  }, [])

  useEffect(() => {
    if (request === null) queue.current?.drop()
    else queue.current?.ask(request)
  }, [request])

  const { good, answered, error } = known
  return {
    evaluation: good?.evaluation ?? null,
    mesh: good?.mesh ?? null,
    request: good?.request ?? null,
    error: answered === request ? error : null,
    pending: request !== null && answered !== request,
  }
}
