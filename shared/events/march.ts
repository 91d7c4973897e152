import {
  branchPoint,
  branchRange,
  branchStray,
  type Branch,
  type BranchRange,
  type OffsetSpan,
} from '../contours/branch.ts'
import { CornerMode } from '../contours/frame.ts'
import { makePlaces, place, radiusAt, sweepAt } from '../contours/places.ts'
import type { Point } from '../geometry/types.ts'
import type { EdgeEnds } from '../walls/wall-table.ts'
import { PieceKind, centreOf, cornerAfter, drawnStart, startsAtCorner, type Chain } from './chain.ts'

/** A chain over one stretch of its march; `t` runs from 0 to `length`, mm of depth (or a share, while morphing). */
export interface March {
  readonly chain: Chain
  readonly length: number
  /** Per edge: offset at t = 0 and its change per unit of t. */
  readonly offset: EdgeEnds
  readonly rate: EdgeEnds
  /** Per piece: its first point at t = 0 and the point's velocity (uneven points: the place only). */
  readonly x: Float64Array
  readonly y: Float64Array
  readonly vx: Float64Array
  readonly vy: Float64Array
  /** Per piece that is an arc: radius and its change, start heading and sweep at t = 0. */
  readonly radius: Float64Array
  readonly radiusRate: Float64Array
  readonly sweep: Float64Array
  /** The last answers about uneven points, which are asked for again and again at the same moment. */
  readonly memo: Memo
  /** The stretch of it that is being searched. */
  readonly window: Window
}

export interface Window {
  readonly from: number
  readonly to: number
}

interface Memo {
  readonly t: Float64Array
  readonly x: Float64Array
  readonly y: Float64Array
  readonly from: Float64Array
  readonly to: Float64Array
  readonly stray: Float64Array
}

function emptyMemo(count: number): Memo {
  const never = () => new Float64Array(count).fill(NaN)
  return { t: never(), x: never(), y: never(), from: never(), to: never(), stray: never() }
}

export function marchOf(chain: Chain, offset: EdgeEnds, rate: EdgeEnds, length: number): March {
  const { frame, count, kind, edge } = chain
  const x = new Float64Array(count)
  const y = new Float64Array(count)
  const vx = new Float64Array(count)
  const vy = new Float64Array(count)
  const arcs = frame.hasArcs ? count : 0
  const radius = new Float64Array(arcs)
  const radiusRate = new Float64Array(arcs)
  const sweep = new Float64Array(arcs)
  const places = makePlaces(frame.count)
  place(frame, offset, places)
  const memo = emptyMemo(chain.hasUneven ? count : 0)
  const window = { from: 0, to: length }
  const march = { memo, window, chain, length, offset, rate, x, y, vx, vy, radius, radiusRate, sweep }
  for (let e = 0; e < count; e++) {
    const g = edge[e]!
    const p = frame.previous[g]!
    const isStep = kind[e] === PieceKind.step
    if (kind[e] === PieceKind.arc || kind[e] === PieceKind.chord) {
      radius[e] = radiusAt(frame, g, offset.start[g]!)
      radiusRate[e] = Math.sign(frame.sweep[g]!) * rate.start[g]!
      sweep[e] = sweepAt(frame, g, places)
    }
    if (!startsAtCorner(chain, e)) {
      placeOnSpiral(march, e)
      continue
    }
    x[e] = isStep ? places.ex[p]! : places.sx[g]!
    y[e] = isStep ? places.ey[p]! : places.sy[g]!
    const w1 = rate.end[p]!
    const w2 = rate.start[g]!
    const mode = frame.mode[g]
    if (mode === CornerMode.mitre) {
      vx[e] = w1 * frame.mx[g]! + (w2 - w1) * frame.kx[g]!
      vy[e] = w1 * frame.my[g]! + (w2 - w1) * frame.ky[g]!
    } else if (mode === CornerMode.smooth || mode === CornerMode.step) {
      const w = isStep ? w1 : w2
      vx[e] = w * frame.mx[g]!
      vy[e] = w * frame.my[g]!
    }
  }
  return march
}

