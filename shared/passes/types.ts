/**
 * The way of the jet. A jet line is told by where its axis crosses the top face (x, y) and by its slope (p, q):
 * how far the axis moves sideways per mm of depth. At depth d the axis is at (x + p·d, y + q·d); above the plate
 * d is negative. Whole tilt A = atan(hypot(p, q)). mm; columns, not objects, as there may be a hundred thousand.
 */

/** What the move that begins at a station does. */
export const MoveKind = {
  /** From the pierce point through the waste to the wall. */
  leadIn: 0,
  /** Along a wall, the jet square to it. */
  cut: 1,
  /** Along a wall, the jet leaning in the wall's plane toward a seam or back from one. */
  lean: 2,
  /** Standing on a corner while the jet turns. */
  pivot: 3,
  /** Along a wall's prolongation, past its end, into the waste. */
  runOut: 4,
  /** Through the waste from one wall's prolongation to the next one's. */
  turn: 5,
  /** Along a wall's prolongation from the waste to the wall's start. */
  runIn: 6,
  /** Away from the wall through the waste. */
  leadOut: 7,
  /** The last station of a pass: nothing follows. */
  end: 8,
} as const

/** All passes one after the other; column i tells station i and the move from it to station i + 1. */
export interface JetPath {
  readonly count: number
  readonly x: Float64Array
  readonly y: Float64Array
  readonly p: Float64Array
  readonly q: Float64Array
  /** A `MoveKind`. */
  readonly move: Uint8Array
  /** The edge, numbered through all loops, whose wall the move cuts; −1 for none. */
  readonly edge: Int32Array
  /** The facet of that wall, from the top. */
  readonly facet: Uint8Array
  /**
   * Signed turn of a round move about (cx, cy), radians; 0 for a straight move, along which x, y, p and q go
   * evenly. Along a round one the point's distance from the centre and the slope's parts along and across the
   * radius go evenly with the angle.
   */
  readonly sweep: Float64Array
  readonly cx: Float64Array
  readonly cy: Float64Array
}

/** Ways round a corner. */
export const CornerMove = {
  /** Nothing to do: the walls run smoothly into each other. */
  none: 0,
  lean: 1,
  runOut: 2,
  pivot: 3,
} as const

export const passReasons = [
  'holes-before-outside',
  'bevel-while-held',
  'frees-its-loop',
  'loose-when-cut',
] as const
/** Why a pass stands where it stands in the order. */
export type PassReason = (typeof passReasons)[number]

export interface Pass {
  readonly loop: number
  /** First and last station. */
  readonly first: number
  readonly last: number
  /** Goes all the way round its loop. */
  readonly closed: boolean
  /** 0 follows every root facet and frees what is inside or outside; −1, −2 … the facets above the root, 1, 2 … those below. */
  readonly level: number
  readonly reasons: readonly PassReason[]
}

/** Passes stand in the order in which they are cut. */
export interface Passes {
  readonly path: JetPath
  readonly passes: readonly Pass[]
  /** Per corner g (where edge g starts) a `CornerMove`: how the level-0 pass goes round it. */
  readonly cornerMoves: Uint8Array
}
