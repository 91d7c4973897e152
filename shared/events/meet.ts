import { quadraticRoots } from '../geometry/roots.ts'
import { PieceKind, centreOf, pointStray, pointX, pointY, sweepOf, type March } from './chain.ts'
import type { First } from './first.ts'
import { firstZero } from './first-zero.ts'

/**
 * Where pieces of the moving contour run into each other. The first contact of sound outlines is a point on a
 * piece, or two curves touching between their ends; both are looked for. What depends evenly on depth, or
 * quadratically, is solved directly; bent points go through `firstZero`.
 */
export function offerMeeting(march: March, e: number, f: number, near: number, first: First): void {
  offerPoint(march, e, f, near, first)
  offerPoint(march, f, e, near, first)
  const { kind } = march.chain
  if (kind[e] !== PieceKind.arc && kind[f] !== PieceKind.arc) return
  if (!areNeighbours(march, e, f) && !areNeighbours(march, f, e)) offerTouch(march, e, f, near, first)
}

/** One after the other, at most with a step between: tangent there from the start, which is no contact. */
function areNeighbours({ chain: { kind, next } }: March, e: number, f: number): boolean {
  const after = next[e]!
  return after === f || (kind[after] === PieceKind.step && next[after] === f)
}

/** Point e runs into piece f. */
function offerPoint(march: March, e: number, f: number, near: number, first: First): void {
  const { kind, previous, next, ux, uy, bent } = march.chain
  const p = previous[e]!
  if (f === e || f === p) return
  // Lines (and a step beside its wall) two places apart meet only where the piece between vanishes.
  if (next[e] === f && meetsOnlyAtEnds(kind[e]!, kind[f]!)) return
  if (previous[p] === f && meetsOnlyAtEnds(kind[p]!, kind[f]!)) return
  const isArc = kind[f] === PieceKind.arc
  if (bent[e] || (!isArc && kind[f] === PieceKind.step && bent[f]))
    return offerBentPoint(march, e, f, near, first)
  if (isArc) {
    const { x: cx, y: cy } = centreOf(march.chain, f)
    const dx = march.x[e]! - cx
    const dy = march.y[e]! - cy
    const { vx, vy } = march
    const r = march.radius[f]!
    const w = march.radiusRate[f]!
    const distance = Math.hypot(dx, dy)
    const roots = quadraticRoots(
      vx[e]! * vx[e]! + vy[e]! * vy[e]! - w * w,
      2 * (dx * vx[e]! + dy * vy[e]! - r * w),
      (distance - r) * (distance + r),
    )
    for (const t of roots) {
      if (t >= 0 && t <= first.until)
        offerContact(march, e, f, t, pointX(march, e, t), pointY(march, e, t), near, first)
    }
    return
  }
  const nx = uy[f]!
  const ny = -ux[f]!
  const gap = (march.x[e]! - march.x[f]!) * nx + (march.y[e]! - march.y[f]!) * ny
  const closing = lineRate(march, f) - (march.vx[e]! * nx + march.vy[e]! * ny)
  const t = gap / closing
  if (t >= 0 && t <= first.until) {
    offerContact(march, e, f, t, march.x[e]! + t * march.vx[e]!, march.y[e]! + t * march.vy[e]!, near, first)
  }
}

/** How fast a line moves along its outward normal; a step slides along itself. */
function lineRate(march: March, f: number): number {
  return march.chain.kind[f] === PieceKind.step ? 0 : march.rate.start[march.chain.edge[f]!]!
}

function meetsOnlyAtEnds(between: number, piece: number): boolean {
  return between === PieceKind.step || (between === PieceKind.line && piece !== PieceKind.arc)
}

/** The same for a point on an arc: every moment in turn at which it crosses the piece's whole line or circle. */
function offerBentPoint(march: March, e: number, f: number, near: number, first: First): void {
  const { chain } = march
  const isArc = chain.kind[f] === PieceKind.arc
  const centre = isArc ? centreOf(chain, f) : null
  const nx = chain.uy[f]!
  const ny = -chain.ux[f]!
  const rate = centre ? march.radiusRate[f]! : lineRate(march, f)
  const height = centre ? 0 : march.x[f]! * nx + march.y[f]! * ny
  const gap = (t: number) => {
    const x = pointX(march, e, t)
    const y = pointY(march, e, t)
    return centre
      ? Math.hypot(x - centre.x, y - centre.y) - march.radius[f]! - t * rate
      : x * nx + y * ny - height - t * rate
  }
  const slack = (from: number, to: number) =>
    passesBeside(march, e, f, from, to, near)
      ? NO_CONTACT
      : pointStray(march, e, from, to) + (Math.abs(rate) * (to - from)) / 2
  let start = 0
  const end = Math.min(first.until, march.length)
  while (start < end) {
    const from = start
    const t = firstZero(
      (s) => gap(from + s),
      (a, b) => slack(from + a, from + b),
      end - from,
    )
    if (t === null) return
    const x = pointX(march, e, from + t)
    const y = pointY(march, e, from + t)
    if (offerContact(march, e, f, from + t, x, y, near, first)) return
    start = from + t + end * PAST_CROSSING
  }
}

/** A bound below every distance: the span is dropped. */
const NO_CONTACT = -1

/**
 * Whether point e keeps clear of piece f's ends, beyond them, through a whole span. Without this a point that
 * rides along the same line or circle beside the piece (an arc drawn in two parts) would cross it at every moment.
 */
