import type { Point } from '../geometry/types.ts'
import type { EdgeRef } from '../walls/types.ts'

export type EventKind = 'vanish' | 'split' | 'break-through'

/** The first depth at which the plain contour stops being right, and where. */
export interface BodyEvent extends EdgeRef {
  readonly kind: EventKind
  readonly depth: number
  readonly at: Point
  /** The other edge that is met, for a split or a break-through. */
  readonly other: EdgeRef | null
}
