import type { EdgeEnd, Facet, Wall } from './types.ts'

/** The cross-section of one wall, told from its top edge. */

/** A wall that goes straight down. */
export function squareWall(thickness: number): Wall {
  return { facets: [{ depth: thickness, tilt: 0 }] }
}

/** Tilt of a facet at one end of its edge, radians. */
export function facetTilt(facet: Facet, end: EdgeEnd): number {
  return end === 'end' ? (facet.endTilt ?? facet.tilt) : facet.tilt
}

/** Whether the wall's tilt changes along its edge, at any depth. */
export function blends(wall: Wall): boolean {
  return wall.facets.some(({ tilt, endTilt }) => endTilt !== undefined && endTilt !== tilt)
}

/** The wall of the same edge travelled the other way; one that does not blend is given back as it is. */
export function reversedWall(wall: Wall): Wall {
  if (!blends(wall)) return wall
  return {
    facets: wall.facets.map(({ depth, tilt, endTilt }) =>
      endTilt === undefined ? { depth, tilt } : { depth, tilt: endTilt, endTilt: tilt },
    ),
  }
}

/**
 * ∫ tan(tilt) from the top to a depth at one end of the edge: how far the wall stands outside its top edge there,
 * mm. The last facet is prolonged. Between the ends of a blend reach goes evenly.
 */
export function reachAt(wall: Wall, depth: number, end: EdgeEnd = 'start'): number {
  const last = wall.facets.length - 1
  let reach = 0
  let top = 0
  for (const [i, facet] of wall.facets.entries()) {
    const slope = Math.tan(facetTilt(facet, end))
    if (depth <= facet.depth || i === last) return reach + (depth - top) * slope
    reach += (facet.depth - top) * slope
    top = facet.depth
  }
  return reach
}

/** Tilt just below a depth at one end of the edge; at the bottom and beyond, that of the last facet. */
export function tiltAt(wall: Wall, depth: number, end: EdgeEnd = 'start'): number {
  const facet = wall.facets[facetIndexAt(wall, depth)]
  return facet ? facetTilt(facet, end) : 0
}

/** Index of the facet just below a depth; at the bottom and beyond, the last. */
export function facetIndexAt(wall: Wall, depth: number): number {
  const index = wall.facets.findIndex((facet) => depth < facet.depth)
  return index < 0 ? wall.facets.length - 1 : index
}

/** Reach of the wall's outermost line (its root) at one end of the edge, never below 0 as the top edge counts too. */
export function outermostReach(wall: Wall, end: EdgeEnd = 'start'): number {
  return wall.facets.reduce((most, facet) => Math.max(most, reachAt(wall, facet.depth, end)), 0)
}

/**
 * Whether a straight jet can cut every facet without entering the part: no facet's line, prolonged, does so
 * exactly when tilt never increases with depth (derived: reach is then concave). Along a blend tangents of tilts go
 * evenly from one end to the other, so that what holds at both ends holds between them.
 */
export function tiltNeverIncreases(wall: Wall): boolean {
  return (['start', 'end'] as const).every((end) =>
    wall.facets.every((facet, i) => {
      const above = wall.facets[i - 1]
      return !above || facetTilt(facet, end) <= facetTilt(above, end)
    }),
  )
}
