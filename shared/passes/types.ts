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
  /** A smooth corner of unlike walls: the jet goes over from one to the other along the end of the longer edge. */
  step: 4,
} as const
export type CornerMove = (typeof CornerMove)[keyof typeof CornerMove]

/** Why the jet cannot lean round a corner. */
export const LeanRefusal = {
  none: 0,
  /** The seam asks for more tilt than the limit. */
  overLimit: 1,
  /** On an edge beside it the top or the bottom of the jet would have to go backward. */
  edgeTooShort: 2,
  /** The corner is sharper than twice the taper: no jet leaves both walls. */
  noJet: 3,
  /** There is no seam: smooth, or lines that double back. */
  noSeam: 4,
  /** Beside an arc the seam is bent, by more than a straight jet may stand off it. */
  bent: 5,
} as const
export type LeanRefusal = (typeof LeanRefusal)[keyof typeof LeanRefusal]

/** The jet as a coupon tells it: width at the top face, mm; taper per side, radians. */
export interface Jet {
  readonly kerf: number
  readonly taper: number
  /** Nozzle tip to plate along the axis, and the nozzle's outside, mm. */
  readonly standoff?: number | undefined
  readonly nozzleDiameter?: number | undefined
}

export interface PassLimits {
  /** The strictest limit of the jet's whole tilt, radians; null where none is set. */
  readonly tilt: number | null
}

/** What the user has settled; everything left out is chosen here. */
export interface PassChoices {
  /** By corner, numbered through all loops as the edge that starts there. */
  readonly corners?: ReadonlyMap<number, CornerMove> | undefined
  /** Wished length of the leads in and out, mm. */
  readonly leadIn?: number | undefined
  readonly leadOut?: number | undefined
  /** How far a pass that closes in the middle of an edge runs past its start, mm. */
  readonly overlap?: number | undefined
}

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

export const passProblemCodes = [
  /** At this corner no way round works; the jet leans, past the limit. */
  'no-corner-move',
  /** The way round that was chosen does not work here; the default is taken. */
  'choice-refused',
  /** The loop has no place where the jet can pierce and lead in clear of every wall. */
  'no-room-to-pierce',
  /** The edge lies in a hollow into which the jet does not fit; `value`: how much it leaves there, mm. */
  'detail-finer-than-jet',
  /** The tilted jets of opposite walls cross within the plate; `value`: the smallest diameter that works, mm. */
  'hole-too-small-for-tilt',
  /** The seam beside an arc is bent, the jet straight; `value`: how far they part, mm. */
  'bent-seam',
] as const
export type PassProblemCode = (typeof passProblemCodes)[number]

/** What cannot be done as asked, and where. */
export interface PassProblem {
  readonly code: PassProblemCode
  readonly loop: number
  /** Edge or corner, numbered through all loops; −1 where the whole loop is meant. */
  readonly at: number
  readonly level: number
  readonly value: number | null
}

/** Passes stand in the order in which they are cut. */
export interface Passes {
  readonly path: JetPath
  readonly passes: readonly Pass[]
  /** Per corner g (where edge g starts) a `CornerMove`: how the level-0 pass goes round it. */
  readonly cornerMoves: Uint8Array
  /** Per corner: bit 1 << move is set for every `CornerMove` that works there. */
  readonly cornerOffers: Uint8Array
  /** Per corner a `LeanRefusal`. Run out and pivot are refused where the corner is not convex. */
  readonly leanRefusals: Uint8Array
  /** Per edge: its first station in the level-0 pass; −1 where that pass leaves the edge out. */
  readonly firstStation: Int32Array
  readonly problems: readonly PassProblem[]
}
