import { chainTree, refresh, visitPairs, visitPairsOf, type ChainTree } from '../geometry/chain-tree.ts'
import { nearbyOrder } from '../geometry/order.ts'
import { edgeAdvance } from '../geometry/problems.ts'
import type { Frame } from '../contours/frame.ts'
import type { RowFigures, Slides } from '../contours/slides.ts'
import type { PlainStretch } from './stretches.ts'
import type { First } from './first.ts'

/**
 * Events of plain bodies: lines alone, without steps and blends. All points go evenly, every piece keeps its direction
 * and its number is its edge's, so that the search runs over the frame's own columns. Bodies with anything else go the
 * general way (`event.ts`), which answers the same for plain ones.
 */
export function isPlain({ hasArcs, hasSteps, hasSpikes, table }: Frame): boolean {
  return !hasArcs && !hasSteps && !hasSpikes && !table.blends
}

/** A stretch with everything in place for the search. */
export interface PlainMarch extends PlainStretch {
  readonly frame: Frame
  /** By corner: its place at t = 0 and its velocity. By edge: its length at t = 0. */
  readonly x: Float64Array
  readonly y: Float64Array
  readonly vx: Float64Array
  readonly vy: Float64Array
  readonly size: Float64Array
  readonly edges: EdgeOrder
  readonly tree: ChainTree
}

/** The edges in an order in which neighbours lie near each other, loops whole. */
export interface EdgeOrder {
  /** Edge at each place of the order; null where the order is the numbering. */
  readonly at: Int32Array | null
  readonly placeOf: Int32Array | null
  readonly next: Int32Array
  readonly advance: Uint16Array
}

export function edgeOrder(frame: Frame): EdgeOrder {
  const { outline, loopStart, count, near, px, py } = frame
  const loops = loopStart.length - 1
  const advance = new Uint16Array(count)
  if (loops < 2) {
    for (let e = 0; e < count; e++) advance[e] = edgeAdvance(outline, e, near)
    return { at: null, placeOf: null, next: outline.next, advance }
  }
  const corners = Array.from({ length: loops }, (_, l) => ({ x: px[loopStart[l]!]!, y: py[loopStart[l]!]! }))
  const at = new Int32Array(count)
  const placeOf = new Int32Array(count)
  let place = 0
  for (const l of nearbyOrder(corners)) {
    for (let g = loopStart[l]!; g < loopStart[l + 1]!; g++) {
      at[place] = g
      placeOf[g] = place
      advance[place++] = edgeAdvance(outline, g, near)
    }
  }
  return { at, placeOf, next: at.map((g) => placeOf[outline.next[g]!]!), advance }
}

export function plainMarch(frame: Frame, edges: EdgeOrder, stretch: PlainStretch): PlainMarch {
  const { length, rate, slides, start } = stretch
  const { count, near } = frame
  const numbers = () => new Float64Array(count)
  const [x, y, size] = start ? [numbers(), numbers(), numbers()] : [frame.px, frame.py, frame.length]
  const [vx, vy] = [numbers(), numbers()]
  if (start) {
    for (let g = 0; g < count; g++) startCorner(frame, g, start, x, y)
    for (let g = 0; g < count; g++) size[g] = startSize(frame, g, start)
  }
  for (let g = 0; g < count; g++) moveCorner(frame, g, rate, slides, vx, vy)
  const { at, next, advance } = edges
  const ordered = (column: Float64Array) => (at ? Float64Array.from(at, (g) => column[g]!) : column)
  const tree = chainTree({
    count,
    next,
    x: ordered(x),
    y: ordered(y),
    vx: ordered(vx),
    vy: ordered(vy),
    span: length,
    advance,
    ownBox: null,
    near,
  })
  return { ...stretch, frame, x, y, vx, vy, size, edges, tree }
}

/** What a corner moves by: outward with the edge before it, and ahead along it. */
function moveCorner(
  frame: Frame,
  g: number,
  rows: RowFigures,
  { ahead }: Slides,
  outX: Float64Array,
  outY: Float64Array,
): void {
  const p = frame.previous[g]!
  const w = rows.end[frame.table.rowOfEdge[p]!]!
  const ux = frame.ux[p]!
  const uy = frame.uy[p]!
  outX[g] = w * uy + ahead[g]! * ux
  outY[g] = ahead[g]! * uy - w * ux
}

/** Offers every edge that shrinks to nothing. */
export function offerPlainVanishings(march: PlainMarch, first: First): void {
  for (let g = 0; g < march.frame.count; g++) offerPlainVanishing(march, g, first)
}

