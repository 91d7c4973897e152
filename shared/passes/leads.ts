import { moveIsClear } from './clear.ts'
import { outwardBetween, putOutside } from './closed-pass.ts'
import type { CornerMoves } from './corner-moves.ts'
import { makeEdgePlan, planEdge, type EdgePlan } from './edge-plan.ts'
import type { JetLine } from './jet-at.ts'
import type { Level } from './level.ts'
import { RunEnd, runEnd } from './open-pass.ts'
import type { Room } from './room.ts'
import type { Run } from './runs.ts'
import { leadLengths, startsOf, type Start } from './starts.ts'
import { putSquare } from './stations.ts'
import { CornerMove, type PassChoices } from './types.ts'
import { makeWriter } from './writer.ts'

/**
 * Leads in the waste: straight, at the tilt that follows, so that they are clear of their own walls by being
 * parallel to them; here they are held against all others.
 */

/** Room that a pierce keeps from walls besides the jet's own half-width, in kerfs: it is wider than the cut. Common practice, no source. */
const PIERCE_ROOM = 0.5

/** Shorter leads, in kerfs, are tried where nothing else fits: in a small hole the deepest place counts. */
const LAST_LENGTHS = [3, 2.5, 2, 1.5, 1.2, 0.9, 0.6, 0.4]

/** A start, and whether its leads are clear. */
export interface ChosenStart {
  readonly start: Start
  readonly clear: boolean
}

/** The first clear start of a closed pass; failing that the deepest pierce that just clears, failing that any. Null for a loop without edges. */
export function chooseStart(
  level: Level,
  moves: CornerMoves,
  loop: number,
  choices: PassChoices,
  room: Room,
): ChosenStart | null {
  const { kerf } = level.jet
  let any: Start | null = null
  for (const start of startsOf(level, moves, loop, choices, leadLengths(kerf, choices.leadIn))) {
    any ??= start
    if (startIsClear(level, moves, start, room, PIERCE_ROOM * kerf)) return { start, clear: true }
  }
  let deepest: Start | null = null
  let depth = 0
  const lengths = LAST_LENGTHS.map((kerfs) => kerfs * kerf)
  for (const start of startsOf(level, moves, loop, choices, lengths)) {
    const margins = [0, 0.1, 0.2, 0.3, 0.4, 0.5].map((kerfs) => kerfs * kerf)
    const margin = margins.findLast((m) => startIsClear(level, moves, start, room, m))
    if (margin === undefined) continue
    const own = Math.min(margin, start.leadIn)
    if (deepest && own <= depth) continue
    deepest = start
    depth = own
  }
  if (deepest) return { start: deepest, clear: true }
  return any && { start: any, clear: false }
}

/** Lead lengths of an open run: from wished to least until both ends are clear. */
export function chooseRunLeads(
  level: Level,
  moves: CornerMoves,
  run: Run,
  choices: PassChoices,
  room: Room,
): { readonly leadIn: number; readonly leadOut: number; readonly clear: boolean } {
  const { kerf } = level.jet
  const wishedOut = choices.leadOut ?? kerf
  for (const leadIn of leadLengths(kerf, choices.leadIn)) {
    const leadOut = Math.min(wishedOut, leadIn)
    if (runIsClear(level, moves, run, leadIn, leadOut, room, PIERCE_ROOM * kerf)) {
      return { leadIn, leadOut, clear: true }
    }
  }
  const leadIn = leadLengths(kerf, choices.leadIn)[0]!
  return { leadIn, leadOut: Math.min(wishedOut, leadIn), clear: false }
}

function startIsClear(level: Level, moves: CornerMoves, start: Start, room: Room, margin: number): boolean {
  const { g } = start
  const before = level.previous[g]!
  switch (start.kind) {
    case 'corner': {
      const move = moves.move
      const kept = move[g]!
      move[g] = CornerMove.runOut
      const clear =
        runInIsClear(level, move, g, start.leadIn, room, margin) && runOutIsClear(level, move, before, room)
      move[g] = kept
      return clear
    }
    case 'edge': {
      const plan = planEdge(level, moves.move, g, makeEdgePlan())
      const pierce = outside(level, plan, start.at, start.leadIn)
      const wall = outside(level, plan, start.at, 0)
      const leave = outside(level, plan, start.at + start.overlap, 0)
      const out = outside(level, plan, start.at + start.overlap, start.leadOut)
      return (
        leadIsClear(level, pierce, wall, room, margin, [g]) &&
        moveIsClear(room, level.jet, leave, out, 0, [g])
      )
    }
    case 'seam':
      return (
        seamLeadIsClear(level, g, start.leadIn, room, margin) &&
        seamLeadIsClear(level, g, start.leadOut, room, 0)
      )
  }
}

