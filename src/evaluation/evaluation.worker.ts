import type { EvaluationRequest } from '../../shared/evaluate/schema.ts'
import { compute, type Evaluated } from './compute.ts'
import type { Answer, Ask } from './messages.ts'
import { packMesh } from './pack.ts'

/** The part of the worker's global scope that is used; the page's library types do not know it. */
interface WorkerScope {
  onmessage: ((event: { data: Ask<EvaluationRequest> }) => void) | null
  postMessage(message: Answer<Evaluated>, transfer: Transferable[]): void
}

const scope = self as unknown as WorkerScope

scope.onmessage = ({ data: { id, request } }) => {
  const outcome = compute(request)
  if (!outcome.ok) return scope.postMessage({ kind: 'answer', id, outcome }, [])
  const { mesh, buffers } = packMesh(outcome.result.mesh)
  scope.postMessage(
    { kind: 'answer', id, outcome: { ok: true, result: { ...outcome.result, mesh } } },
    buffers,
  )
}

scope.postMessage({ kind: 'ready' }, [])
