import type { EntityManager, EntityTarget } from 'typeorm'
import { Refusal } from './refusal.ts'

interface Versioned {
  id: string
  version: number
}

/**
 * Moves a row from the version that the client saw to the next, or refuses. One conditional update decides;
 * after it the row is ours until the transaction ends. `current` presents the row as it is now, for the
 * refusal, and itself refuses when there is none.
 */
export async function claimVersion<T extends Versioned>(
  manager: EntityManager,
  entity: EntityTarget<T>,
  { id, version }: { readonly id: string; readonly version: number },
  current: () => Promise<unknown>,
): Promise<void> {
  const { affected } = await manager
    .createQueryBuilder()
    .update(entity)
    .set({ version: () => 'version + 1' } as never)
    .where('id = :id AND version = :version', { id, version })
    .execute()
  if (affected === 1) return
  throw new Refusal('version-stale', 'Someone else changed this meanwhile. Compare both, then save again.', {
    details: { current: await current() },
  })
}
