/**
 * How a piece leaves the plate once it is cut free: the part out of the sheet, or the slug of a hole out of
 * the part. Millimetres and radians; Z up, headings counter-clockwise from X.
 */

/** `slides`: along one slanting line, up or down. `trapped`: no single line frees the piece. */
export type Verdict = 'lifts' | 'drops' | 'slides' | 'trapped'

/** The way a piece moves. */
export interface Direction {
  /** Unit vector; z > 0 up, z < 0 down. */
  readonly x: number
  readonly y: number
  readonly z: number
  /** Angle from vertical, [0, π/2). */
  readonly angle: number
  /** Heading of the move seen from above, (−π, π]; null where it is straight up or down. */
  readonly heading: number | null
}

/** One wall that holds a piece. */
export interface Hold {
  readonly loop: number
  readonly edge: number
  readonly facet: number
  /** Heading of the piece's outward normal there (on an arc, where along it the wall holds). */
  readonly heading: number
  /** Its part in the proof; the weights of one proof add up to 1. */
  readonly weight: number
}

/**
 * Why no way leads out. Up: with unit normals n, each wall allows n·(x, y) ≤ c per mm of rise; the walls named
 * contradict each other, as Σ weight·n is (nearly) 0 and Σ weight·c is below 0, so adding up their rules gives
 * 0 < 0. Two or three walls always suffice. Down likewise.
 */
export interface Trap {
  readonly up: readonly Hold[]
  readonly down: readonly Hold[]
}

export interface WayOut {
  readonly verdict: Verdict
  /** null exactly where the piece is trapped. */
  readonly direction: Direction | null
  /** null except where the piece is trapped. */
  readonly trap: Trap | null
}

export interface PieceWayOut {
  /** 0: the part, out of the sheet. Otherwise the hole whose slug it is. */
  readonly loop: number
  /** Without touching any wall. */
  readonly free: WayOut
  /** With the room that the kerf leaves. */
  readonly withinKerf: WayOut
}

export interface WaysOut {
  readonly part: PieceWayOut
  /** One for each hole, in the loops' order. */
  readonly slugs: readonly PieceWayOut[]
}
