import { STRAIGHT_BULGE } from './bulge.ts'
import { capFactor } from './loop.ts'
import { segmentBounds } from './segment.ts'
import type { Bounds, Loop, Segment, Vertex, VertexLoop } from './types.ts'

/**
 * All loops of a profile in flat arrays, edges numbered through the loops: edge i starts at (x, y)[i] and ends
 * where edge next[i] starts. What costs an object per edge is made only for those who ask (`segmentAt`, `loopsOf`).
 */
export interface Outline {
  readonly count: number
  /** Loop l has the edges loopStart[l] up to loopStart[l + 1]. */
  readonly loopStart: Int32Array
  readonly next: Int32Array
  readonly x: Float64Array
  readonly y: Float64Array
  /** 1 where the edge is an arc; its centre, radius and signed sweep (0 for lines). */
  readonly arc: Uint8Array
  readonly cx: Float64Array
  readonly cy: Float64Array
  readonly radius: Float64Array
  readonly sweep: Float64Array
  readonly hasArcs: boolean
}

export interface ReadOutline {
  readonly outline: Outline
  /** Which loops came in the other way round. */
  readonly reversed: readonly boolean[]
  /** Signed area of every loop once it is put right, mm². */
  readonly areas: readonly number[]
}

/**
 * Vertices as requests write them, put the right way round: the first loop counter-clockwise, the others clockwise.
 * A loop that is turned round keeps its first corner: corner k is then the caller's corner (n − k) mod n, and edge k
 * the caller's edge n − 1 − k.
 */
export function readOutline(loops: readonly VertexLoop[]): ReadOutline {
  const hasArcs = loops.some((loop) => loop.some(isBulged))
  const outline = emptyOutline(loops, hasArcs)
  const { x, y, next } = outline
  let i = 0
  for (const loop of loops) {
    for (let v = 0; v < loop.length; v++) {
      x[i] = loop[v]!.x
      y[i++] = loop[v]!.y
    }
  }
  if (hasArcs) {
    i = 0
    for (const loop of loops) {
      for (const vertex of loop) {
        if (isBulged(vertex)) curve(outline, i, next[i]!, vertex.bulge!)
        i++
      }
    }
  }
  const areas = loops.map((_, l) => loopArea(outline, l))
  const reversed = areas.map((area, l) => area > 0 !== (l === 0))
  reversed.forEach((turned, l) => {
    if (!turned) return
    turnRound(outline, l)
    areas[l] = -areas[l]!
  })
  return { outline, reversed, areas }
}

function isBulged({ bulge }: Vertex): boolean {
  return bulge !== undefined && Math.abs(bulge) >= STRAIGHT_BULGE
}

/** With chord c and bulge b: radius = c(1 + b²) / 4|b|, the centre c(1 − b²) / 4b to the left of the chord's middle. */
function curve(out: Outline, e: number, n: number, bulge: number): void {
  const { x, y } = out
  const dx = x[n]! - x[e]!
  const dy = y[n]! - y[e]!
  const lift = (1 - bulge * bulge) / (4 * bulge)
  out.cx[e] = (x[e]! + x[n]!) / 2 - dy * lift
  out.cy[e] = (y[e]! + y[n]!) / 2 + dx * lift
  out.radius[e] = (Math.hypot(dx, dy) * (1 + bulge * bulge)) / (4 * Math.abs(bulge))
  out.sweep[e] = 4 * Math.atan(bulge)
  out.arc[e] = 1
}

/** Closed loops of segments as they are, whichever way they run. */
export function outlineOfLoops(loops: readonly Loop[]): Outline {
  const hasArcs = loops.some((loop) => loop.some(({ kind }) => kind === 'arc'))
  const out = emptyOutline(loops, hasArcs)
  let i = 0
  for (const loop of loops) {
    for (const segment of loop) {
      out.x[i] = segment.from.x
      out.y[i] = segment.from.y
      if (segment.kind === 'arc') {
        out.arc[i] = 1
        out.cx[i] = segment.centre.x
        out.cy[i] = segment.centre.y
        out.radius[i] = segment.radius
        out.sweep[i] = segment.sweep
      }
      i++
    }
  }
  return out
}

