import { leanLength } from './edge-plan.ts'
import { clearAtTop, leanKnots } from './lean.ts'
import type { Level } from './level.ts'
import { CornerMove, MoveKind } from './types.ts'
import { grow, type PathWriter } from './writer.ts'

/** Most stations that one of these edges takes: at both ends a lean with a station in it, and the cut. */
const MOST_STATIONS = 5

/**
 * Straight edges between corners that are leaned round or smooth, without blends: the common case of a plate of many
 * edges, written without a plan and with all columns at hand. Begins with edge `from`, stops before edge `stop`, and
 * before that at the first edge that asks for more; answers the edge that comes next. `firstStation`, where given,
 * gets the place of each edge's first station.
 */
export function writeStraightEdges(
  w: PathWriter,
  level: Level,
  move: Uint8Array,
  from: number,
  stop: number,
  firstStation: Int32Array | null,
): number {
  const { frame, axis, next, figure, jet } = level
  if (axis.start !== axis.end) return from
  const { ux, uy, arc, body } = frame
  const { slope, sin, sec, square, narrow, facing } = axis.start
  const t = body.thickness
  const knots = leanKnots(level)
  const { cosTaper, none, single } = knots
  let { x, y, p, q, edge, move: kind, facet } = w
  let i = w.at
  let g = from
  do {
    const h = next[g]!
    if (arc[g] || move[g]! > CornerMove.lean || move[h]! > CornerMove.lean) break
    const leansFrom = move[g] === CornerMove.lean
    const leansTo = move[h] === CornerMove.lean
    const vx = ux[g]!
    const vy = uy[g]!
    const sx = level.x[g]!
    const sy = level.y[g]!
    const length = (level.x[h]! - sx) * vx + (level.y[h]! - sy) * vy
    const alongFrom = leansFrom ? level.p[g]! * vx + level.q[g]! * vy : 0
    const alongTo = leansTo ? level.p[h]! * vx + level.q[h]! * vy : 0
    const leanFrom = leansFrom ? leanLength(level, t * alongFrom) : 0
    const leanTo = leansTo ? leanLength(level, t * alongTo) : 0
    const whole = leanFrom + leanTo > 0 && leanFrom + leanTo >= length
    const squareFrom = alongFrom * alongFrom
    const squareTo = alongTo * alongTo
    // More than one station in a lean, or in one that goes over the whole edge, is for the general way.
    if (squareFrom > single || squareTo > single || (whole && jet.taper !== 0)) break
    if (i + MOST_STATIONS > w.capacity) {
      grow(w)
      ;({ x, y, p, q, edge, move: kind, facet } = w)
    }
    const f = figure[g]!
    const side = slope[f]!
    const first = i
    if (firstStation) firstStation[g] = first
    if (leansFrom) {
      kind[i] = MoveKind.lean
      set(x, y, p, q, i++, sx, sy, level.p[g]!, level.q[g]!)
      if (jet.taper > 0 && squareFrom > none) {
        // The tangents at both ends meet at the square jet's slope, this share of the way from it.
        const share = cosTaper / (cosTaper + Math.sqrt(cosTaper * cosTaper + narrow[f]! * squareFrom))
        const along = share * alongFrom
        const clear = clearAtTop(knots, sin[f]!, sec[f]!, facing[f]!, square[f]! + along * along)
        const at = (1 - share) * leanFrom
        kind[i] = MoveKind.lean
        setOn(x, y, p, q, i++, sx, sy, vx, vy, at, clear, along, side)
      }
    }
    if (!leansFrom || !whole) {
      kind[i] = whole ? MoveKind.lean : MoveKind.cut
      setOn(x, y, p, q, i++, sx, sy, vx, vy, leanFrom, 0, 0, side)
    }
    if (leansTo && !whole) {
      const cut = length - leanTo
      kind[i] = MoveKind.lean
      setOn(x, y, p, q, i++, sx, sy, vx, vy, cut, 0, 0, side)
      if (jet.taper > 0 && squareTo > none) {
        const share = cosTaper / (cosTaper + Math.sqrt(cosTaper * cosTaper + narrow[f]! * squareTo))
        const along = share * alongTo
        const clear = clearAtTop(knots, sin[f]!, sec[f]!, facing[f]!, square[f]! + along * along)
        kind[i] = MoveKind.lean
        setOn(x, y, p, q, i++, sx, sy, vx, vy, cut + share * leanTo, clear, along, side)
      }
    }
    for (let k = first; k < i; k++) {
      edge[k] = g
      facet[k] = level.facet[g]!
    }
    g = h
  } while (g !== stop)
  w.at = i
  return g
}

/** A jet at `at` along an edge and `out` off it, with the slopes along it and outward. */
function setOn(
  x: Float64Array,
  y: Float64Array,
  p: Float64Array,
  q: Float64Array,
  i: number,
  sx: number,
  sy: number,
  ux: number,
  uy: number,
  at: number,
  out: number,
  along: number,
  side: number,
): void {
  set(
    x,
    y,
    p,
    q,
    i,
    sx + at * ux + out * uy,
    sy + at * uy - out * ux,
    side * uy + along * ux,
    along * uy - side * ux,
  )
}

function set(
  x: Float64Array,
  y: Float64Array,
  p: Float64Array,
  q: Float64Array,
  i: number,
  atX: number,
  atY: number,
  slopeX: number,
  slopeY: number,
): void {
  x[i] = atX
  y[i] = atY
  p[i] = slopeX
  q[i] = slopeY
}
