import { aboutHandlers } from '../features/about/handlers.ts'
import { drawingHandlers } from '../features/drawings/handlers.ts'
import { evaluationHandlers } from '../features/evaluations/handlers.ts'
import { headHandlers } from '../features/heads/handlers.ts'
import { partHandlers } from '../features/parts/handlers.ts'
import { peopleHandlers } from '../features/people/handlers.ts'
import { recordHandlers } from '../features/record/handlers.ts'
import { sessionHandlers } from '../features/session/handlers.ts'
import { decisionHandlers } from '../features/setups/decide.ts'
import { draftHandlers } from '../features/setups/drafts.ts'
import { readingHandlers } from '../features/setups/read.ts'
import { savingHandlers } from '../features/setups/save.ts'
import type { Handlers } from './call.ts'

/** A handler for every route of the table; the compiler misses none. */
export const handlers: Handlers = {
  ...aboutHandlers,
  ...sessionHandlers,
  ...peopleHandlers,
  ...headHandlers,
  ...drawingHandlers,
  ...partHandlers,
  ...savingHandlers,
  ...decisionHandlers,
  ...readingHandlers,
  ...draftHandlers,
  ...evaluationHandlers,
  ...recordHandlers,
}
