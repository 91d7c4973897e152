import { edgeKey } from '../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { FacetSpec } from '../../../shared/walls/schema.ts'
import type { SetupContent } from '../../../shared/setup/schema.ts'

export interface JointEdge {
  readonly edge: EdgeRef
  /** The joint's number on the drawing; null for a bevelled edge without one. */
  readonly label: string | null
  readonly facets: readonly FacetSpec[]
}

/** The edges that a welder may look for: those with a joint by its label, then other bevelled ones in order. */
export function jointEdges({ joints, walls }: Pick<SetupContent, 'joints' | 'walls'>): JointEdge[] {
  const facetsOf = new Map(walls.map((wall) => [edgeKey(wall), wall.facets]))
  const labelled = joints
    .map(({ loop, edge, label }) => ({
      edge: { loop, edge },
      label,
      facets: facetsOf.get(edgeKey({ loop, edge })) ?? [],
    }))
    .sort((a, b) => a.label.localeCompare(b.label, 'en', { numeric: true }))
  const known = new Set(labelled.map(({ edge }) => edgeKey(edge)))
  const others = walls
    .filter((wall) => !known.has(edgeKey(wall)) && wall.facets.some(({ tilt }) => tilt !== 0))
    .map(({ loop, edge, facets }) => ({ edge: { loop, edge }, label: null, facets }))
    .sort((a, b) => a.edge.loop - b.edge.loop || a.edge.edge - b.edge.edge)
  return [...labelled, ...others]
}
