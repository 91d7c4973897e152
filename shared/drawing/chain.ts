import type { Segment } from '../geometry/types.ts'

export interface DrawnSegment {
  readonly segment: Segment
  readonly layer: string
  /** Number of the entity that drew it, in drawing order. */
  readonly entity: number
}

/** Segments that follow one another; each starts exactly where the one before ends. */
export interface Chain {
  readonly segments: readonly DrawnSegment[]
  readonly closed: boolean
  /** More than two ends meet somewhere along the figure that this chain is part of. */
  readonly branched: boolean
}

/** A segment between two numbered points. */
export interface Edge extends DrawnSegment {
  from: number
  to: number
}