/** Radius of a blended arc at the share where a chord starts, and its change: both ends' in proportion. */
function spiralRadius(march: March, e: number): readonly [radius: number, rate: number] {
  const { chain, offset, rate, radius, radiusRate } = march
  const g = chain.edge[e]!
  const s = chain.share[e]!
  const end = radiusAt(chain.frame, g, offset.end[g]!)
  const endRate = Math.sign(chain.frame.sweep[g]!) * rate.end[g]!
  return [radius[e]! + s * (end - radius[e]!), radiusRate[e]! + s * (endRate - radiusRate[e]!)]
}

/** A point between chords: where both corners keep their headings it moves straight out from the centre, evenly. */
function placeOnSpiral(march: March, e: number): void {
  const { chain, x, y, vx, vy, sweep } = march
  const centre = centreOf(chain, e)
  const first = chain.firstOf[chain.edge[e]!]!
  const start = chain.bent[first]
    ? Math.atan2(y[first]! - centre.y, x[first]! - centre.x)
    : drawnStart(chain, e)
  const heading = start + chain.share[e]! * sweep[e]!
  const [radius, rate] = spiralRadius(march, e)
  x[e] = centre.x + radius * Math.cos(heading)
  y[e] = centre.y + radius * Math.sin(heading)
  vx[e] = rate * Math.cos(heading)
  vy[e] = rate * Math.sin(heading)
}

export function pointX(march: March, e: number, t: number): number {
  if (!march.chain.uneven[e]) return march.x[e]! + t * march.vx[e]!
  if (march.memo.t[e] !== t) placeUneven(march, e, t)
  return march.memo.x[e]!
}

export function pointY(march: March, e: number, t: number): number {
  if (!march.chain.uneven[e]) return march.y[e]! + t * march.vy[e]!
  if (march.memo.t[e] !== t) placeUneven(march, e, t)
  return march.memo.y[e]!
}

function placeUneven(march: March, e: number, t: number): void {
  const { x, y } = unevenPoint(march, e, t)
  march.memo.t[e] = t
  march.memo.x[e] = x
  march.memo.y[e] = y
}

function unevenPoint(march: March, e: number, t: number): Point {
  const { chain, offset, rate } = march
  const g = chain.edge[e]!
  const p = chain.frame.previous[g]!
  const branch = chain.bent[e]
  if (branch)
    return branchPoint(branch, offset.end[p]! + t * rate.end[p]!, offset.start[g]! + t * rate.start[g]!)
  const centre = centreOf(chain, e)
  const turn = turnOf(march, chain.firstOf[g]!, centre, t)
  const heading =
    Math.atan2(march.y[e]! - centre.y, march.x[e]! - centre.x) +
    turn +
    chain.share[e]! * (sweepOf(march, e, t) - march.sweep[e]!)
  const [radius, radiusRate] = spiralRadius(march, e)
  const r = radius + t * radiusRate
  return { x: centre.x + r * Math.cos(heading), y: centre.y + r * Math.sin(heading) }
}

/** How far point e can be, between two moments, from where it is half-way between them, mm. */
export function pointStray(march: March, e: number, from: number, to: number): number {
  const { chain, memo } = march
  if (!chain.uneven[e]) return (Math.hypot(march.vx[e]!, march.vy[e]!) * (to - from)) / 2
  if (memo.from[e] !== from || memo.to[e] !== to) {
    memo.stray[e] = unevenStray(march, e, from, to)
    memo.from[e] = from
    memo.to[e] = to
  }
  return memo.stray[e]!
}

function unevenStray(march: March, e: number, from: number, to: number): number {
  const branch = march.chain.bent[e]
  if (branch) return branchStray(branch, ...offsetSpans(march, e, from, to))
  const [radius, rate] = spiralRadius(march, e)
  const widest = Math.max(Math.abs(radius + from * rate), Math.abs(radius + to * rate))
  return (Math.abs(rate) * (to - from)) / 2 + widest * looseSpread(march, e, from, to)
}