function passesBeside(march: March, e: number, f: number, from: number, to: number, near: number): boolean {
  const { chain } = march
  const following = chain.next[f]!
  const t = (from + to) / 2
  const [x, y] = [pointX(march, e, t), pointY(march, e, t)]
  const [sx, sy] = [pointX(march, f, t), pointY(march, f, t)]
  const [ex, ey] = [pointX(march, following, t), pointY(march, following, t)]
  const stray = pointStray(march, e, from, to) + near
  const startStray = pointStray(march, f, from, to)
  const endStray = pointStray(march, following, from, to)
  if (chain.kind[f] !== PieceKind.arc) {
    const fromStart = (x - sx) * chain.ux[f]! + (y - sy) * chain.uy[f]!
    const toEnd = (ex - x) * chain.ux[f]! + (ey - y) * chain.uy[f]!
    const [atStart, atEnd] = [stray + startStray, stray + endStray]
    // A step may run against its direction, so either order of signs is beyond an end.
    return (fromStart < -atStart && toEnd > atEnd) || (fromStart > atStart && toEnd < -atEnd)
  }
  if (onPiece(march, f, t, x, y, near)) return false
  const [r, w] = [march.radius[f]!, march.radiusRate[f]!]
  const [atFrom, atTo] = [r + from * w, r + to * w]
  const [narrow, wide] = [Math.min(atFrom, atTo), Math.max(atFrom, atTo)]
  if (!(narrow > 0)) return false
  // An end that strays by s turns by at most asin(s / r) ≤ (π/2) s / r, and uncovers as much of the arc.
  const arcStray =
    (wide - narrow) / 2 + (1 + ((Math.PI / 2) * wide) / narrow) * Math.max(startStray, endStray)
  return Math.min(Math.hypot(x - sx, y - sy), Math.hypot(x - ex, y - ey)) > stray + arcStray
}

/** Where a crossing beside the piece was passed over, the search goes on this share of the march later. */
const PAST_CROSSING = 1e-6

/** Two curves touch between their ends: the distance of centre and line, or of two centres, says when. */
function offerTouch(march: March, e: number, f: number, near: number, first: First): void {
  const { chain, radius, radiusRate } = march
  if (chain.kind[e] !== PieceKind.arc) return offerTouch(march, f, e, near, first)
  const c = centreOf(chain, e)
  const r = radius[e]!
  const w = radiusRate[e]!
  const offerAt = (t: number, ux: number, uy: number, along: number) => {
    if (!(t >= 0 && t <= first.until)) return
    const x = c.x + along * ux
    const y = c.y + along * uy
    if (onPiece(march, e, t, x, y, near)) offerContact(march, e, f, t, x, y, near, first)
  }
  if (chain.kind[f] !== PieceKind.arc) {
    const nx = chain.uy[f]!
    const ny = -chain.ux[f]!
    const gap = (march.x[f]! - c.x) * nx + (march.y[f]! - c.y) * ny
    const moving = lineRate(march, f)
    for (const side of [1, -1]) {
      const t = (gap - side * r) / (side * w - moving)
      offerAt(t, nx, ny, side * (r + w * t))
    }
    return
  }
  const d = centreOf(chain, f)
  const apart = Math.hypot(d.x - c.x, d.y - c.y)
  if (apart <= near) return // circles about one centre meet at their ends first
  const ux = (d.x - c.x) / apart
  const uy = (d.y - c.y) / apart
  const s = radius[f]!
  const v = radiusRate[f]!
  for (const t of [(apart - r - s) / (w + v), (apart - r + s) / (w - v)]) offerAt(t, ux, uy, r + w * t)
  const t = (apart + r - s) / (v - w)
  offerAt(t, ux, uy, -(r + w * t))
}

/** Takes a contact at (x, y) if it is within piece f. */
function offerContact(
  march: March,
  e: number,
  f: number,
  t: number,
  x: number,
  y: number,
  near: number,
  first: First,
): boolean {
  if (!onPiece(march, f, t, x, y, near)) return false
  const { edge, frame } = march.chain
  const [a, b] = [edge[e]!, edge[f]!]
  const kind = frame.loopOf[a] === frame.loopOf[b] ? 'split' : 'break-through'
  first.offer(t, kind, a, b, x, y)
  return true
}

/** Whether a point of the piece's whole line or circle lies between its ends, within `near`. */
function onPiece(march: March, f: number, t: number, x: number, y: number, near: number): boolean {
  const { chain } = march
  const following = chain.next[f]!
  const sx = pointX(march, f, t)
  const sy = pointY(march, f, t)
  const kind = chain.kind[f]
  if (kind === PieceKind.arc) {
    const { x: cx, y: cy } = centreOf(chain, f)
    const sweep = sweepOf(march, f, t)
    const from = Math.atan2(sy - cy, sx - cx)
    const turn = (Math.atan2(y - cy, x - cx) - from) * Math.sign(sweep)
    const radius = Math.hypot(x - cx, y - cy)
    const slack = radius > 0 ? near / radius : Math.PI
    const round = turn - 2 * Math.PI * Math.floor((turn + slack) / (2 * Math.PI))
    return round <= Math.abs(sweep) + slack
  }
  const fromStart = (x - sx) * chain.ux[f]! + (y - sy) * chain.uy[f]!
  const toEnd =
    (pointX(march, following, t) - x) * chain.ux[f]! + (pointY(march, following, t) - y) * chain.uy[f]!
  if (fromStart >= -near && toEnd >= -near) return true
  // A step may run against its direction, when the wall after it stands further in.
  return kind === PieceKind.step && fromStart <= near && toEnd <= near
}