function runIsClear(
  level: Level,
  moves: CornerMoves,
  run: Run,
  leadIn: number,
  leadOut: number,
  room: Room,
  margin: number,
): boolean {
  const after = level.next[run.last]!
  const endIsClear = (corner: number, g: number, length: number, out: boolean) => {
    const end = runEnd(level, moves.offers, corner)
    if (end === RunEnd.seam) return seamLeadIsClear(level, corner, length, room, out ? 0 : margin)
    if (end === RunEnd.runOut) {
      const move = moves.move
      const kept = move[corner]!
      move[corner] = CornerMove.runOut
      const clear = out
        ? runOutIsClear(level, move, g, room)
        : runInIsClear(level, move, g, length, room, margin)
      move[corner] = kept
      return clear
    }
    const plan = planEdge(level, moves.move, g, makeEdgePlan())
    const at = out ? plan.to : plan.from
    const own = [g, out ? level.next[g]! : level.previous[g]!]
    return leadIsClear(
      level,
      outside(level, plan, at, length),
      outside(level, plan, at, 0),
      room,
      out ? 0 : margin,
      own,
    )
  }
  return endIsClear(run.first, run.first, leadIn, false) && endIsClear(after, run.last, leadOut, true)
}

/** The half at the pierce with room for it, the half at the wall with room for the jet alone. */
function leadIsClear(
  level: Level,
  pierce: JetLine,
  wall: JetLine,
  room: Room,
  margin: number,
  own: readonly number[],
): boolean {
  const middle = { ...pierce, x: (pierce.x + wall.x) / 2, y: (pierce.y + wall.y) / 2 }
  return (
    moveIsClear(room, level.jet, pierce, middle, margin, own) &&
    moveIsClear(room, level.jet, middle, wall, 0, own)
  )
}

function seamLeadIsClear(level: Level, g: number, length: number, room: Room, margin: number): boolean {
  const way = outwardBetween(level, g)
  const wall = { x: level.x[g]!, y: level.y[g]!, p: level.p[g]!, q: level.q[g]! }
  const pierce = { ...wall, x: wall.x + length * way.x, y: wall.y + length * way.y }
  return leadIsClear(level, pierce, wall, room, margin, [level.previous[g]!, g])
}

/** Along the prolongation of an edge's start; on an arc its chord, with the room that the turning asks for. */
function runInIsClear(
  level: Level,
  move: Uint8Array,
  g: number,
  leadIn: number,
  room: Room,
  margin: number,
): boolean {
  const plan = planEdge(level, move, g, makeEdgePlan())
  const pierce = square(level, plan, plan.from - plan.runIn - leadIn)
  const wall = square(level, plan, plan.from)
  const own = [level.previous[g]!, g]
  return leadIsClear(level, pierce, wall, room, margin + bentRoom(level, plan, pierce, wall), own)
}

function runOutIsClear(level: Level, move: Uint8Array, g: number, room: Room): boolean {
  const plan = planEdge(level, move, g, makeEdgePlan())
  const wall = square(level, plan, plan.to)
  const out = square(level, plan, plan.to + plan.runOut)
  return moveIsClear(room, level.jet, out, wall, bentRoom(level, plan, out, wall), [g, level.next[g]!])
}

function bentRoom(level: Level, { axis }: EdgePlan, a: JetLine, b: JetLine): number {
  if (!axis.arc) return 0
  const chord = Math.hypot(a.x - b.x, a.y - b.y)
  const sagitta = (chord * chord) / (8 * axis.radius)
  return sagitta + level.frame.body.thickness * Math.hypot(a.p - b.p, a.q - b.q)
}

function square(level: Level, plan: EdgePlan, at: number): JetLine {
  return outside(level, plan, at, 0)
}

/** The square jet at a length along an edge, off the wall by `out`. */
function outside(level: Level, plan: EdgePlan, at: number, out: number): JetLine {
  const w = makeWriter(1)
  if (out === 0) putSquare(w, level, plan, at, 0)
  else putOutside(w, level, plan, at, out, 0)
  return { x: w.x[0]!, y: w.y[0]!, p: w.p[0]!, q: w.q[0]! }
}
