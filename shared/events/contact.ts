import { blendsAt } from '../contours/places.ts'
import { PieceKind, centreOf, startsAtCorner, type Chain } from './chain.ts'
import type { First } from './first.ts'
import { pointX, pointY, sweepOf, type March } from './march.ts'

/** Takes a contact at (x, y) if it is within piece f. */
export function offerContact(
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
export function onPiece(march: March, f: number, t: number, x: number, y: number, near: number): boolean {
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
