import type { SectionDimension } from './types.ts'

/** Screen pixels, y down. */
export interface Px {
  readonly x: number
  readonly y: number
}

export interface Size {
  readonly width: number
  readonly height: number
}

export interface Box extends Size, Px {}

export interface PlacedLabel extends Box {
  readonly dimension: SectionDimension
  /** Which end of the box its text leans to. */
  readonly align: 'start' | 'centre' | 'end'
  /** It lies across a face of the plate: its ground must hide the line. */
  readonly acrossFace: boolean
}

/** A hairline of the drawing, by what it does. */
export interface Hairline {
  readonly kind: 'witness' | 'dimension' | 'leader' | 'axis' | 'extension' | 'groove'
  readonly points: readonly Px[]
  /** Arrow heads of a dimension: at both ends pointing out, or on its two inner points pointing at each other. */
  readonly arrows?: 'out' | 'in'
}

export interface Arc {
  readonly centre: Px
  readonly radius: number
  /** Start and end as directions from the centre, radians, screen sense (y down). */
  readonly from: number
  readonly to: number
}

export interface PlacedFacet {
  readonly plate: 'left' | 'right'
  readonly facet: number
  /** Degrees from vertical. */
  readonly tilt: number
  readonly rootFace: boolean
  readonly from: Px
  readonly to: Px
}

export interface SectionLayout extends Size {
  /** Pixels for a millimetre. */
  readonly scale: number
  /** `2 : 1` when a standard scale was asked for and found. */
  readonly scaleText: string | null
  readonly plates: readonly (readonly Px[])[]
  /** Top and bottom lines of the plates. */
  readonly faces: readonly (readonly Px[])[]
  /** Where the drawn plate is broken off. */
  readonly breaks: readonly (readonly Px[])[]
  readonly facets: readonly PlacedFacet[]
  readonly hairlines: readonly Hairline[]
  readonly arcs: readonly Arc[]
  readonly labels: readonly PlacedLabel[]
}

export interface LayoutOptions {
  /** Width to fill, px. */
  readonly width: number
  /** Most that the plates may stand high, px; bands for labels come on top. */
  readonly plateHeight: number
  /** Room that the label of a dimension needs. */
  readonly labelSize: (dimension: SectionDimension) => Size
  /** Take the largest standard scale of paper that fits instead of filling the room. */
  readonly standardScale?: boolean | undefined
}
