import { quadraticRoots } from '../geometry/roots.ts'
import { PieceKind, centreOf, type Chain } from './chain.ts'
import { offerContact } from './contact.ts'
import { everyZero } from './every-zero.ts'
import type { First } from './first.ts'
import { NO_CONTACT, crossGap, distanceGap, lineRate, passesBeside } from './gaps.ts'
import { pointX, pointY, type March } from './march.ts'
import { offerTouch } from './touch.ts'

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
