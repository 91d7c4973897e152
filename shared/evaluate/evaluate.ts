import type { Body, BodyMesh } from '../body/types.ts'
import type { Evaluation, EvaluationRequest } from './schema.ts'

/**
 * The front door: a set-up in, everything known about it out. Pure; the browser's worker and the server run
 * the same. Throws `EvaluationError` when the request has no sound meaning. All numbering in the answer is the
 * caller's, also where a loop came in the other way round.
 */
export function evaluate(request: EvaluationRequest): Evaluation {
  throw new Error(`the kernel is not joined yet: ${request.loops.length}`)
}

/** The solid alone, in its own numbering (loops put the right way round). */
export function bodyOf(request: EvaluationRequest): Body {
  throw new Error(`the kernel is not joined yet: ${request.loops.length}`)
}

/** The mesh of the solid, faces and lines in the caller's numbering. */
export function evaluatedMesh(request: EvaluationRequest): BodyMesh {
  throw new Error(`the kernel is not joined yet: ${request.loops.length}`)
}
