import { edgeKey, parseEdgeKey } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import type { Loop } from '../../../../shared/geometry/types.ts'

/** What a link to the bench carries: `?rev=7&edges=0-1,0-3&view=…`. */

/** Edges that a link names at most, so that it can still be sent. */
export const MOST_EDGES_IN_LINK = 200

export function readRevision(text: string | null): number | null {
  return text !== null && /^[1-9]\d{0,5}$/.test(text) ? Number(text) : null
}

/** The edges of a link that the profile has; anything else in it is passed over. */
export function readEdges(text: string | null, loops: readonly Loop[]): EdgeRef[] {
  const edges = (text ?? '').split(',').flatMap((key) => parseEdgeKey(key) ?? [])
  const known = edges.filter(({ loop, edge }) => loops[loop]?.[edge] !== undefined)
  return [...new Map(known.map((edge) => [edgeKey(edge), edge])).values()]
}

/** Null when there is nothing to name, or too much. */
export function writeEdges(edges: readonly EdgeRef[]): string | null {
  if (edges.length === 0 || edges.length > MOST_EDGES_IN_LINK) return null
  return edges.map(edgeKey).join(',')
}
