import { makeAxisEdge, readAxisEdge, type AxisEdge } from './axis-edges.ts'
import { runOutLengths } from './corner-moves.ts'
import { wallCorner, type Level } from './level.ts'
import { CornerMove } from './types.ts'

/**
 * How the jet goes along one edge between its corners: where on the axis' edge it comes and leaves, and over
 * which lengths it leans. mm along the edge from the axis' corner.
 */
export interface EdgePlan {
  readonly axis: AxisEdge
  /** The corners at both ends, and their moves; `goesOver` tells on which of its edges a step is made good. */
  start: number
  end: number
  startMove: number
  endMove: number
  goesOverAtStart: boolean
  goesOverAtEnd: boolean
  /** The part of the edge that is followed. */
  from: number
  to: number
  /** Lengths of the leans at both ends; the slope along the edge with which they begin and end. */
  leanFrom: number
  leanTo: number
  alongFrom: number
  alongTo: number
  /** Too short for both leans and a cut between: the jet goes evenly from one end to the other. */
  whole: boolean
  /** Where the jet has run out to past the end, and where it begins before the start. */
  runIn: number
  runOut: number
}

export function makeEdgePlan(): EdgePlan {
  return {
    axis: makeAxisEdge(),
    start: -1,
    end: -1,
    startMove: 0,
    endMove: 0,
    goesOverAtStart: false,
    goesOverAtEnd: false,
    from: 0,
    to: 0,
    leanFrom: 0,
    leanTo: 0,
    alongFrom: 0,
    alongTo: 0,
    whole: false,
    runIn: 0,
    runOut: 0,
  }
}

/**
 * A lean takes this many times the way by which the bottom of the jet is ahead or behind, so that bottom moves
 * between half and one and a half times as fast as top. Our choice: gentle on the cut, short against the edge.
 */
const LEAN_FACTOR = 2

/** Plans edge g of a level with the corner moves given. */
export function planEdge(level: Level, move: Uint8Array, g: number, plan: EdgePlan): EdgePlan {
  const axis = readAxisEdge(level, g, plan.axis)
  const t = level.frame.body.thickness
  const h = level.next[g]!
  plan.start = g
  plan.end = h
  const startMove = (plan.startMove = move[g]!)
  const endMove = (plan.endMove = move[h]!)
  plan.from = plan.leanFrom = plan.alongFrom = plan.runIn = 0
  plan.to = axis.length
  plan.leanTo = plan.alongTo = plan.runOut = 0
  plan.goesOverAtStart = plan.goesOverAtEnd = false
  if (startMove === CornerMove.lean) {
    plan.alongFrom = axis.alongStart
    plan.leanFrom = leanLength(level, t * axis.alongStart)
  } else if (startMove !== CornerMove.none) planStart(level, g, plan)
  if (endMove === CornerMove.lean) {
    plan.alongTo = axis.alongEnd
    plan.leanTo = leanLength(level, t * axis.alongEnd)
  } else if (endMove !== CornerMove.none) planEnd(level, h, plan)
  const leans = plan.leanFrom + plan.leanTo
  plan.whole = leans > 0 && leans >= plan.to - plan.from
  return plan
}

/** At least a kerf: a jet that turns on the spot digs in. `shift`: how far the bottom is ahead, mm. */
export function leanLength(level: Level, shift: number): number {
  return Math.max(LEAN_FACTOR * Math.abs(shift), level.jet.kerf)
}

function planStart(level: Level, g: number, plan: EdgePlan): void {
  if (plan.startMove === CornerMove.runOut) plan.runIn = runOutLengths(level, g).after
  else if (plan.startMove === CornerMove.pivot) plan.from = Math.abs(alongPivot(level, g, plan))
  else if (plan.startMove === CornerMove.step && !stepIsBefore(level, g)) {
    plan.goesOverAtStart = true
    plan.leanFrom = stepLength(level, g, plan)
  }
}

function planEnd(level: Level, h: number, plan: EdgePlan): void {
  if (plan.endMove === CornerMove.runOut) plan.runOut = runOutLengths(level, h).before
  else if (plan.endMove === CornerMove.pivot) {
    plan.to = plan.axis.length - Math.abs(alongPivot(level, h, plan))
  } else if (plan.endMove === CornerMove.step && stepIsBefore(level, h)) {
    plan.goesOverAtEnd = true
    plan.leanTo = stepLength(level, h, plan)
  }
}

/** How far along the edge the wall's corner lies from the axis' one. */
function alongPivot(level: Level, corner: number, { axis }: EdgePlan): number {
  const wall = wallCorner(level, corner)
  const x = level.x[corner]!
  const y = level.y[corner]!
  if (!axis.arc) return (wall.x - x) * axis.ux + (wall.y - y) * axis.uy
  const [ax, ay] = [x - axis.cx, y - axis.cy]
  const [bx, by] = [wall.x - axis.cx, wall.y - axis.cy]
  return axis.radius * Math.atan2(ax * by - ay * bx, ax * bx + ay * by)
}

/** A step is made good on the longer of its edges. */
function stepIsBefore(level: Level, corner: number): boolean {
  return edgeLength(level, level.previous[corner]!) >= edgeLength(level, corner)
}

/** Length of an edge in the drawing, mm. */
export function edgeLength({ frame }: Level, g: number): number {
  if (frame.arc[g]) return frame.radius[g]! * Math.abs(frame.sweep[g]!)
  const h = frame.next[g]!
  const dx = frame.px[h]! - frame.px[g]!
  const dy = frame.py[h]! - frame.py[g]!
  return Math.sqrt(dx * dx + dy * dy)
}

function stepLength(level: Level, corner: number, { axis }: EdgePlan): number {
  const { start, end } = level.axis
  const before = level.figure[level.previous[corner]!]!
  const after = level.figure[corner]!
  const shift =
    Math.abs(start.axis[after]! - end.axis[before]!) +
    level.frame.body.thickness * Math.abs(start.slope[after]! - end.slope[before]!)
  return Math.min(leanLength(level, shift), axis.length / 2)
}
