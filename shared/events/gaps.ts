import { PieceKind, centreOf, isStraight } from './chain.ts'
import { onPiece } from './contact.ts'
import type { Gap } from './every-zero.ts'
import { pointStray, pointX, pointY, type March } from './march.ts'

/** Measures of how far points and pieces are apart while they move, and bounds on how far they can stray. */

/** How fast a line moves along its outward normal; a step slides along itself. */
export function lineRate(march: March, f: number): number {
  return march.chain.kind[f] === PieceKind.step ? 0 : march.rate.start[march.chain.edge[f]!]!
}

/** Distance of point e from a line that keeps its direction, or from a circle. */
export function distanceGap(march: March, e: number, f: number): Gap {
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
export function crossGap(march: March, e: number, f: number): Gap {
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
export function turningEnds(march: March, f: number, t: number, x: number, y: number) {
  const g = march.chain.next[f]!
  const [fx, fy] = [pointX(march, f, t), pointY(march, f, t)]
  const [lx, ly] = [pointX(march, g, t) - fx, pointY(march, g, t) - fy]
  const [dx, dy] = [x - fx, y - fy]
  return { cross: dx * ly - dy * lx, length: Math.hypot(lx, ly), apart: Math.hypot(dx, dy) }
}

/** A bound below every distance: the span is dropped. */
export const NO_CONTACT = -1

/**
 * Whether point e keeps clear of piece f's ends, beyond them, through a whole span. Without this a point that
 * rides along the same line or circle beside the piece (an arc drawn in two parts) would cross it at every moment.
 */
export function passesBeside(
  march: March,
  e: number,
  f: number,
  from: number,
  to: number,
  near: number,
): boolean {
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
export function farFromPiece(x: number, y: number, sx: number, sy: number, ex: number, ey: number): number {
  const [lx, ly] = [ex - sx, ey - sy]
  const square = lx * lx + ly * ly
  const along = square > 0 ? Math.min(1, Math.max(0, ((x - sx) * lx + (y - sy) * ly) / square)) : 0
  return Math.hypot(x - sx - along * lx, y - sy - along * ly)
}
