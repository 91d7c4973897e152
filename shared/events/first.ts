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

/**
 * Keeps the first happening, in whatever order they are offered; of simultaneous ones a vanishing before a split before
 * a break-through, then by loop and edge.
 */
export class First {
  /** Latest moment that is still of interest. */
  until: number
  /** Everything within `same` of the earliest. */
  private simultaneous: Happening[] = []
  private earliest = Infinity
  private readonly same: number

  constructor(length: number) {
    this.same = length * SAME_TIME
    this.until = length + this.same
  }

  offer(t: number, kind: EventKind, edge: number, other: number, x: number, y: number): void {
    if (!(t <= this.until)) return
    if (t < this.earliest) {
      this.earliest = t
      this.until = Math.min(this.until, t + this.same)
      this.simultaneous = this.simultaneous.filter((found) => found.t <= this.until)
    }
    const [low, high] = other >= 0 && other < edge ? [other, edge] : [edge, other]
    this.simultaneous.push({ t, kind, edge: low, other: high, x, y })
  }

  /** All that are simultaneous with the first. */
  get all(): readonly Happening[] {
    return this.simultaneous
  }

  /** The one to name, at the earliest moment of all that are simultaneous. */
  get found(): Happening | null {
    let best: Happening | null = null
    for (const happening of this.simultaneous) if (!best || precedes(happening, best)) best = happening
    return best && { ...best, t: this.earliest }
  }
}

const ORDER: Record<EventKind, number> = { vanish: 0, split: 1, 'break-through': 2 }

function precedes(a: Happening, b: Happening): boolean {
  return (ORDER[a.kind] - ORDER[b.kind] || a.edge - b.edge || a.other - b.other) < 0
}
