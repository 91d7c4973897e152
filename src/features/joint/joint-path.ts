import { edgeKey } from '../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'

/** Address of a joint page; it names the revision, so that turning to the next edge stays within it. */
export function jointPath(setupId: string, edge: EdgeRef, revision: number): string {
  return `/setups/${setupId}/joint/${edgeKey(edge)}?rev=${revision}`
}
