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
  const { kerf } = level.jet
  const corners = bestCorners(level, moves, loop, choices)
  for (const leadIn of lengths) for (const g of corners) yield { kind: 'corner', g, leadIn }
  const leadOut = choices.leadOut ?? kerf
  const overlap = choices.overlap ?? kerf
  const longest = longestEdges(level, loop)
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

/** The few of a loop's corners at which a run out works, the sharpest first. */
function bestCorners(level: Level, { offers }: CornerMoves, loop: number, choices: PassChoices): number[] {
  const { frame, gone, turnSin, turnCos, mode } = level
  const flattest = Math.cos(FLATTEST_START)
  const best = makeBest()
  const end = frame.loopStart[loop + 1]!
  for (let g = frame.loopStart[loop]!; g < end; g++) {
    const score = flattest - turnCos[g]!
    if (!(score > best.least) || !(turnSin[g]! > 0) || !(offers[g]! & (1 << CornerMove.runOut))) continue
    if (gone[g] || mode[g] === CornerMode.spike) continue
    const wished = choices.corners?.get(g)
    if (wished === undefined || wished === CornerMove.runOut) offer(best, g, score)
  }
  return best.found
}

function longestEdges(level: Level, loop: number): number[] {
  const { frame, gone } = level
  const best = makeBest()
  const end = frame.loopStart[loop + 1]!
  for (let g = frame.loopStart[loop]!; g < end; g++) {
    if (!gone[g]) offer(best, g, edgeLength(level, g))
  }
  return best.found
}

/** The few with the highest positive scores, the best first; of equals the first. */
interface Best {
  readonly found: number[]
  readonly scores: number[]
  /** Scores up to this one are of no use. */
  least: number
}

function makeBest(): Best {
  return { found: [], scores: [], least: 0 }
}

function offer(best: Best, g: number, score: number): void {
  const { found, scores } = best
  const better = score * (1 - TIE)
  if (!(better > best.least)) return
  let place = scores.length
  while (place > 0 && scores[place - 1]! < better) place--
  found.splice(place, 0, g)
  scores.splice(place, 0, score)
  if (found.length > MOST_CANDIDATES) {
    found.pop()
    scores.pop()
  }
  best.least = scores[MOST_CANDIDATES - 1] ?? 0
}
