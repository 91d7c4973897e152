import type { EdgePlan } from './edge-plan.ts'
import { writeLean } from './lean.ts'
import { turnAt, wallCorner, type Level } from './level.ts'
import { CornerMove, MoveKind } from './types.ts'
import { bend, put, type PathWriter } from './writer.ts'

/** Writes the stations of a planned edge: from its start to where the jet cuts square, and from there to its end. */

/** From the corner up to the cut; `cutTo` says where the cut ends (a round move must know). */
export function writeStart(w: PathWriter, level: Level, plan: EdgePlan, cutTo = plan.to - plan.leanTo): void {
  const { start, startMove, from } = plan
  const g = plan.axis.g
  const facet = level.facet[g]!
  if (startMove === CornerMove.lean || plan.goesOverAtStart) {
    const until = plan.whole ? plan.to : from + plan.leanFrom
    put(w, level.x[start]!, level.y[start]!, level.p[start]!, level.q[start]!, MoveKind.lean, g, facet)
    bendAlong(w, plan, from, until)
    if (startMove === CornerMove.lean) {
      writeLean(w, level, plan, from, until, plan.alongFrom, plan.whole ? plan.alongTo : 0)
    }
    if (plan.whole) return
    putSquare(w, level, plan, from + plan.leanFrom, MoveKind.cut)
    bendAlong(w, plan, from + plan.leanFrom, cutTo)
    return
  }
  if (startMove === CornerMove.runOut) {
    putSquare(w, level, plan, from - plan.runIn, MoveKind.runIn)
    bendAlong(w, plan, from - plan.runIn, from)
  }
  if (plan.whole) {
    putSquare(w, level, plan, from, MoveKind.lean)
    bendAlong(w, plan, from, plan.to)
    if (plan.endMove === CornerMove.lean) writeLean(w, level, plan, from, plan.to, 0, plan.alongTo)
    return
  }
  putSquare(w, level, plan, from, MoveKind.cut)
  bendAlong(w, plan, from, cutTo)
}

/** From where the cut ends up to, but without, the next edge's first station. */
export function writeEnd(w: PathWriter, level: Level, plan: EdgePlan): void {
  const { to, endMove, end } = plan
  const cutTo = to - plan.leanTo
  if ((endMove === CornerMove.lean || plan.goesOverAtEnd) && !plan.whole) {
    putSquare(w, level, plan, cutTo, MoveKind.lean)
    bendAlong(w, plan, cutTo, to)
    if (endMove === CornerMove.lean) writeLean(w, level, plan, cutTo, to, 0, plan.alongTo)
  } else if (endMove === CornerMove.runOut) {
    putSquare(w, level, plan, to, MoveKind.runOut)
    bendAlong(w, plan, to, to + plan.runOut)
    putSquare(w, level, plan, to + plan.runOut, MoveKind.turn)
    w.edge[w.at - 1] = -1
  } else if (endMove === CornerMove.pivot) {
    putSquare(w, level, plan, to, MoveKind.pivot)
    const wall = wallCorner(level, end)
    bend(w, turnAt(level, end), wall.x, wall.y)
  }
}

/** A station where the jet is square to the edge, at a length along the axis from its corner (also beyond its ends). */
export function putSquare(w: PathWriter, level: Level, plan: EdgePlan, along: number, move: number): void {
  const { axis } = plan
  const g = axis.g
  const part = axis.length === 0 ? 0 : along / axis.length
  const slope = axis.slopeStart + part * (axis.slopeEnd - axis.slopeStart)
  if (axis.arc) {
    const heading = axis.heading + part * axis.sweep
    const radius = axis.radius + part * axis.rise
    const [c, s] = [Math.cos(heading), Math.sin(heading)]
    const out = axis.grow * slope
    put(w, axis.cx + radius * c, axis.cy + radius * s, out * c, out * s, move, g, level.facet[g]!)
    return
  }
  const rise = part * axis.rise
  put(
    w,
    axis.x + along * axis.ux + rise * axis.uy,
    axis.y + along * axis.uy - rise * axis.ux,
    slope * axis.uy,
    -slope * axis.ux,
    move,
    g,
    level.facet[g]!,
  )
}

/** On an arc the move just begun goes round its centre. */
export function bendAlong(w: PathWriter, { axis }: EdgePlan, from: number, to: number): void {
  if (axis.arc && axis.length !== 0) bend(w, ((to - from) / axis.length) * axis.sweep, axis.cx, axis.cy)
}
