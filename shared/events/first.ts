import type { EventKind } from './types.ts'

/** Something that happens to a chain at the moment t of its march. */
export interface Happening {
  readonly t: number
  readonly kind: EventKind
  /** Edges through all loops; `other` is −1 for a vanishing. */
  readonly edge: number
  readonly other: number
  readonly x: number
  readonly y: number
}

/**
 * Happenings within this share of the march's length of one another count as simultaneous: ten times the
 * accuracy that depths are promised to (1e-9), so that a regular shape names the same edge however it is turned.
 */
const SAME_TIME = 1e-10

/** Keeps the first happening; of simultaneous ones a vanishing before a split before a break-through, then by loop and edge. */
export class First {
  found: Happening | null = null
  /** Latest moment that is still of interest. */
  until: number
  private readonly same: number

  constructor(length: number) {
    this.same = length * SAME_TIME
    this.until = length + this.same
  }

  offer(t: number, kind: EventKind, edge: number, other: number, x: number, y: number): void {
    if (!(t <= this.until)) return
    const [low, high] = other >= 0 && other < edge ? [other, edge] : [edge, other]
    const found = this.found
    if (found && t >= found.t - this.same && !precedes(kind, low, high, found)) return
    this.found = { t: found ? Math.min(t, found.t) : t, kind, edge: low, other: high, x, y }
    this.until = Math.min(this.until, this.found.t + this.same)
  }
}

const ORDER: Record<EventKind, number> = { vanish: 0, split: 1, 'break-through': 2 }

function precedes(kind: EventKind, edge: number, other: number, found: Happening): boolean {
  return (ORDER[kind] - ORDER[found.kind] || edge - found.edge || other - found.other) < 0
}
