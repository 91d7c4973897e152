import type { Point } from '../../geometry/types.ts'
import type { Direction } from '../types.ts'

/**
 * Relief cuts round a piece that is trapped. Round a part: a moat in the sheet, and the ring of waste between
 * part and moat divided into blocks. In a hole: a core that drops out of the slug, and the ring of waste
 * between it and the hole's wall divided likewise.
 *
 * The model. Relief cuts are vertical and the moat (or core) is cleared before the blocks leave. A block moves
 * along one straight line, up or down. It must clear every facet that it touches (with the kerf's room) and
 * the lines to neighbours still in place (with the room of a kerf, W/t), and may go sideways by at most the
 * moat's width while it is in the plate. Blocks leave one after another. What a block might meet further on
 * its way, past what it touches, is not looked at.
 */
export interface ReliefSizes {
  /** Width of the jet's cut, mm; 0 asks for blocks that leave without touching. */
  readonly kerf: number
  /** Least width of the waste left between the walls and the moat or core, mm. */
  readonly ring: number
  /** Width of the moat, mm; for a hole the core is as wide as the ring leaves it, and this is not used. */
  readonly moat: number
}

/** A dividing line, from beside the wall to the moat or core. */
export interface ReliefLine {
  /** It stands on this edge of the loop, so far along it; 0 is the corner where the edge starts. */
  readonly edge: number
  readonly fraction: number
  /** The jet's axis, square to the plate: clear of the wall at every depth ... */
  readonly from: Point
  /** ... and here at the moat or core. */
  readonly to: Point
  /**
   * Widest strip of waste, mm, that stays between `from` and the cut of the wall where that draws back with
   * depth: 0 where a square cut is enough. Otherwise the jet leans within the line's own plane at its start.
   */
  readonly web: number
  /** Whether the line keeps off the piece's other walls at every facet end. */
  readonly clear: boolean
}

export interface ReliefBlock {
  /** It lies between this line and the next (of the list, round the loop); with no lines it is the whole ring. */
  readonly line: number
  readonly direction: Direction
  /** Blocks leave in this order, from 0. */
  readonly order: number
}

export interface ReliefPlan {
  readonly ok: true
  readonly loop: number
  readonly lines: readonly ReliefLine[]
  readonly blocks: readonly ReliefBlock[]
  /** Outline of the moat's inner side, counter-clockwise and convex; for a hole, of the core. */
  readonly moat: readonly Point[]
  /** No plan needs fewer lines than so many (in the model above). */
  readonly atLeast: number
  /** Whether this plan has the fewest lines; otherwise it is a heuristic's. */
  readonly proved: boolean
}

export type ReliefRefusalCode =
  /** Some edge needs its block to go further sideways than the moat or core is wide: `needed`, mm. */
  | 'moat-too-narrow'
  /** The slug has no place for a core inside the ring. */
  | 'slug-too-small'
  /** No order was found in which the blocks leave. */
  | 'no-order'

export interface ReliefRefusal {
  readonly ok: false
  readonly loop: number
  readonly code: ReliefRefusalCode
  readonly needed: number | null
}

export type Relief = ReliefPlan | ReliefRefusal
