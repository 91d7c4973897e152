import type { CornerRef, EdgeRef } from '../walls/types.ts'

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
