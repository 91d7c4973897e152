import { radiusAt } from '../contours/places.ts'
import { PieceKind, centreOf, startsAtCorner } from './chain.ts'
import type { First } from './first.ts'
import { everyZero, type Gap } from './every-zero.ts'
import { headingSpread, pointStray, pointX, pointY, sweepOf, type March } from './march.ts'

/**
 * Where an arc and its neighbour, one of which blends, fold onto each other at their corner: their tangents there come
 * to lie opposite, T₁ × T₂ = 0 with T₁ · T₂ < 0, and from then on they cross just beside the corner. No end touches
 * anything when that begins, and the chords that stand for a blended arc are too coarse to see it.
 */
export function offerCornerFolds(march: March, first: First): void {
  const { chain } = march
  const { kind, previous, edge, rotates } = chain
  for (let e = 0; e < chain.count; e++) {
    const p = previous[e]!
    if (!rotates[e] && !rotates[p]) continue
    // Two lines lie opposite all along at once, which their ends tell.
    if (kind[e] === PieceKind.line && kind[p] === PieceKind.line) continue
    if (!startsAtCorner(chain, e) || kind[e] === PieceKind.step || kind[p] === PieceKind.step) continue
    const before = tangentOf(march, p, e)
    const after = tangentOf(march, e, e)
    const fold: Gap = {
      gap: (t) => {
        const [ax, ay] = before.at(t)
        const [bx, by] = after.at(t)
        return ax * by - ay * bx
      },
      stray: (from, to) => {
        const t = (from + to) / 2
        const [a, b] = [Math.hypot(...before.at(t)), Math.hypot(...after.at(t))]
        const [da, db] = [before.stray(from, to), after.stray(from, to)]
        return a * db + b * da + da * db
      },
    }
    everyZero(march, fold.gap, fold.stray, first, (t) => {
      const [ax, ay] = before.at(t)
      const [bx, by] = after.at(t)
      if (ax * bx + ay * by >= 0) return false
      first.offer(t, 'split', edge[p]!, edge[e]!, pointX(march, e, t), pointY(march, e, t))
      return true
    })
  }
}

/** A vector along a piece's travel at one of its corners, and how far it can stray over a span from its middle. */
interface Tangent {
  readonly at: (t: number) => readonly [x: number, y: number]
  readonly stray: (from: number, to: number) => number
}

function tangentOf(march: March, piece: number, corner: number): Tangent {
  const { chain } = march
  if (chain.kind[piece] === PieceKind.line && !chain.rotates[piece]) {
    const along = [chain.ux[piece]!, chain.uy[piece]!] as const
    return { at: () => along, stray: () => 0 }
  }
  if (chain.kind[piece] === PieceKind.line) {
    const end = chain.next[piece]!
    return {
      at: (t) => [
        pointX(march, end, t) - pointX(march, piece, t),
        pointY(march, end, t) - pointY(march, piece, t),
      ],
      stray: (from, to) => pointStray(march, piece, from, to) + pointStray(march, end, from, to),
    }
  }
  return spiralTangent(march, piece, corner)
}

/** dP/d(share) of a spiral, radius r₀ + share·(r₁ − r₀): (r₁ − r₀) outward and r·sweep along; of a plain arc the latter alone. */
function spiralTangent(march: March, piece: number, corner: number): Tangent {
  const { chain, offset, rate } = march
  const { frame } = chain
  const g = chain.edge[piece]!
  const centre = centreOf(chain, piece)
  const grow = Math.sign(frame.sweep[g]!)
  const atStart = chain.firstOf[g] === corner
  const ends = [offset.start, offset.end].map((o) => radiusAt(frame, g, o[g]!)) as [number, number]
  const rates = [grow * rate.start[g]!, grow * rate.end[g]!] as const
  const own = atStart ? 0 : 1
  const radius = (t: number) => ends[own] + t * rates[own]
  const change = (t: number) => ends[1] - ends[0] + t * (rates[1] - rates[0])
  return {
    at: (t) => {
      const [x, y] = [pointX(march, corner, t) - centre.x, pointY(march, corner, t) - centre.y]
      const far = Math.hypot(x, y)
      if (far === 0) return [0, 0]
      const [k, along] = [change(t) / far, (radius(t) * sweepOf(march, piece, t)) / far]
      return [k * x - along * y, k * y + along * x]
    },
    stray: (from, to) => {
      const t = (from + to) / 2
      const half = (to - from) / 2
      const far = chain.kind[piece] === PieceKind.chord ? chain.firstOf[frame.next[g]!]! : chain.next[piece]!
      const first = chain.kind[piece] === PieceKind.chord ? chain.firstOf[g]! : piece
      const turns = [first, far].map((i) => headingSpread(march, piece, i, from, to)) as [number, number]
      const sweep = Math.abs(sweepOf(march, piece, t))
      const widest = Math.abs(radius(t)) + half * Math.abs(rates[own])
      const outward = half * Math.abs(rates[1] - rates[0])
      const along = half * Math.abs(rates[own]) * sweep + widest * (turns[0] + turns[1])
      const longest = Math.abs(change(t)) + outward + widest * (sweep + turns[0] + turns[1])
      return outward + along + longest * turns[own]
    },
  }
}
