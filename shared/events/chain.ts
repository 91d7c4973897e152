import type { EdgeEnds } from '../walls/wall-table.ts'
import { startAngle } from '../geometry/segment.ts'
import { branchPoint, branchRange, branchStray, type Branch, type BranchRange } from '../contours/branch.ts'
import { CornerMode, makePlaces, place, radiusAt, sweepAt, type Frame } from '../contours/frame.ts'

/**
 * The contour as a closed chain of moving pieces: edges and the steps between them. Piece e runs from point e
 * to point next[e]. Within a band (no wall changes tilt) lines move evenly and radii change evenly; points do
 * so too, except where an arc meets a neighbour at an angle (`bent` points).
 */
export interface Chain {
  readonly frame: Frame
  readonly count: number
  readonly kind: Uint8Array
  /** The edge, or for a step the edge after it. */
  readonly edge: Int32Array
  readonly next: Int32Array
  readonly previous: Int32Array
  /** Unit direction of a line or step. */
  readonly ux: Float64Array
  readonly uy: Float64Array
  /** Branch of a bent point. */
  readonly bent: readonly (Branch | undefined)[]
}

export const PieceKind = { line: 0, arc: 1, step: 2 } as const

/** Loops are taken in the given order; pieces of one loop follow one another. */
export function chainOf(frame: Frame, loopOrder: readonly number[]): Chain {
  const steps = frame.hasSteps
    ? frame.mode.reduce((sum, mode) => sum + (mode === CornerMode.step ? 1 : 0), 0)
    : 0
  const count = frame.count + steps
  const kind = new Uint8Array(count)
  const edge = new Int32Array(count)
  const next = new Int32Array(count)
  const previous = new Int32Array(count)
  const ux = new Float64Array(count)
  const uy = new Float64Array(count)
  const bent: (Branch | undefined)[] = new Array<Branch | undefined>(count).fill(undefined)
  let e = 0
  for (const loop of loopOrder) {
    const first = e
    for (let g = frame.loopStart[loop]!; g < frame.loopStart[loop + 1]!; g++) {
      if (frame.mode[g] === CornerMode.step) {
        const size = Math.hypot(frame.mx[g]!, frame.my[g]!)
        kind[e] = PieceKind.step
        edge[e] = g
        ux[e] = frame.mx[g]! / size
        uy[e] = frame.my[g]! / size
        e++
      }
      edge[e] = g
      if (frame.arc[g]) {
        kind[e] = PieceKind.arc
      } else {
        ux[e] = frame.ux[g]!
        uy[e] = frame.uy[g]!
      }
      bent[e] = frame.branches.get(g)
      e++
    }
    for (let i = first; i < e; i++) {
      next[i] = i === e - 1 ? first : i + 1
      previous[i] = i === first ? e - 1 : i - 1
    }
  }
  return { frame, count, kind, edge, next, previous, ux, uy, bent }
}

/** A chain over one stretch of its march; `t` runs from 0 to `length`, mm of depth (or a share, while morphing). */
export interface March {
  readonly chain: Chain
  readonly length: number
  /** Per edge: offset at t = 0 and its change per unit of t. */
  readonly offset: EdgeEnds
  readonly rate: EdgeEnds
  /** Per piece: its first point at t = 0 and the point's velocity (bent points: the place only). */
  readonly x: Float64Array
  readonly y: Float64Array
  readonly vx: Float64Array
  readonly vy: Float64Array
  /** Per piece that is an arc: radius and its change, start heading and sweep at t = 0. */
  readonly radius: Float64Array
  readonly radiusRate: Float64Array
  readonly sweep: Float64Array
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
  for (let e = 0; e < count; e++) {
    const g = edge[e]!
    const p = frame.previous[g]!
    const isStep = kind[e] === PieceKind.step
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
    if (kind[e] === PieceKind.arc) {
      radius[e] = radiusAt(frame, g, offset.start[g]!)
      radiusRate[e] = Math.sign(frame.sweep[g]!) * w2
      sweep[e] = sweepAt(frame, g, places)
    }
  }
  return { chain, length, offset, rate, x, y, vx, vy, radius, radiusRate, sweep }
}

export function pointX(march: March, e: number, t: number): number {
  return march.chain.bent[e] ? bentPoint(march, e, t).x : march.x[e]! + t * march.vx[e]!
}

export function pointY(march: March, e: number, t: number): number {
  return march.chain.bent[e] ? bentPoint(march, e, t).y : march.y[e]! + t * march.vy[e]!
}

function bentPoint({ chain, offset, rate }: March, e: number, t: number) {
  const g = chain.edge[e]!
  const p = chain.frame.previous[g]!
  return branchPoint(chain.bent[e]!, offset.end[p]! + t * rate.end[p]!, offset.start[g]! + t * rate.start[g]!)
}

/** How far point e can be, between two moments, from where it is half-way between them, mm. */
export function pointStray(march: March, e: number, from: number, to: number): number {
  const branch = march.chain.bent[e]
  if (!branch) return (Math.hypot(march.vx[e]!, march.vy[e]!) * (to - from)) / 2
  return branchStray(branch, ...offsetSpans(march, e, from, to))
}

export function bentRange(march: March, e: number, branch: Branch, from: number, to: number): BranchRange {
  return branchRange(branch, ...offsetSpans(march, e, from, to))
}

function offsetSpans({ chain, offset, rate }: March, e: number, from: number, to: number) {
  const g = chain.edge[e]!
  const p = chain.frame.previous[g]!
  return [
    [offset.end[p]! + from * rate.end[p]!, offset.end[p]! + to * rate.end[p]!],
    [offset.start[g]! + from * rate.start[g]!, offset.start[g]! + to * rate.start[g]!],
  ] as const
}

/** Centre of a piece that is an arc. */
export function centreOf(chain: Chain, e: number) {
  const segment = chain.frame.segments[chain.edge[e]!]!
  if (segment.kind !== 'arc') throw new Error('a line has no centre')
  return segment.centre
}

/** Signed included angle of an arc piece at a moment. */
export function sweepOf(march: March, e: number, t: number): number {
  const { chain } = march
  const following = chain.next[e]!
  if (!chain.bent[e] && !chain.bent[following]) return march.sweep[e]!
  const { x: cx, y: cy } = centreOf(chain, e)
  const turn = (i: number) => {
    if (!chain.bent[i]) return 0
    const ax = march.x[i]! - cx
    const ay = march.y[i]! - cy
    const bx = pointX(march, i, t) - cx
    const by = pointY(march, i, t) - cy
    return Math.atan2(ax * by - ay * bx, ax * bx + ay * by)
  }
  return march.sweep[e]! + turn(following) - turn(e)
}

/** Heading of the drawing's arc start: where smooth ends stay. */
export function drawnStart(chain: Chain, e: number): number {
  const segment = chain.frame.segments[chain.edge[e]!]!
  return segment.kind === 'arc' ? startAngle(segment) : 0
}
