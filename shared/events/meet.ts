import { blendsAt } from '../contours/frame.ts'
import { quadraticRoots } from '../geometry/roots.ts'
import { PieceKind, centreOf, isStraight, startsAtCorner, type Chain } from './chain.ts'
import { pointStray, pointX, pointY, sweepOf, type March } from './march.ts'
import type { First } from './first.ts'
import { everyZero, type Gap } from './every-zero.ts'

/**
 * Where pieces of the moving contour run into each other. The first contact of sound outlines is a point on a
 * piece, or two curves touching between their ends; both are looked for. What depends evenly on depth, or
 * quadratically (a point against a line that turns), is solved directly; the rest goes through `firstZero`.
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
  const { kind, edge, previous, next, ux, uy, uneven, rotates } = march.chain
  const p = previous[e]!
  if (f === e || f === p) return
  // Pieces two places apart: the first and the last meet, or only the one between vanishes.
  if (next[e] === f && meetsOnlyAtEnds(march.chain, e, f)) return
  if (previous[p] === f && meetsOnlyAtEnds(march.chain, p, f)) return
  // A spiral with a radius left never meets itself.
  if (kind[f] === PieceKind.chord && (edge[e] === edge[f] || edge[p] === edge[f])) return
  const isArc = kind[f] === PieceKind.arc
  if (rotates[f]) return offerPointOnTurning(march, e, f, near, first)
  if (uneven[e] || (kind[f] === PieceKind.step && uneven[f]))
    return offerUnevenPoint(march, e, f, near, first)
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

/**
 * Whether the neighbours of a piece can meet only where it vanishes to a point, so that its far end need not be held
 * against the piece beside it: lines and steps that keep their directions. A line that turns may fold onto its
 * neighbour while it still has a length.
 */
function meetsOnlyAtEnds({ kind, rotates }: Chain, between: number, piece: number): boolean {
  if (kind[between] === PieceKind.step) return true
  if (rotates[between] || rotates[piece]) return false
  return kind[between] === PieceKind.line && kind[piece] !== PieceKind.arc
}

/**
 * Point e runs into a piece f that turns: (P − F) × (G − F) with F and G the piece's ends, all three moving evenly,
 * is quadratic in t.
 */
function offerPointOnTurning(march: March, e: number, f: number, near: number, first: First): void {
  const { uneven, next } = march.chain
  const { x, y, vx, vy } = march
  const g = next[f]!
  if (uneven[e] || uneven[f] || uneven[g]) return offerUnevenPoint(march, e, f, near, first)
  const [dx, dy, dvx, dvy] = [x[e]! - x[f]!, y[e]! - y[f]!, vx[e]! - vx[f]!, vy[e]! - vy[f]!]
  const [lx, ly, lvx, lvy] = [x[g]! - x[f]!, y[g]! - y[f]!, vx[g]! - vx[f]!, vy[g]! - vy[f]!]
  const roots = quadraticRoots(
    dvx * lvy - dvy * lvx,
    dvx * ly - dvy * lx + dx * lvy - dy * lvx,
    dx * ly - dy * lx,
  )
  for (const t of roots) {
    if (t >= 0 && t <= first.until)
      offerContact(march, e, f, t, x[e]! + t * vx[e]!, y[e]! + t * vy[e]!, near, first)
  }
}

/** The same for a point that moves unevenly: every moment in turn at which it crosses the piece's whole line or circle. */
function offerUnevenPoint(march: March, e: number, f: number, near: number, first: First): void {
  const { gap, stray } = march.chain.rotates[f] ? crossGap(march, e, f) : distanceGap(march, e, f)
  const slack = (from: number, to: number) =>
    passesBeside(march, e, f, from, to, near) ? NO_CONTACT : stray(from, to)
  everyZero(march, gap, slack, first, (t) =>
    offerContact(march, e, f, t, pointX(march, e, t), pointY(march, e, t), near, first),
  )
}

/** Distance of point e from a line that keeps its direction, or from a circle. */
function distanceGap(march: March, e: number, f: number): Gap {
  const { chain } = march
  const isArc = chain.kind[f] === PieceKind.arc
  const centre = isArc ? centreOf(chain, f) : null
  const nx = chain.uy[f]!
  const ny = -chain.ux[f]!
  const rate = centre ? march.radiusRate[f]! : lineRate(march, f)
  const height = centre ? 0 : march.x[f]! * nx + march.y[f]! * ny
  return {
    gap: (t) => {
      const x = pointX(march, e, t)
      const y = pointY(march, e, t)
      return centre
        ? Math.hypot(x - centre.x, y - centre.y) - march.radius[f]! - t * rate
        : x * nx + y * ny - height - t * rate
    },
    stray: (from, to) => pointStray(march, e, from, to) + (Math.abs(rate) * (to - from)) / 2,
  }
}

/** (P − F) × (G − F) of point e and the ends of a piece that turns. */
function crossGap(march: March, e: number, f: number): Gap {
  const ends = (t: number) => turningEnds(march, f, t, pointX(march, e, t), pointY(march, e, t))
  return {
    gap: (t) => ends(t).cross,
    stray: (from, to) => {
      const { length, apart } = ends((from + to) / 2)
      const [own, start, end] = [e, f, march.chain.next[f]!].map((i) => pointStray(march, i, from, to)) as [
        number,
        number,
        number,
      ]
      return (own + start) * length + (start + end) * apart + (own + start) * (start + end)
    },
  }
}

