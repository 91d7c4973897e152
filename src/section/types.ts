import type { FacetSpec } from '../../shared/walls/schema.ts'
import type { Mate, SectionPoint } from '../../shared/joint/section.ts'

/**
 * The cross-section of one plate, or of both plates of a joint. Section millimetres as in shared/joint: x runs
 * outward (to the right, into the waste) and depth runs down from the top face. For one plate x = 0 is its
 * top edge; for a joint x = 0 is the left plate's root. Tilts are degrees from vertical, positive outward.
 */
export interface SectionSpec {
  readonly thickness: number
  /** From the top face down; the last ends at the thickness. */
  readonly facets: readonly FacetSpec[]
  /** The other plate of a joint stands opposite at this gap, mm. */
  readonly joint?: { readonly mate: Mate; readonly rootOpening: number } | undefined
}

export type DimensionKind =
  'angle' | 'facet-depth' | 'thickness' | 'bottom-offset' | 'included-angle' | 'root-opening'

/** A dimension as data: what it says, and the two points that it stands between. */
export interface SectionDimension {
  /** Stable while the number of facets stays: `angle-0`, `facet-depth-1`, `thickness`, … */
  readonly id: string
  readonly kind: DimensionKind
  /** Facet from the top, for `angle` and `facet-depth`; null otherwise. */
  readonly facet: number | null
  /** Millimetres or degrees; angle and bottom offset are signed. */
  readonly value: number
  readonly quantity: 'length' | 'angle'
  /** The value as the drawing prints it, with its unit. */
  readonly text: string
  /** What the number is: "root face", "from vertical". */
  readonly caption: string
  /** Tolerance as drawings write it, `+1.6 −3.2`; empty when there is none. */
  readonly tolerance: string
  readonly from: SectionPoint
  readonly to: SectionPoint
}

/** Texts of tolerances to print beside a dimension, by kind; `rootFace` for the depth of a root face. */
export interface SectionTolerances {
  readonly includedAngle?: string
  readonly rootOpening?: string
  readonly rootFace?: string
}
