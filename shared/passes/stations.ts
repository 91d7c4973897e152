import { sideSlope, sideSlopeRate } from './jet-lines.ts'
import type { EdgePlan } from './edge-plan.ts'
import { turnAt, wallCorner, type Level } from './level.ts'
import { CornerMove, MoveKind } from './types.ts'
import { bend, put, type PathWriter } from './writer.ts'

/** Writes the stations of a planned edge: from its start to where the jet cuts square, and from there to its end. */

/**
 * How far a leaning jet with taper may stand off its wall between stations, outside the part, mm: a fifth of a
 * machine's repeatability (0.025 mm, common practice, no source).
 */
const LEAN_STAND_OFF = 0.005

/** More pieces than this per lean are not worth their length. */
const MOST_PIECES = 32

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

/**
 * Stations within a lean on a straight edge with taper: there the side slope is bent over the slope along the
 * edge, and a straight move between its ends would enter the part (τ > 0). Between tangents of that bend it
 * stays outside; for τ < 0 chords do.
 */
function writeLean(
  w: PathWriter,
  level: Level,
  plan: EdgePlan,
  from: number,
  to: number,
  alongFrom: number,
  alongTo: number,
): void {
  const { axis } = plan
  const { taper } = level.jet
  if (axis.arc || taper === 0 || axis.rise !== 0 || axis.slopeStart !== axis.slopeEnd) return
  const g = axis.g
  const tilt = level.axis.start.tilt[level.figure[g]!]!
  const [bendFrom, bendTo] = [Math.asinh(alongFrom), Math.asinh(alongTo)]
  const pieces = leanPieces(level, bendTo - bendFrom)
  const putAt = (along: number, side: number) => {
    const at = from + ((along - alongFrom) / (alongTo - alongFrom)) * (to - from)
    const clear = clearAtTop(level, tilt, side, along)
    put(
      w,
      axis.x + at * axis.ux + clear * axis.uy,
      axis.y + at * axis.uy - clear * axis.ux,
      side * axis.uy + along * axis.ux,
      along * axis.uy - side * axis.ux,
      MoveKind.lean,
      g,
      level.facet[g]!,
    )
  }
  const knot = (i: number) =>
    i === 0 ? alongFrom : i === pieces ? alongTo : Math.sinh(bendFrom + (i / pieces) * (bendTo - bendFrom))
  if (taper < 0) {
    for (let i = 1; i < pieces; i++) putAt(knot(i), sideSlope(tilt, taper, knot(i)))
    return
  }
  for (let i = 0; i < pieces; i++) {
    const [a, b] = [knot(i), knot(i + 1)]
    const [sa, sb] = [sideSlope(tilt, taper, a), sideSlope(tilt, taper, b)]
    const [ra, rb] = [sideSlopeRate(tilt, taper, a), sideSlopeRate(tilt, taper, b)]
    if (ra === rb) continue
    const meet = (sb - sa + ra * a - rb * b) / (ra - rb)
    putAt(meet, sa + ra * (meet - a))
  }
}

/**
 * How far a jet whose side slope is beyond the wall's must move out so that it does not enter at the top face, mm
 * along the outward normal (micrometres). Its axis is at sin φ < sin τ to the wall, so the cone's nearest line
 * comes closer to the wall upward, by tan τ·cos φ − sin φ per mm of axis, up to `rim`, where it leaves the plate
 * (derived).
 */
function clearAtTop({ jet }: Level, tilt: number, side: number, along: number): number {
  const length = Math.sqrt(1 + side * side + along * along)
  const sinFacing = (Math.sin(tilt) - side * Math.cos(tilt)) / length
  const cosFacing = Math.sqrt(1 - sinFacing * sinFacing)
  const tan = Math.tan(jet.taper)
  // Downward part of the way from the axis to that line; then the axis' length at which the line is at depth 0.
  const down = ((Math.sin(tilt) - sinFacing / length) / cosFacing) * length
  const rim = ((-jet.kerf / 2) * down) / (1 - tan * down)
  const short = (jet.kerf / 2) * (cosFacing - Math.cos(jet.taper)) - rim * (tan * cosFacing - sinFacing)
  return Math.max(0, short) / Math.cos(tilt)
}

/**
 * Enough that no tangent stands off by more than allowed at the bottom: with along = sinh u the side slope is bent
 * by tan |τ| over u at most, and a tangent stands off by an eighth of that times the square of a piece (derived).
 */
function leanPieces(level: Level, change: number): number {
  const bend = Math.tan(Math.abs(level.jet.taper)) * level.frame.body.thickness
  const pieces = Math.ceil(Math.abs(change) * Math.sqrt(bend / (8 * LEAN_STAND_OFF)))
  return Math.min(MOST_PIECES, Math.max(1, pieces))
}
