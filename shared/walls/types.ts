import type { Loop } from '../geometry/types.ts'

/**
 * A bevelled plate: a profile, a thickness, and a wall for every edge. Millimetres and radians; depth runs
 * down from the top face (0) to the thickness.
 */

/**
 * One piece of a wall: flat, on an arc conical; twisted where it blends from one tilt into another. Along a blend the
 * wall's reach (not its tilt) goes evenly from the edge's start to its end, so that the contour of a line is at every
 * depth the straight line between its two corners.
 */
export interface Facet {
  /** Depth at which the facet ends, the same all along the edge. */
  readonly depth: number
  /** Angle from vertical, positive when the wall moves outward with depth; of a blend, the one at the edge's start. */
  readonly tilt: number
  /** Of a blend: the angle at the edge's end. */
  readonly endTilt?: number | undefined
}

/** The two ends of an edge, in the direction of travel. */
export type EdgeEnd = 'start' | 'end'

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
