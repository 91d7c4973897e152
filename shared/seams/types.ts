import type { Point } from '../geometry/types.ts'
import type { CornerRef } from '../walls/types.ts'

export type CornerKind = 'convex' | 'concave' | 'smooth'

/** The seam over one band of depth in which neither wall changes tilt. */
export interface SeamBand {
  readonly fromDepth: number
  readonly toDepth: number
  /** Tilts, at the corner, of the wall before and the wall after it. */
  readonly tilts: readonly [number, number]
  /** Angle of the seam from vertical; null where no single seam exists (a step at a smooth corner). */
  readonly seamTilt: number | null
}

export interface Corner extends CornerRef {
  readonly at: Point
  readonly kind: CornerKind
  /** Angle inside the material between the two edges. */
  readonly interiorAngle: number
  readonly bands: readonly SeamBand[]
  /** Smooth corner whose walls do not agree at some depth. */
  readonly step: boolean
}
