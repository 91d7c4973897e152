import { PieceKind, centreOf } from './chain.ts'
import { offerContact, onPiece } from './contact.ts'
import { everyZero } from './every-zero.ts'
import type { First } from './first.ts'
import { NO_CONTACT, farFromPiece, lineRate, turningEnds } from './gaps.ts'
import { pointStray, pointX, pointY, type March } from './march.ts'

/** Two curves touch between their ends: the distance of centre and line, or of two centres, says when. */
export function offerTouch(march: March, e: number, f: number, near: number, first: First): void {
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
