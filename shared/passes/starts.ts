import { CornerMode } from '../contours/frame.ts'
import { edgeLength, makeEdgePlan, planEdge } from './edge-plan.ts'
import type { CornerMoves } from './corner-moves.ts'
import type { Level } from './level.ts'
import { CornerMove, type PassChoices } from './types.ts'

/** Where a closed pass begins and ends. Lengths in mm. */
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
const MOST_CANDIDATES = 8

/**
 * Scores nearer than this part of themselves are equal, so that a start does not depend on how the drawing lies:
 * turning a drawing changes them by some 1e-15, a difference worth having by far more.
 */
const TIE = 1e-9

/** Lengths to try, from wished to least, mm. */
export function leadLengths(kerf: number, wished: number | undefined): readonly number[] {
  const most = wished ?? WISHED_KERFS * kerf
  const least = Math.min(most, LEAST_KERFS * kerf)
  return [0, 1, 2, 3].map((i) => most + (i / 3) * (least - most))
}

/** Possible starts of a closed pass of a loop, the best first; `lengths` are those that a lead in may have. */
export function* startsOf(
  level: Level,
  moves: CornerMoves,
  loop: number,
  choices: PassChoices,
  lengths: readonly number[],
): Generator<Start> {
  const { turnSin, turnCos, mode } = level
  const { kerf } = level.jet
  const corners = bestOf(level, loop, (g) =>
    mode[g] !== CornerMode.spike &&
    turnSin[g]! > 0 &&
    moves.offers[g]! & (1 << CornerMove.runOut) &&
    (choices.corners?.get(g) ?? CornerMove.runOut) === CornerMove.runOut
      ? Math.cos(FLATTEST_START) - turnCos[g]!
      : 0,
  )
  for (const leadIn of lengths) for (const g of corners) yield { kind: 'corner', g, leadIn }
  const leadOut = choices.leadOut ?? kerf
  const overlap = choices.overlap ?? kerf
  const longest = bestOf(level, loop, (g) => edgeLength(level, g))
  const plan = makeEdgePlan()
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
      if (moves.move[g] !== CornerMove.lean) continue
      yield { kind: 'seam', g, leadIn, leadOut: Math.min(leadOut, leadIn) }
    }
  }
}

/** The few edges (or corners) of a loop with the highest positive scores, the best first; of equals the first. */
function bestOf({ frame, gone }: Level, loop: number, score: (g: number) => number): number[] {
  const best: number[] = []
  const scores: number[] = []
  for (let g = frame.loopStart[loop]!; g < frame.loopStart[loop + 1]!; g++) {
    if (gone[g]) continue
    const own = score(g)
    const better = own * (1 - TIE)
    if (!(better > (scores[MOST_CANDIDATES - 1] ?? 0))) continue
    let place = scores.length
    while (place > 0 && scores[place - 1]! < better) place--
    best.splice(place, 0, g)
    scores.splice(place, 0, own)
    if (best.length > MOST_CANDIDATES) {
      best.pop()
      scores.pop()
    }
  }
  return best
}
