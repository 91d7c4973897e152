import type { EntityManager } from 'typeorm'
import type { CurrentUser } from '../../shared/api/people.ts'
import { inTransaction } from '../db/transaction.ts'
import { lockChain } from '../features/record/audit.ts'
import type { Services } from '../services.ts'
import { type IdempotentRequest, keepAnswer, keptAnswer } from './idempotency.ts'

/**
 * All of a change or nothing: runs the work in one transaction, in one order with every other audited change,
 * again when the database asks for that, and once only for one idempotency key.
 */
export async function writeOnce<T>(
  { dataSource }: Services,
  user: CurrentUser | null,
  request: IdempotentRequest | null,
  work: (manager: EntityManager) => Promise<T>,
): Promise<T> {
  return inTransaction(dataSource, async (manager) => {
    await lockChain(manager)
    if (!user || !request) return work(manager)
    const kept = await keptAnswer(manager, user, request)
    if (kept) return kept.answer as T
    const answer = await work(manager)
    await keepAnswer(manager, user, request, answer)
    return answer
  })
}
