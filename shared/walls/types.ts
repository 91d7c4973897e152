import type { Loop } from '../geometry/types.ts'

/**
 * A bevelled plate: a profile, a thickness, and a wall for every edge. Millimetres and radians; depth runs
 * down from the top face (0) to the thickness.
 */

/** One flat (or, on an arc, conical) piece of a wall. */
export interface Facet {
  /** Depth at which the facet ends. */
  readonly depth: number
  /** Angle from vertical, positive when the wall moves outward with depth. */
  readonly tilt: number
}

/** The cut surface of one edge: facets from the top face down; the last ends at the thickness. */
export interface Wall {
  readonly facets: readonly Facet[]
}

/** Which line of every wall the drawing's outline is. */
export type Datum = 'top' | 'bottom' | 'root'

export interface Body {
  readonly thickness: number
  readonly datum: Datum
  /** The drawing's loops: outer counter-clockwise first, holes clockwise. */
  readonly loops: readonly Loop[]
  /** walls[loop][edge], one for every edge. */
  readonly walls: readonly (readonly Wall[])[]
}

export interface EdgeRef {
  readonly loop: number
  readonly edge: number
}

/** Vertex i is the corner where edge i starts and edge i − 1 ends. */
export interface CornerRef {
  readonly loop: number
  readonly vertex: number
}