/** For a place P and a piece from F to G: (P − F) × (G − F), |G − F| and |P − F|. */
function turningEnds(march: March, f: number, t: number, x: number, y: number) {
  const g = march.chain.next[f]!
  const [fx, fy] = [pointX(march, f, t), pointY(march, f, t)]
  const [lx, ly] = [pointX(march, g, t) - fx, pointY(march, g, t) - fy]
  const [dx, dy] = [x - fx, y - fy]
  return { cross: dx * ly - dy * lx, length: Math.hypot(lx, ly), apart: Math.hypot(dx, dy) }
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
  if (chain.rotates[f]) return farFromPiece(x, y, sx, sy, ex, ey) > stray + Math.max(startStray, endStray)
  if (isStraight(chain, f)) {
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

/** Distance of a place from the straight piece between two points. */
function farFromPiece(x: number, y: number, sx: number, sy: number, ex: number, ey: number): number {
  const [lx, ly] = [ex - sx, ey - sy]
  const square = lx * lx + ly * ly
  const along = square > 0 ? Math.min(1, Math.max(0, ((x - sx) * lx + (y - sy) * ly) / square)) : 0
  return Math.hypot(x - sx - along * lx, y - sy - along * ly)
}

/** Two curves touch between their ends: the distance of centre and line, or of two centres, says when. */
function offerTouch(march: March, e: number, f: number, near: number, first: First): void {
  const { chain, radius, radiusRate } = march
  if (chain.kind[e] !== PieceKind.arc) return offerTouch(march, f, e, near, first)
  if (chain.rotates[f]) return offerTouchOnTurning(march, e, f, near, first)
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

/**
 * A line that turns touches arc e between its ends: |(C − F) × (G − F)| = r·|G − F|, a quartic in t, so its zeros are
 * looked for, on either side.
 */
function offerTouchOnTurning(march: March, e: number, f: number, near: number, first: First): void {
  const { chain } = march
  const { x: cx, y: cy } = centreOf(chain, e)
  const g = chain.next[f]!
  const radiusAt = (t: number) => march.radius[e]! + t * march.radiusRate[e]!
  for (const side of [1, -1]) {
    const gap = (t: number) => {
      const { cross, length } = turningEnds(march, f, t, cx, cy)
      return cross - side * radiusAt(t) * length
    }
    const slack = (from: number, to: number) => {
      const t = (from + to) / 2
      const [start, end] = [pointStray(march, f, from, to), pointStray(march, g, from, to)]
      const [radius, change] = [Math.abs(radiusAt(t)), (Math.abs(march.radiusRate[e]!) * (to - from)) / 2]
      const far = farFromPiece(
        cx,
        cy,
        pointX(march, f, t),
        pointY(march, f, t),
        pointX(march, g, t),
        pointY(march, g, t),
      )
      if (far > radius + change + Math.max(start, end) + near) return NO_CONTACT
      const { length, apart } = turningEnds(march, f, t, cx, cy)
      return (
        start * length +
        (start + end) * (apart + start) +
        change * (length + start + end) +
        radius * (start + end)
      )
    }
    everyZero(march, gap, slack, first, (t) => {
      const [fx, fy] = [pointX(march, f, t), pointY(march, f, t)]
      const [lx, ly] = [pointX(march, g, t) - fx, pointY(march, g, t) - fy]
      const square = lx * lx + ly * ly
      if (square === 0) return false
      const along = ((cx - fx) * lx + (cy - fy) * ly) / square
      const [x, y] = [fx + along * lx, fy + along * ly]
      return onPiece(march, e, t, x, y, near) && offerContact(march, e, f, t, x, y, near, first)
    })
  }
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
  const folded = foldedEdge(march.chain, e, f)
  if (folded >= 0) {
    first.offer(t, 'vanish', folded, -1, x, y)
    return true
  }
  const kind = frame.loopOf[a] === frame.loopOf[b] ? 'split' : 'break-through'
  first.offer(t, kind, a, b, x, y)
  return true
}

/**
 * The edge that a contact of corner e with piece f cuts off, its neighbours closing over it: the one between them,
 * where it or one of them turns. −1 for other contacts.
 */
function foldedEdge(chain: Chain, e: number, f: number): number {
  const { frame, edge, kind, rotates } = chain
  if (!frame.table.blends || !startsAtCorner(chain, e)) return -1
  const [after, piece] = [edge[e]!, edge[f]!]
  if (kind[e] === PieceKind.step || kind[f] === PieceKind.step) return -1
  const before = frame.previous[after]!
  if (frame.next[after] === piece && (rotates[e] || rotates[f])) return after
  if (frame.previous[before] === piece && (rotates[f] || blendsAt(frame, before))) return before
  return -1
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
  const ex = pointX(march, following, t)
  const ey = pointY(march, following, t)
  // A piece that turns points where its ends are just then.
  const size = chain.rotates[f] ? Math.hypot(ex - sx, ey - sy) : 1
  const ux = chain.rotates[f] ? (ex - sx) / size : chain.ux[f]!
  const uy = chain.rotates[f] ? (ey - sy) / size : chain.uy[f]!
  const fromStart = (x - sx) * ux + (y - sy) * uy
  const toEnd = (ex - x) * ux + (ey - y) * uy
  if (fromStart >= -near && toEnd >= -near) return true
  // A step may run against its direction, when the wall after it stands further in.
  return kind === PieceKind.step && fromStart <= near && toEnd <= near
}
