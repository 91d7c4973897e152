import { frameOf } from '../contours/frame.ts'
import { nearbyOrder } from '../geometry/order.ts'
import type { Body } from '../walls/types.ts'
import { axisTable } from './axis-table.ts'
import { writeClosedPass } from './closed-pass.ts'
import { cornerMovesOf } from './corner-moves.ts'
import { makeLevel } from './level.ts'
import { startsOf } from './starts.ts'
import type { Jet, Pass, PassChoices, Passes, PassLimits, PassProblem } from './types.ts'
import { makeWriter, pathOf } from './writer.ts'

/** Stations per edge to begin with: square and lean at both ends. */
const STATIONS_PER_EDGE = 4

/**
 * All passes of a body, in the order in which they are cut: holes first, each near the one before; in a loop
 * the facets off the root while it is held, the pass that frees it last.
 */
export function passesOf(body: Body, jet: Jet, limits: PassLimits, choices: PassChoices = {}): Passes {
  const frame = frameOf(body)
  const axis = axisTable(body, frame.table, jet)
  const level = makeLevel(frame, axis, jet, 0)
  const moves = cornerMovesOf(level, limits, choices)
  const problems: PassProblem[] = [...moves.problems]
  const w = makeWriter(STATIONS_PER_EDGE * frame.count + 16)
  const firstStation = new Int32Array(frame.count).fill(-1)
  const passes: Pass[] = []
  for (const loop of cuttingOrder(body)) {
    const first = w.at
    const start = startsOf(level, moves, loop, choices).next().value
    if (!start) {
      problems.push({ code: 'no-room-to-pierce', loop, at: -1, level: 0, value: null })
      continue
    }
    writeClosedPass(w, level, moves.move, start, firstStation)
    const reasons =
      loop > 0 ? (['holes-before-outside', 'frees-its-loop'] as const) : (['frees-its-loop'] as const)
    passes.push({ loop, first, last: w.at - 1, closed: true, level: 0, reasons })
  }
  return {
    path: pathOf(w),
    passes,
    cornerMoves: moves.move,
    cornerOffers: moves.offers,
    leanRefusals: moves.refusals,
    firstStation,
    problems,
  }
}

/** Holes in a near order, the outer loop last. */
function cuttingOrder(body: Body): number[] {
  const holes = body.loops.map((loop) => loop[0]?.from ?? { x: 0, y: 0 }).slice(1)
  const order = [...nearbyOrder(holes)].map((hole) => hole + 1)
  return body.loops.length > 0 ? [...order, 0] : []
}
