import type { Wall } from './types.ts'

/** The cross-section of one wall, told from its top edge. */

/** A wall that goes straight down. */
export function squareWall(thickness: number): Wall {
  return { facets: [{ depth: thickness, tilt: 0 }] }
}

/** ∫ tan(tilt) from the top to a depth: how far the wall stands outside its top edge there, mm. The last facet is prolonged. */
export function reachAt(wall: Wall, depth: number): number {
  const last = wall.facets.length - 1
  let reach = 0
  let top = 0
  for (const [i, facet] of wall.facets.entries()) {
    if (depth <= facet.depth || i === last) return reach + (depth - top) * Math.tan(facet.tilt)
    reach += (facet.depth - top) * Math.tan(facet.tilt)
    top = facet.depth
  }
  return reach
}

/** Tilt just below a depth; at the bottom and beyond, that of the last facet. */
export function tiltAt(wall: Wall, depth: number): number {
  return wall.facets[facetIndexAt(wall, depth)]?.tilt ?? 0
}

/** Index of the facet just below a depth; at the bottom and beyond, the last. */
export function facetIndexAt(wall: Wall, depth: number): number {
  const index = wall.facets.findIndex((facet) => depth < facet.depth)
  return index < 0 ? wall.facets.length - 1 : index
}

/** Reach of the wall's outermost line (its root), never below 0 as the top edge counts too. */
export function outermostReach(wall: Wall): number {
  return wall.facets.reduce((most, facet) => Math.max(most, reachAt(wall, facet.depth)), 0)
}

/**
 * Whether a straight jet can cut every facet without entering the part: no facet's line, prolonged, does so
 * exactly when tilt never increases with depth (derived: reach is then concave).
 */
export function tiltNeverIncreases(wall: Wall): boolean {
  return wall.facets.every((facet, i) => i === 0 || facet.tilt <= (wall.facets[i - 1]?.tilt ?? facet.tilt))
}
