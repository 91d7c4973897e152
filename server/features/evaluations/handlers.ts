import type { HandlersOf } from '../../http/call.ts'

export const evaluationHandlers: HandlersOf<'evaluate'> = {
  evaluate: ({ services, body }) => services.evaluator.evaluate(body),
}
