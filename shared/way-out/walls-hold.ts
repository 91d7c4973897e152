import type { Facet, Wall } from '../walls/types.ts'

/** What one wall allows the piece inside it per mm of rise or fall: n·(x, y) ≤ bound. mm and radians. */
export interface Allowance {
  readonly up: number
  readonly down: number
  /** The facets that set them. */
  readonly upFacet: number
  readonly downFacet: number
}

/** The tilts between which a facet's tilt lies along its edge: the same twice except where it blends. */
function tiltsOf(facet: Facet): readonly [number, number] {
  const end = facet.endTilt ?? facet.tilt
  return [Math.min(facet.tilt, end), Math.max(facet.tilt, end)]
}

/**
 * The tightest of a wall's facets. A facet's outward normal is (n cos β, sin β); a move (x, y, 1) keeps clear
 * of it where n·(x, y) ≤ −tan β, a move (x, y, −1) where n·(x, y) ≤ tan β, and a kerf W adds W/(t cos β)
 * (shared definition of the way out). `side` is 1 for the piece inside the material's loop (the part) and −1
 * for the waste on the other side of the wall, whose normal and tilt are both turned round.
 */
export function allowanceOf(wall: Wall, side: 1 | -1, thickness: number, kerf: number): Allowance {
  let up = Infinity
  let down = Infinity
  let upFacet = 0
  let downFacet = 0
  for (const [f, facet] of wall.facets.entries()) {
    for (const tilt of tiltsOf(facet)) {
      const room = kerf / (thickness * Math.cos(tilt))
      const slope = side * Math.tan(tilt)
      if (room - slope < up) {
        up = room - slope
        upFacet = f
      }
      if (room + slope < down) {
        down = room + slope
        downFacet = f
      }
    }
  }
  return { up, down, upFacet, downFacet }
}
