import { arcBounds } from '../geometry/segment.ts'
import { BOX_STRIDE } from '../geometry/boxes.ts'
import { PieceKind, centreOf, drawnStart } from './chain.ts'
import {
  bentRange,
  headingSpread,
  looseRadii,
  looseSpread,
  pointX,
  pointY,
  sweepOf,
  type March,
  type Window,
} from './march.ts'

/**
 * A moving box round every piece over a window of the march, widened by `pad`. Even motion keeps between the boxes
 * of both ends, of a line that turns as well; where a point moves unevenly, one box of everywhere that it goes stands for both.
 */
export function fillMotionBoxes(march: March, window: Window, pad: number, out: Float64Array): void {
  const { chain, x, y, vx, vy } = march
  const { count, kind, next, uneven } = chain
  for (let e = 0; e < count; e++) {
    const f = next[e]!
    const at = e * BOX_STRIDE
    if (kind[e] === PieceKind.arc) {
      fillArc(march, e, window, out, at)
    } else if (uneven[e] || uneven[f]) {
      empty(out, at)
      cover(march, e, window, out, at)
      cover(march, f, window, out, at)
      out.copyWithin(at + 4, at, at + 4)
    } else {
      for (let end = 0; end < 2; end++) {
        const t = end === 0 ? window.from : window.to
        const ax = x[e]! + t * vx[e]!
        const ay = y[e]! + t * vy[e]!
        const bx = x[f]! + t * vx[f]!
        const by = y[f]! + t * vy[f]!
        out[at + 4 * end] = ax < bx ? ax : bx
        out[at + 4 * end + 1] = ay < by ? ay : by
        out[at + 4 * end + 2] = ax < bx ? bx : ax
        out[at + 4 * end + 3] = ay < by ? by : ay
      }
    }
    for (let side = at; side < at + BOX_STRIDE; side += 4) {
      out[side]! -= pad
      out[side + 1]! -= pad
      out[side + 2]! += pad
      out[side + 3]! += pad
    }
  }
}

function empty(out: Float64Array, at: number): void {
  out[at] = out[at + 1] = Infinity
  out[at + 2] = out[at + 3] = -Infinity
}

function include(
  out: Float64Array,
  at: number,
  minX: number,
  minY: number,
  maxX: number,
  maxY: number,
): void {
  out[at] = Math.min(out[at]!, minX)
  out[at + 1] = Math.min(out[at + 1]!, minY)
  out[at + 2] = Math.max(out[at + 2]!, maxX)
  out[at + 3] = Math.max(out[at + 3]!, maxY)
}

/** Adds everywhere that point e goes. */
function cover(march: March, e: number, { from, to }: Window, out: Float64Array, at: number): void {
  if (!march.chain.uneven[e]) {
    for (const t of [from, to]) {
      const x = march.x[e]! + t * march.vx[e]!
      const y = march.y[e]! + t * march.vy[e]!
      include(out, at, x, y, x, y)
    }
    return
  }
  const branch = march.chain.bent[e]
  if (!branch) return coverLoose(march, e, { from, to }, out, at)
  const { radii, headings } = bentRange(march, e, branch, from, to)
  for (const radius of radii) {
    const box = arcBounds(branch.centre, radius, headings[0], headings[1] - headings[0])
    include(out, at, box.minX, box.minY, box.maxX, box.maxY)
  }
}

/** A point between chords of an arc with a bent end. */
function coverLoose(march: March, e: number, { from, to }: Window, out: Float64Array, at: number): void {
  const centre = centreOf(march.chain, e)
  const spread = Math.min(Math.PI, looseSpread(march, e, from, to))
  const heading = Math.atan2(pointY(march, e, from) - centre.y, pointX(march, e, from) - centre.x)
  for (const radius of looseRadii(march, e, from, to)) {
    const box = arcBounds(centre, radius, heading - spread, 2 * spread)
    include(out, at, box.minX, box.minY, box.maxX, box.maxY)
  }
}

/** An arc between smooth ends keeps its headings; a bent end may widen them, by no more than it turns. */
function fillArc(march: March, e: number, window: Window, out: Float64Array, at: number): void {
  const { chain } = march
  const f = chain.next[e]!
  const centre = centreOf(chain, e)
  const bent = chain.bent[e] ?? chain.bent[f]
  let from = bent
    ? Math.atan2(pointY(march, e, window.from) - centre.y, pointX(march, e, window.from) - centre.x)
    : drawnStart(chain, e)
  let sweep = bent ? sweepOf(march, e, window.from) : march.sweep[e]!
  if (bent) {
    const way = Math.sign(sweep)
    const before = headingSpread(march, e, e, window.from, window.to)
    const after = headingSpread(march, e, f, window.from, window.to)
    from -= way * before
    sweep += way * (before + after)
  }
  for (let end = 0; end < 2; end++) {
    const box = arcBounds(
      centre,
      march.radius[e]! + (end === 0 ? window.from : window.to) * march.radiusRate[e]!,
      from,
      sweep,
    )
    empty(out, at + 4 * end)
    include(out, at + 4 * end, box.minX, box.minY, box.maxX, box.maxY)
  }
}
