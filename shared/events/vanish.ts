import { PieceKind, centreOf, cornerAfter, startsAtCorner } from './chain.ts'
import { narrowestRadius, pointStray, pointX, pointY, sweepOf, type March } from './march.ts'
import { CornerMode } from '../contours/frame.ts'
import { radiusAt } from '../contours/places.ts'
import type { First } from './first.ts'
import { firstZero } from './first-zero.ts'

/**
 * Vanishings: an edge's length or an arc's radius reaches zero, or neighbours become tangent and then no
 * longer meet. Offers each piece's earliest one; what depends evenly on depth is solved directly. The length of a
 * line that turns counts along its drawn direction: where it is used up the wall faces along its edge.
 */
export function offerVanishings(march: March, first: First): void {
  const { chain } = march
  const { count, kind, next, edge, ux, uy, bent, uneven, frame } = chain
  for (let e = 0; e < count; e++) {
    if (kind[e] === PieceKind.step || !startsAtCorner(chain, e)) continue
    const f = next[e]!
    const g = edge[e]!
    if (frame.mode[g] === CornerMode.spike) offerSpike(march, e, first)
    if (bent[e]) offerParting(march, e, first)
    if (kind[e] === PieceKind.arc) {
      const shrink = -march.radiusRate[e]!
      if (shrink > 0) {
        const { x, y } = centreOf(chain, e)
        first.offer(Math.max(0, march.radius[e]! / shrink), 'vanish', g, -1, x, y)
      }
    } else if (kind[e] === PieceKind.chord) {
      offerSpiralEnd(march, e, first)
    } else if (!uneven[e] && !uneven[f]) {
      const length = (march.x[f]! - march.x[e]!) * ux[e]! + (march.y[f]! - march.y[e]!) * uy[e]!
      const shrink = (march.vx[e]! - march.vx[f]!) * ux[e]! + (march.vy[e]! - march.vy[f]!) * uy[e]!
      if (shrink > 0 && length <= shrink * first.until) {
        const t = Math.max(0, length / shrink)
        first.offer(t, 'vanish', g, -1, march.x[e]! + t * march.vx[e]!, march.y[e]! + t * march.vy[e]!)
      }
    }
  }
  // Points on arcs are only right up to where their curves part, so they are looked at last.
  if (chain.hasUneven) for (let e = 0; e < count; e++) offerBentVanishing(march, e, first)
}

/** A blended arc's radius goes evenly along it and in depth: it is used up first at one of its ends. */
function offerSpiralEnd(march: March, e: number, first: First): void {
  const { chain, offset, rate } = march
  const g = chain.edge[e]!
  const { x, y } = centreOf(chain, e)
  const grow = Math.sign(chain.frame.sweep[g]!)
  for (const [o, w] of [
    [offset.start[g]!, rate.start[g]!],
    [offset.end[g]!, rate.end[g]!],
  ] as const) {
    const shrink = -grow * w
    if (shrink > 0) first.offer(Math.max(0, radiusAt(chain.frame, g, o) / shrink), 'vanish', g, -1, x, y)
  }
}

function offerBentVanishing(march: March, e: number, first: First): void {
  const { kind, edge, ux, uy, uneven } = march.chain
  if (kind[e] === PieceKind.step || !startsAtCorner(march.chain, e)) return
  const f = cornerAfter(march.chain, e)
  if (!uneven[e] && !uneven[f]) return
  const isArc = kind[e] === PieceKind.arc || kind[e] === PieceKind.chord
  const end = Math.min(first.until, march.length)
  const way = isArc ? Math.sign(march.sweep[e]!) : 0
  const length = isArc
    ? (t: number) => way * sweepOf(march, e, t)
    : (t: number) =>
        (pointX(march, f, t) - pointX(march, e, t)) * ux[e]! +
        (pointY(march, f, t) - pointY(march, e, t)) * uy[e]!
  const slack = (from: number, to: number) => {
    const stray = pointStray(march, e, from, to) + pointStray(march, f, from, to)
    if (!isArc) return stray
    // A point that strays by s turns by at most asin(s / r) ≤ (π/2) s / r about the centre.
    const narrowest = narrowestRadius(march, e, from, to)
    return narrowest > 0 ? ((Math.PI / 2) * stray) / narrowest : Infinity
  }
  const t = firstZero(length, slack, end)
  if (t !== null) first.offer(t, 'vanish', edge[e]!, -1, pointX(march, e, t), pointY(march, e, t))
}

/** Doubled-back lines part or cross as soon as either moves. */
function offerSpike(march: March, e: number, first: First): void {
  const g = march.chain.edge[e]!
  const p = march.chain.frame.previous[g]!
  if (march.rate.end[p] !== 0 || march.rate.start[g] !== 0)
    first.offer(0, 'vanish', Math.min(p, g), -1, march.x[e]!, march.y[e]!)
}

/** A line leaves its circle where |distance of the centre| = radius; two circles where the centres are r₁ ± r₂ apart. */
function offerParting(march: March, e: number, first: First): void {
  const { chain, offset, rate } = march
  const branch = chain.bent[e]!
  const g = chain.edge[e]!
  const p = chain.frame.previous[g]!
  const ends = [offset.end[p]!, offset.start[g]!] as const
  const rates = [rate.end[p]!, rate.start[g]!] as const
  const [mine, others] = branch.circleIsBefore ? ([0, 1] as const) : ([1, 0] as const)
  const r = branch.radius + branch.grow * ends[mine]
  const rRate = branch.grow * rates[mine]
  const offerMargin = (margin: number, marginRate: number) => {
    if (marginRate >= 0) return
    const t = Math.max(0, -margin / marginRate)
    if (t <= first.until)
      first.offer(t, 'vanish', Math.min(p, g), -1, pointX(march, e, t), pointY(march, e, t))
  }
  if (branch.second) {
    const { apart, grow, radius } = branch.second
    const s = radius + grow * ends[others]
    const sRate = grow * rates[others]
    offerMargin(r + s - apart, rRate + sRate)
    offerMargin(apart - r + s, sRate - rRate)
    offerMargin(apart + r - s, rRate - sRate)
  } else {
    const h = branch.along + ends[others]
    offerMargin(r - h, rRate - rates[others])
    offerMargin(r + h, rRate + rates[others])
  }
}
