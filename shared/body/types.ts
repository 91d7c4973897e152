import type { Loop, Point, Segment } from '../geometry/types.ts'

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

/** A contour segment remembers its edge; `edge` is null for the step between smooth walls of unlike tilt. */
export type ContourSegment = Segment & { readonly edge: number | null }

export interface Contour {
  readonly depth: number
  readonly loops: readonly (readonly ContourSegment[])[]
}

export type CornerKind = 'convex' | 'concave' | 'smooth'

/** The seam over one band of depth in which neither wall changes tilt. */
export interface SeamBand {
  readonly fromDepth: number
  readonly toDepth: number
  /** Tilts of the wall before and the wall after the corner. */
  readonly tilts: readonly [number, number]
  /** Angle of the seam from vertical; null where no single seam exists (a step at a smooth corner). */
  readonly seamTilt: number | null
}

export interface Corner extends CornerRef {
  readonly at: Point
  readonly kind: CornerKind
  /** Angle inside the material between the two edges. */
  readonly interiorAngle: number
  readonly bands: readonly SeamBand[]
  /** Smooth corner whose walls do not agree at some depth. */
  readonly step: boolean
}

export type EventKind = 'vanish' | 'split' | 'break-through'

/** The first depth at which the plain contour stops being right, and where. */
export interface BodyEvent extends EdgeRef {
  readonly kind: EventKind
  readonly depth: number
  readonly at: Point
  /** The other edge that is met, for a split or a break-through. */
  readonly other: EdgeRef | null
}

/** A face of the mesh that a person can point at. */
export type MeshFace =
  | { readonly kind: 'top' }
  | { readonly kind: 'bottom' }
  | ({ readonly kind: 'wall'; readonly facet: number } & EdgeRef)
  | ({ readonly kind: 'step' } & CornerRef)

/**
 * Triangles of the body from the top face to the bottom, or to the first event. Flat-shaded: vertices are
 * not shared between faces, but the positions of neighbours are bit-for-bit equal, so the skin is closed.
 * x, y in the plate's plane, z up (top face at 0).
 */
export interface BodyMesh {
  /** xyz of each vertex. */
  readonly positions: Float64Array
  /** xyz of each vertex's normal, pointing out of the material (smooth along an arc). */
  readonly normals: Float64Array
  /** Three vertex indices per triangle, counter-clockwise seen from outside. */
  readonly indices: Uint32Array
  /** For each triangle an index into `faces`. */
  readonly faceOfTriangle: Uint32Array
  readonly faces: readonly MeshFace[]
  /** Polylines to draw: xyz runs. */
  readonly lines: readonly MeshLine[]
  /** Depth down to which the mesh goes. */
  readonly depth: number
}

export interface MeshLine {
  readonly kind: 'top' | 'bottom' | 'level' | 'seam'
  readonly loop: number
  /** Edge of a top, bottom or level line. */
  readonly edge: number | null
  /** Vertex of a seam. */
  readonly vertex: number | null
  readonly points: Float64Array
}
