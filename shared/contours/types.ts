import type { Segment } from '../geometry/types.ts'

/** A contour segment remembers its edge; `edge` is null for the step between smooth walls of unlike tilt. */
export type ContourSegment = Segment & { readonly edge: number | null }

export interface Contour {
  readonly depth: number
  readonly loops: readonly (readonly ContourSegment[])[]
}
