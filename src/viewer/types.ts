import type { BodyMesh } from '../../shared/solid/types.ts'
import type { CornerRef, EdgeRef } from '../../shared/walls/types.ts'
import type { Point } from '../../shared/geometry/types.ts'
import type { Theme } from '../theme/tilt-colour.ts'
import type { ActContext } from './controls/acts.ts'

/** A text that stands beside an edge; the caller formats it. */
export interface EdgeLabel {
  readonly edge: EdgeRef
  readonly text: string
}

/** A finding's number at its place: x and y in the plate's plane, depth down from the top face, mm. */
export interface Balloon {
  readonly number: number
  readonly at: { readonly x: number; readonly y: number; readonly depth: number }
  readonly tone: 'breach' | 'plain'
  readonly selected: boolean
}

/** Where the plain contour first stops being right. */
export interface EventMark {
  readonly at: Point
  readonly depth: number
  /** Beside the mark, such as "e4 vanishes at 11.2 mm". */
  readonly text?: string
}

/** Pixels of the viewer that other things cover; the part is fitted and turned within the rest. */
export interface Insets {
  readonly top: number
  readonly right: number
  readonly bottom: number
  readonly left: number
}

/** The user's unit of length, for the scale bar only. */
export interface ScaleBar {
  /** Millimetres in one unit. */
  readonly unit: number
  /** Text of a number of units, such as "50 mm". */
  readonly text: (value: number) => string
}

export interface PartViewerProps {
  /** null while it is being computed; the last mesh stays on screen. */
  readonly mesh: BodyMesh | null
  /** Plate thickness, mm. A mesh that ends above it stops at the first event. */
  readonly thickness: number
  /** Tilt of a facet in degrees, positive outward. */
  readonly tiltOf: (loop: number, edge: number, facet: number) => number
  readonly selection: readonly EdgeRef[]
  /** null when empty ground is clicked or Escape is pressed. */
  readonly onSelect?: (edge: EdgeRef | null, how: 'replace' | 'toggle') => void
  readonly breaches: { readonly edges: readonly EdgeRef[]; readonly corners: readonly CornerRef[] }
  readonly labels: readonly EdgeLabel[]
  readonly balloons: readonly Balloon[]
  readonly onBalloon?: (number: number) => void
  readonly event?: EventMark | null
  readonly theme: Theme
  /** Fewer and larger buttons; a page that holds it can still be scrolled with one finger. */
  readonly compact?: boolean
  /** The camera looks at this edge whenever it changes. */
  readonly focusEdge?: EdgeRef | null
  /** A camera state from `onViewChange`, for a link; read on mount and when it changes to another one. */
  readonly view?: string | null
  /** After a movement has come to rest. */
  readonly onViewChange?: (view: string) => void
  readonly insets?: Insets
  /** What the acts of the camera need, for those that stand outside the picture. */
  readonly onContext?: (context: ActContext) => void
  /** Accessible name; "Part in 3D" if absent. */
  readonly label?: string
  /** The picture in words for those who cannot see it. */
  readonly description?: string
  /** With it a scale bar is drawn, in 1–2–5 steps of this unit. */
  readonly scaleBar?: ScaleBar
}