export function bentRange(march: March, e: number, branch: Branch, from: number, to: number): BranchRange {
  return branchRange(branch, ...offsetSpans(march, e, from, to))
}

function offsetSpans(
  { chain, offset, rate }: March,
  e: number,
  from: number,
  to: number,
): readonly [OffsetSpan, OffsetSpan] {
  const g = chain.edge[e]!
  const p = chain.frame.previous[g]!
  return [
    [offset.end[p]! + from * rate.end[p]!, offset.end[p]! + to * rate.end[p]!],
    [offset.start[g]! + from * rate.start[g]!, offset.start[g]! + to * rate.start[g]!],
  ] as const
}

/**
 * How far the heading of a corner about the centre of arc piece e can go within a span, radians: from anywhere in it
 * to anywhere else.
 */
export function headingSpread(march: March, e: number, corner: number, from: number, to: number): number {
  const branch = march.chain.bent[corner]
  if (!branch) return 0
  const { radii, headings } = bentRange(march, corner, branch, from, to)
  const turn = headings[1] - headings[0]
  if (branch.centre === centreOf(march.chain, e)) return turn
  // About the other centre: a point that strays by s turns by at most asin(s / r) ≤ (π/2) s / r.
  const stray = Math.abs(radii[1] - radii[0]) + Math.max(...radii) * turn
  const narrowest = narrowestRadius(march, e, from, to)
  return narrowest > 0 ? Math.min(2 * Math.PI, ((Math.PI / 2) * stray) / narrowest) : 2 * Math.PI
}

/** The least radius of an arc, of a chord's arc at either end, over a span. */
export function narrowestRadius(march: March, e: number, from: number, to: number): number {
  const { chain, radius, radiusRate, offset, rate } = march
  const narrowest = radius[e]! + Math.min(from * radiusRate[e]!, to * radiusRate[e]!)
  if (chain.kind[e] !== PieceKind.chord) return narrowest
  const g = chain.edge[e]!
  const grow = Math.sign(chain.frame.sweep[g]!)
  const end = radiusAt(chain.frame, g, offset.end[g]!)
  const change = grow * rate.end[g]!
  return Math.min(narrowest, end + Math.min(from * change, to * change))
}

/** The same for a point between chords: both corners' in proportion. */
export function looseSpread(march: March, e: number, from: number, to: number): number {
  const { chain } = march
  const [first, after] = cornersOfArc(chain, e)
  const s = chain.share[e]!
  return (1 - s) * headingSpread(march, e, first, from, to) + s * headingSpread(march, e, after, from, to)
}

/** Radii, over a span, of a point between chords. */
export function looseRadii(march: March, e: number, from: number, to: number): readonly [number, number] {
  const [radius, rate] = spiralRadius(march, e)
  return [radius + from * rate, radius + to * rate]
}

/** The points that are the two corners of an arc, or of the arc that a chord belongs to. */
function cornersOfArc(chain: Chain, e: number): readonly [first: number, after: number] {
  const first = chain.kind[e] === PieceKind.chord ? chain.firstOf[chain.edge[e]!]! : e
  return [first, cornerAfter(chain, e)]
}

/** Signed included angle of an arc piece, or of the whole arc of a chord, at a moment. */
export function sweepOf(march: March, e: number, t: number): number {
  const { chain } = march
  const [first, after] = cornersOfArc(chain, e)
  if (!chain.bent[first] && !chain.bent[after]) return march.sweep[e]!
  const centre = centreOf(chain, e)
  return march.sweep[e]! + turnOf(march, after, centre, t) - turnOf(march, first, centre, t)
}

/** How far a corner has turned about a centre since t = 0. */
function turnOf(march: March, corner: number, centre: Point, t: number): number {
  if (!march.chain.bent[corner]) return 0
  const ax = march.x[corner]! - centre.x
  const ay = march.y[corner]! - centre.y
  const bx = pointX(march, corner, t) - centre.x
  const by = pointY(march, corner, t) - centre.y
  return Math.atan2(ax * by - ay * bx, ax * bx + ay * by)
}