function emptyOutline(loops: readonly { readonly length: number }[], hasArcs: boolean): Outline {
  const loopStart = new Int32Array(loops.length + 1)
  loops.forEach(({ length }, l) => (loopStart[l + 1] = loopStart[l]! + length))
  const count = loopStart[loops.length]!
  const next = new Int32Array(count)
  for (let e = 0; e < count; e++) next[e] = e + 1
  for (let l = 0; l < loops.length; l++) if (loops[l]!.length > 0) next[loopStart[l + 1]! - 1] = loopStart[l]!
  const [x, y] = [new Float64Array(count), new Float64Array(count)]
  const arc = new Uint8Array(count)
  // Without arcs one column of zeros stands for all that only arcs have.
  const zeros = hasArcs ? null : new Float64Array(count)
  const ofArcs = () => zeros ?? new Float64Array(count)
  const [cx, cy, radius, sweep] = [ofArcs(), ofArcs(), ofArcs(), ofArcs()]
  return { count, loopStart, next, x, y, arc, cx, cy, radius, sweep, hasArcs }
}

function turnRound(outline: Outline, l: number): void {
  const [first, end] = [outline.loopStart[l]!, outline.loopStart[l + 1]!]
  for (const corner of [outline.x, outline.y]) corner.subarray(first + 1, end).reverse()
  if (!outline.hasArcs) return
  for (const edge of [outline.arc, outline.cx, outline.cy, outline.radius, outline.sweep])
    edge.subarray(first, end).reverse()
  for (let e = first; e < end; e++) if (outline.arc[e]) outline.sweep[e] = -outline.sweep[e]!
}

/** Signed area, mm²: chords about the first corner, then the caps of arcs. */
export function loopArea({ loopStart, next, x, y, arc, radius, sweep, hasArcs }: Outline, l: number): number {
  const [first, end] = [loopStart[l]!, loopStart[l + 1]!]
  const ox = x[first]!
  const oy = y[first]!
  let twice = 0
  let ax = 0
  let ay = 0
  for (let e = first; e < end; e++) {
    const n = next[e]!
    const bx = x[n]! - ox
    const by = y[n]! - oy
    twice += ax * by - ay * bx
    if (hasArcs && arc[e]) twice += radius[e]! * radius[e]! * capFactor(sweep[e]!)
    ax = bx
    ay = by
  }
  return twice / 2
}

/** Smallest box round the edges first ≤ e < end; of none, an inside-out box of infinities. */
export function outlineBounds(outline: Outline, first = 0, end = outline.count): Bounds {
  const { x, y, arc, hasArcs } = outline
  let minX = Infinity
  let minY = Infinity
  let maxX = -Infinity
  let maxY = -Infinity
  for (let e = first; e < end; e++) {
    const px = x[e]!
    const py = y[e]!
    if (px < minX) minX = px
    if (px > maxX) maxX = px
    if (py < minY) minY = py
    if (py > maxY) maxY = py
    if (!hasArcs || !arc[e]) continue
    const box = segmentBounds(segmentAt(outline, e))
    minX = Math.min(minX, box.minX)
    minY = Math.min(minY, box.minY)
    maxX = Math.max(maxX, box.maxX)
    maxY = Math.max(maxY, box.maxY)
  }
  return { minX, minY, maxX, maxY }
}

export function segmentAt({ next, x, y, arc, cx, cy, radius, sweep }: Outline, e: number): Segment {
  const n = next[e]!
  const from = { x: x[e]!, y: y[e]! }
  const to = { x: x[n]!, y: y[n]! }
  if (!arc[e]) return { kind: 'line', from, to }
  return { kind: 'arc', from, to, centre: { x: cx[e]!, y: cy[e]! }, radius: radius[e]!, sweep: sweep[e]! }
}

export function loopsOf(outline: Outline): Loop[] {
  const { loopStart } = outline
  return Array.from({ length: loopStart.length - 1 }, (_, l) =>
    Array.from({ length: loopStart[l + 1]! - loopStart[l]! }, (_, e) =>
      segmentAt(outline, loopStart[l]! + e),
    ),
  )
}

/** Loop of an edge. */
export function loopOfEdge({ loopStart }: Outline, e: number): number {
  let [low, high] = [0, loopStart.length - 1]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (loopStart[middle]! <= e) low = middle
    else high = middle
  }
  return low
}
