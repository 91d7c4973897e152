/**
 * The flat shapes that everything else is made of. Millimetres and radians; X right, Y away.
 *
 * Material lies on the left of a segment: an outer loop runs counter-clockwise, a hole clockwise, so the
 * outward normal (into the waste) always points to the right of the direction of travel.
 */

export interface Point {
  readonly x: number
  readonly y: number
}

/**
 * A corner of a loop as files and requests write it. `bulge` describes the edge that *starts* here, as in
 * DXF: tan of a quarter of the arc's included angle, positive for counter-clockwise, 0 or absent for a line.
 */
export interface Vertex extends Point {
  readonly bulge?: number | undefined
}

/** A closed loop of vertices; edge i runs from vertex i to vertex i + 1, the last back to the first. */
export type VertexLoop = readonly Vertex[]

export interface LineSegment {
  readonly kind: 'line'
  readonly from: Point
  readonly to: Point
}

export interface ArcSegment {
  readonly kind: 'arc'
  readonly from: Point
  readonly to: Point
  readonly centre: Point
  readonly radius: number
  /** Signed included angle, radians: positive counter-clockwise; |sweep| < 2π. */
  readonly sweep: number
}

export type Segment = LineSegment | ArcSegment

/** A closed run of segments; segment i is edge i. */
export type Loop = readonly Segment[]

export interface Bounds {
  readonly minX: number
  readonly minY: number
  readonly maxX: number
  readonly maxY: number
}
