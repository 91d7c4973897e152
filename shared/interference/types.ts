import type { Nozzle } from '../jet/nozzle.ts'

/** Does the jet, the nozzle or the head touch what it must not? mm and radians. */

/**
 * How far a jet may stand in the part before it counts, mm: what is promised of a set-up without findings. The
 * jet touches the walls that it cuts, and arithmetic leaves that touch some 1e-12 mm to either side.
 */
export const BITE_TOLERANCE = 1e-6

/** How exactly a bite's depth is told once it counts, mm: a tenth of a micrometre, finer than any cut. */
export const BITE_ACCURACY = 1e-4

/** A bite that no cut shows, mm: less than what heads repeat to (0.025 mm, common practice, no source). */
export const GRAZE = 0.02

/** Wall and jet of the worst of the bites that one edge's jet takes out of another edge's wall. */
export interface JetBite {
  /** Station whose move bites. */
  readonly station: number
  /** Edge, through all loops, that the move cuts or, between walls, cut last. */
  readonly edge: number
  /** Edge whose wall is bitten, and the facet of it, from the top. */
  readonly hit: number
  readonly hitFacet: number
  /** Where on the bitten wall. */
  readonly x: number
  readonly y: number
  readonly depth: number
  /** How deep that point stands in the jet, square to the jet's side, mm; on the axis it is the whole half-width. */
  readonly bite: number
}

/** The head above the nozzle, told by its widest rim; between the nozzle's rim and this one it is a cone (or less). */
export interface HeadCone {
  readonly diameter: number
  /** From the nozzle's tip up the axis to the rim. */
  readonly above: number
}

export interface HeadShape {
  readonly nozzle: Nozzle
  readonly cone: HeadCone | null
}

export type RimName = 'nozzle' | 'head'

/** The lowest that a rim comes, and where. */
export interface RimClearance {
  readonly rim: RimName
  /** Height above the plate's top plane; negative when it would touch. */
  readonly clearance: number
  readonly tilt: number
  readonly station: number
  /** Index into the passes. */
  readonly pass: number
  readonly x: number
  readonly y: number
  /** Least stand-off at which the rim clears everywhere. */
  readonly standoff: number
}

export interface Interference {
  /** Worst first, one for each pair of cutting and bitten edge; no more than asked for. */
  readonly bites: readonly JetBite[]
  /** How many pairs there are in truth. */
  readonly pairs: number
  /** Pairs for which neither a bite nor its absence could be shown: too many looks. Treat them as not known. */
  readonly undecided: number
  /** Pairs for which only this could be shown: the bite, if there is one, is below `GRAZE`. */
  readonly grazing: number
  /** One for each rim of the head that was told; empty without a head or without passes. */
  readonly rims: readonly RimClearance[]
}
