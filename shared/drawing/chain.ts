import type { Segment } from '../geometry/types.ts'

export interface DrawnSegment {
  readonly segment: Segment
  readonly layer: string
}

/** Segments that follow one another; each starts exactly where the one before ends. */
export interface Chain {
  readonly segments: readonly DrawnSegment[]
  readonly closed: boolean
  /** More than two ends meet somewhere along the figure that this chain is part of. */
  readonly branched: boolean
}

export interface LinkTolerances {
  /** Ends nearer than this are one point; rounding in the file, never reported. mm */
  readonly coincident: number
  /** Loose ends nearer than this are brought together, and reported. mm */
  readonly join: number
}

/** A segment between two numbered points. */
export interface Edge extends DrawnSegment {
  from: number
  to: number
}
