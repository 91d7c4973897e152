import type { FacetSpec } from '../../shared/walls/schema.ts'
import { jointSection, mateFacetsOf, sectionOf, type SectionPoint } from '../../shared/joint/section.ts'
import type { SectionSpec } from './types.ts'

export interface Outline {
  /** The wall of the left plate, from the top down, one point more than it has facets. */
  readonly left: readonly SectionPoint[]
  /** The wall of the right plate of a joint; null for one plate. */
  readonly right: readonly SectionPoint[] | null
}

/** Walls of the drawn plates in section millimetres. */
export function outlineOf({ facets, thickness, joint }: SectionSpec): Outline {
  if (joint) {
    const { left, right } = jointSection({ facets, thickness, ...joint })
    return { left, right }
  }
  const wall = sectionOf(facets, thickness)
  const top = wall[0]!.x
  return { left: wall.map(({ x, depth }) => ({ x: x - top, depth })), right: null }
}

/** The other plate's own facets, outward positive. */
export function mateFacets({ facets, thickness, joint }: SectionSpec): readonly FacetSpec[] {
  const facing = joint ? mateFacetsOf(facets, joint.mate) : []
  return facing.length > 0 ? facing : [{ depth: thickness, tilt: 0 }]
}
