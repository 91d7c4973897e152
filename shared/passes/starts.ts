import { CornerMode } from '../contours/frame.ts'
import { makeEdgePlan, planEdge } from './edge-plan.ts'
import type { CornerMoves } from './corner-moves.ts'
import type { Level } from './level.ts'
import { CornerMove, type PassChoices } from './types.ts'

/** Where a closed pass begins and ends. */
export type Start =
  /** At a convex corner: in along its edge's prolongation, out along that of the edge before. No mark is left on a wall. */
  | { readonly kind: 'corner'; readonly g: number; readonly leadIn: number }
  /** On an edge, at a length along it: in square to the wall, out again after an overlap. */
  | {
      readonly kind: 'edge'
      readonly g: number
      readonly at: number
      readonly leadIn: number
      readonly leadOut: number
      readonly overlap: number
    }
  /** At a corner round which the jet leans: in and out between its two walls, along the seam. */
  | { readonly kind: 'seam'; readonly g: number; readonly leadIn: number; readonly leadOut: number }

/**
 * Lengths that a lead has where there is room, and that it must have, in kerfs. Common practice, no source: the
 * pierce is wider than the kerf and must not touch the wall.
 */
const WISHED_KERFS = 4
const LEAST_KERFS = 1.5

/** Convex corners flatter than this make no start: the lead would run along the wall. Our choice, radians. */
const FLATTEST_START = Math.PI / 6

/** Corners and edges looked at, the best first. */
const MOST_CANDIDATES = 12

/** Lengths to try, from wished to least, mm. */
export function leadLengths(kerf: number, wished: number | undefined): readonly number[] {
  const most = wished ?? WISHED_KERFS * kerf
  const least = Math.min(most, LEAST_KERFS * kerf)
  return [0, 1, 2, 3].map((i) => most + (i / 3) * (least - most))
}

/** Possible starts of a closed pass of a loop, the best first. */
export function* startsOf(
  level: Level,
  moves: CornerMoves,
  loop: number,
  choices: PassChoices,
): Generator<Start> {
  const { frame, gone } = level
  const { kerf } = level.jet
  const edges: number[] = []
  for (let g = frame.loopStart[loop]!; g < frame.loopStart[loop + 1]!; g++) if (!gone[g]) edges.push(g)
  const lengths = leadLengths(kerf, choices.leadIn)
  const plan = makeEdgePlan()
  const corners = sharpest(level, moves, edges, choices)
  for (const leadIn of lengths) {
    for (const g of corners) {
      if (!choices.corners?.has(g) || choices.corners.get(g) === CornerMove.runOut) {
        yield { kind: 'corner', g, leadIn }
      }
    }
  }
  const leadOut = choices.leadOut ?? kerf
  const overlap = choices.overlap ?? kerf
  const longest = longestCuts(level, moves, edges)
  for (const leadIn of lengths) {
    for (const g of longest) {
      planEdge(level, moves.move, g, plan)
      const from = plan.from + plan.leanFrom
      const to = plan.to - plan.leanTo
      if (plan.whole || to - from < 2 * overlap) continue
      yield { kind: 'edge', g, at: (from + to) / 2, leadIn, leadOut: Math.min(leadOut, leadIn), overlap }
    }
  }
  for (const leadIn of lengths) {
    for (const g of longest) {
      if (moves.move[g] === CornerMove.lean) {
        yield { kind: 'seam', g, leadIn, leadOut: Math.min(leadOut, leadIn) }
      }
    }
  }
}

function sharpest(
  level: Level,
  moves: CornerMoves,
  edges: readonly number[],
  choices: PassChoices,
): number[] {
  const { turn, mode } = level.frame
  return edges
    .filter(
      (g) =>
        mode[g] !== CornerMode.spike &&
        turn[g]! > FLATTEST_START &&
        moves.offers[g]! & (1 << CornerMove.runOut) &&
        (choices.corners?.get(g) ?? CornerMove.runOut) === CornerMove.runOut,
    )
    .sort((a, b) => turn[b]! - turn[a]! || a - b)
    .slice(0, MOST_CANDIDATES)
}

function longestCuts(level: Level, moves: CornerMoves, edges: readonly number[]): number[] {
  const plan = makeEdgePlan()
  const cut = new Map(
    edges.map((g) => {
      planEdge(level, moves.move, g, plan)
      return [g, plan.to - plan.leanTo - plan.from - plan.leanFrom] as const
    }),
  )
  return [...edges].sort((a, b) => cut.get(b)! - cut.get(a)! || a - b).slice(0, MOST_CANDIDATES)
}
