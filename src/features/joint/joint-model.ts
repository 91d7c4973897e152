import { edgeName } from '../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../shared/walls/types.ts'
import type { FacetSpec } from '../../../shared/walls/schema.ts'
import type { Band } from '../../../shared/units/band.ts'
import { judge } from '../../../shared/joint/judge.ts'
import type { JointSpec, SetupContent } from '../../../shared/setup/schema.ts'
import { anglesThreeWays, type AngleThreeWays } from '../../../shared/joint/angles.ts'

/** What the joint page says of one edge, from a revision's content. mm and degrees. */
export interface JointEdge extends EdgeRef {
  readonly name: string
  readonly facets: readonly FacetSpec[]
  readonly joint: JointSpec | null
}

/** The edge with its facets; an edge without a wall is square. Null when the part has no such edge. */
export function jointEdgeOf(content: SetupContent, { loop, edge }: EdgeRef): JointEdge | null {
  const vertices = content.loops[loop]
  if (vertices === undefined || edge >= vertices.length) return null
  const isIt = (other: EdgeRef) => other.loop === loop && other.edge === edge
  return {
    loop,
    edge,
    name: edgeName({ loop, edge }),
    facets: content.walls.find(isIt)?.facets ?? [{ depth: content.plate.thickness, tilt: 0 }],
    joint: content.joints.find(isIt) ?? null,
  }
}

/** Edges worth a welder's look: bevelled ones and those with a joint, in order round the part. */
export function edgesWithPrep(content: SetupContent): JointEdge[] {
  const bevelled = content.walls.filter(({ facets }) => facets.some(({ tilt }) => tilt !== 0))
  const seen = new Map<string, JointEdge>()
  for (const ref of [...bevelled, ...content.joints]) {
    const found = jointEdgeOf(content, ref)
    if (found) seen.set(found.name, found)
  }
  return [...seen.values()].sort((a, b) => a.loop - b.loop || a.edge - b.edge)
}

/** The edges before and after this one among those with a prep; the list is walked round. */
export function neighbours(
  edges: readonly JointEdge[],
  { loop, edge }: EdgeRef,
): { readonly previous: JointEdge | null; readonly next: JointEdge | null } {
  const others = edges.filter((other) => other.loop !== loop || other.edge !== edge)
  const after = others.find((other) => other.loop > loop || (other.loop === loop && other.edge > edge))
  const before = others.findLast((other) => other.loop < loop || (other.loop === loop && other.edge < edge))
  return { previous: before ?? others.at(-1) ?? null, next: after ?? others[0] ?? null }
}

export interface AngleRow extends AngleThreeWays {
  readonly facet: number
  /** Which part of the wall: "upper bevel", "bevel". */
  readonly where: string
  /** Null where no joint says what stands opposite. */
  readonly included: number | null
}

/** A row for every tilted facet; one row of the square edge when none is tilted. */
export function angleRows({ facets, joint }: Pick<JointEdge, 'facets' | 'joint'>): AngleRow[] {
  const tilted = facets.flatMap(({ tilt }, facet) => (tilt === 0 ? [] : [{ tilt, facet }]))
  const shown = tilted.length > 0 ? tilted : [{ tilt: facets[0]?.tilt ?? 0, facet: 0 }]
  return shown.map(({ tilt, facet }, i) => {
    const three = anglesThreeWays(tilt, joint?.mate === 'same' ? tilt : 0)
    return {
      ...three,
      facet,
      where:
        tilted.length === 0 ? 'square' : tilted.length === 1 ? 'bevel' : (ORDINALS[i] ?? `facet ${i + 1}`),
      included: joint ? three.grooveAngle : null,
    }
  })
}

const ORDINALS = ['upper bevel', 'lower bevel', 'third bevel']

/** Lowest and highest value that a gauge may read; a length or an angle below nothing is nothing. */
export function allowed(nominal: number, band: Band): { readonly from: number; readonly to: number } {
  const { lowest, highest } = judge(nominal, nominal, band)
  return { from: Math.max(0, lowest), to: highest }
}