export function offerPlainVanishing(
  { frame, slides, size, x, y, vx, vy }: PlainMarch,
  g: number,
  first: First,
): void {
  const shrink = slides.back[g]! - slides.ahead[frame.next[g]!]!
  if (shrink > 0 && size[g]! <= shrink * first.until) {
    const t = Math.max(0, size[g]! / shrink)
    first.offer(t, 'vanish', g, -1, x[g]! + t * vx[g]!, y[g]! + t * vy[g]!)
  }
}

/** Offers every contact of two edges; `touching` hears of pairs that may touch at the very start. */
export function offerPlainMeetings(
  march: PlainMarch,
  first: First,
  touching: ((a: number, b: number) => void) | null,
): void {
  const { at } = march.edges
  visitPairs(
    march.tree,
    () => first.until / march.length,
    (i, j, atRest) => offerPair(march, at ? at[i]! : i, at ? at[j]! : j, atRest, first, touching),
  )
}

/** The same for the contacts of one edge. */
export function offerPlainMeetingsOf(march: PlainMarch, g: number, first: First): void {
  const { at, placeOf } = march.edges
  visitPairsOf(
    march.tree,
    placeOf ? placeOf[g]! : g,
    () => first.until / march.length,
    (i, j, atRest) => offerPair(march, at ? at[i]! : i, at ? at[j]! : j, atRest, first, null),
  )
}

function offerPair(
  march: PlainMarch,
  a: number,
  b: number,
  atRest: boolean,
  first: First,
  touching: ((a: number, b: number) => void) | null,
): void {
  if (atRest) touching?.(a, b)
  offerPoint(march, a, b, first)
  offerPoint(march, b, a, first)
}

/** The corner at the start of edge e runs into edge f. */
function offerPoint({ frame, rate, x, y, vx, vy }: PlainMarch, e: number, f: number, first: First): void {
  const { previous, next, near, loopOf } = frame
  const p = previous[e]!
  // Edges with one between meet only where that one vanishes.
  if (f === p || next[e] === f || previous[p] === f) return
  const ux = frame.ux[f]!
  const uy = frame.uy[f]!
  const gap = (x[e]! - x[f]!) * uy - (y[e]! - y[f]!) * ux
  const closing = rate.start[frame.table.rowOfEdge[f]!]! - (vx[e]! * uy - vy[e]! * ux)
  const t = gap / closing
  if (!(t >= 0 && t <= first.until)) return
  const atX = x[e]! + t * vx[e]!
  const atY = y[e]! + t * vy[e]!
  const n = next[f]!
  if ((atX - x[f]! - t * vx[f]!) * ux + (atY - y[f]! - t * vy[f]!) * uy < -near) return
  if ((x[n]! + t * vx[n]! - atX) * ux + (y[n]! + t * vy[n]! - atY) * uy < -near) return
  first.offer(t, loopOf[e] === loopOf[f] ? 'split' : 'break-through', e, f, atX, atY)
}

/** Works out anew what depends on some corners: they, the edges on both sides, and the boxes round them. */
export function remarch(march: PlainMarch, corners: readonly number[]): void {
  const { frame, rate, slides, start, x, y, vx, vy, size, edges, tree } = march
  const { chain } = tree
  const placeOf = (g: number) => (edges.placeOf ? edges.placeOf[g]! : g)
  const places: number[] = []
  for (const g of corners) {
    const p = frame.previous[g]!
    const place = placeOf(g)
    if (start) {
      startCorner(frame, g, start, x, y)
      for (const e of [p, g]) size[e] = startSize(frame, e, start)
      chain.x[place] = x[g]!
      chain.y[place] = y[g]!
    }
    moveCorner(frame, g, rate, slides, vx, vy)
    chain.vx[place] = vx[g]!
    chain.vy[place] = vy[g]!
    places.push(place, placeOf(p))
  }
  refresh(tree, places)
}

type Start = NonNullable<PlainStretch['start']>

function startCorner(frame: Frame, g: number, start: Start, x: Float64Array, y: Float64Array): void {
  moveCorner(frame, g, start.offset, start.slides, x, y)
  x[g] = x[g]! + frame.px[g]!
  y[g] = y[g]! + frame.py[g]!
}

function startSize({ length, next }: Frame, g: number, { slides }: Start): number {
  return length[g]! + slides.ahead[next[g]!]! - slides.back[g]!
}
