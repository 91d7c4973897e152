import { frameOf, type Frame } from '../contours/frame.ts'
import { nearbyOrder } from '../geometry/order.ts'
import type { Body } from '../walls/types.ts'
import { axisTable } from './axis-table.ts'
import { writeClosedPass } from './closed-pass.ts'
import { cornerMovesOf, type CornerMoves } from './corner-moves.ts'
import { chooseRunLeads, chooseStart } from './leads.ts'
import { makeLevel, type Level } from './level.ts'
import { writeOpenPass } from './open-pass.ts'
import { roomOf } from './room.ts'
import { followable } from './details.ts'
import { levelsOffRoot, runsOf, type Run } from './runs.ts'
import {
  CornerMove,
  type Jet,
  type Pass,
  type PassChoices,
  type Passes,
  type PassLimits,
  type PassProblem,
  type PassProblemCode,
  type PassReason,
} from './types.ts'
import { makeWriter, pathOf } from './writer.ts'

/** Run outs, leads and the like; where it is too few the columns grow. */
const STATIONS_PER_LOOP = 8

interface Layer {
  readonly level: Level
  readonly moves: CornerMoves
  readonly problems: readonly PassProblem[]
  readonly lost: ReadonlySet<number>
}

/**
 * All passes of a body, in the order in which they are cut: holes first, each near the one before; in a loop
 * the facets off the root while it is held, the pass that frees it last. Expects a sound body; `limits.tilt` is
 * asked of seams only (a wall past the limit is a matter of the wall).
 */
export function passesOf(body: Body, jet: Jet, limits: PassLimits, choices: PassChoices = {}): Passes {
  const frame = frameOf(body)
  const axis = axisTable(body, frame.table, jet)
  const room = roomOf(frame)
  const layers = [...levelsOffRoot(axis), 0].map((number): Layer => {
    const { level, problems, lost } = followable(makeLevel(frame, axis, jet, number))
    const moves = cornerMovesOf(level, limits, choices)
    return { level, moves, lost, problems: [...problems, ...moves.problems] }
  })
  const ground = layers.at(-1)!
  const problems = layers.flatMap((layer) => layer.problems)
  const w = makeWriter(stationsExpected(layers, jet))
  const firstStation = new Int32Array(frame.count).fill(-1)
  const passes: Pass[] = []

  for (const loop of cuttingOrder(frame)) {
    const ordered = runsInOrder(layers, loop)
    const freeing = ordered.findIndex(({ run }) => run.closed)
    for (const [i, { layer, run }] of ordered.entries()) {
      const reasons: PassReason[] = loop > 0 ? ['holes-before-outside'] : []
      if (i < freeing || (loop > 0 && i < ordered.length - 1)) reasons.push('bevel-while-held')
      if (i === freeing) reasons.push('frees-its-loop')
      // What falls out of a hole is waste; what comes loose from the outside is the part.
      if (i > freeing && freeing >= 0 && loop === 0) reasons.push('loose-when-cut')
      writeRun(layer, run, reasons)
    }
  }
  return {
    path: pathOf(w),
    passes,
    cornerMoves: ground.moves.move,
    cornerOffers: ground.moves.offers,
    leanRefusals: ground.moves.refusals,
    firstStation,
    problems,
  }

  function writeRun({ level, moves }: Layer, run: Run, reasons: readonly PassReason[]): void {
    const { loop, closed } = run
    const first = w.at
    if (closed) {
      const chosen = chooseStart(level, moves, loop, choices, room)
      if (!chosen?.clear) problem('no-room-to-pierce', level, loop)
      if (!chosen) return
      writeClosedPass(w, level, moves.move, chosen.start, level.level === 0 ? firstStation : null)
    } else {
      const { leadIn, leadOut, clear } = chooseRunLeads(level, moves, run, choices, room)
      if (!clear) problem('no-room-to-pierce', level, loop)
      writeOpenPass(w, level, moves.move, moves.offers, run, leadIn, leadOut)
    }
    passes.push({ loop, first, last: w.at - 1, closed, level: level.level, reasons })
  }

  function problem(code: PassProblemCode, level: Level, loop: number): void {
    const found: PassProblem = { code, loop, at: -1, level: level.level, value: null }
    problems.push(found)
  }
}

/** A cut for every edge, at every lean one station on both sides and with taper one within; and what a pass takes besides. */
function stationsExpected(layers: readonly Layer[], jet: Jet): number {
  const perLean = jet.taper > 0 ? 4 : 2
  let count = 0
  for (const { level, moves } of layers) {
    const { member } = level
    for (let g = 0; g < member.length; g++) {
      if (member[g]) count += moves.move[g] === CornerMove.lean ? 1 + perLean : 1
    }
    count += STATIONS_PER_LOOP * (level.frame.loopStart.length - 1)
  }
  return count
}

/** Open runs first, then those that go all the way round, then the freeing pass along the roots. */
function runsInOrder(layers: readonly Layer[], loop: number): { readonly layer: Layer; readonly run: Run }[] {
  const all = layers
    .filter(({ lost }) => !lost.has(loop))
    .flatMap((layer) => runsOf(layer.level, loop).map((run) => ({ layer, run })))
  const rank = ({ layer, run }: (typeof all)[number]) => (layer.level.level === 0 ? 2 : run.closed ? 1 : 0)
  return all.sort((a, b) => rank(a) - rank(b))
}

/** Holes in a near order, the outer loop last. */
function cuttingOrder({ loopStart, px, py }: Frame): number[] {
  const loops = loopStart.length - 1
  if (loops < 1) return []
  const holes = Array.from({ length: loops - 1 }, (_, hole) => {
    const g = loopStart[hole + 1]!
    return { x: px[g] ?? 0, y: py[g] ?? 0 }
  })
  return [...nearbyOrder(holes).map((hole) => hole + 1), 0]
}
