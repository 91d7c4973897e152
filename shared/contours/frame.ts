import { endTangent, startTangent } from '../geometry/segment.ts'
import type { Segment } from '../geometry/types.ts'
import { branchOf, branchPoint, type Branch } from './branch.ts'
import type { Body } from '../walls/types.ts'
import { sameOffsets, wallTable, type EdgeEnds, type WallTable } from '../walls/wall-table.ts'

/**
 * A body compiled into flat arrays: everything about edges and corners that does not depend on depth. Edges
 * are numbered through all loops (`g`); corner g is where edge g starts.
 */
export interface Frame {
  readonly body: Body
  readonly table: WallTable
  readonly count: number
  /** Loop l has the edges loopStart[l] up to loopStart[l + 1]. */
  readonly loopStart: Int32Array
  readonly loopOf: Int32Array
  /** Number of each edge within its loop. */
  readonly edgeOf: Int32Array
  readonly previous: Int32Array
  readonly next: Int32Array
  readonly segments: readonly Segment[]
  /** 1 where the edge is an arc; its centre, radius and signed sweep (0 for lines). */
  readonly arc: Uint8Array
  readonly cx: Float64Array
  readonly cy: Float64Array
  readonly radius: Float64Array
  readonly sweep: Float64Array
  readonly px: Float64Array
  readonly py: Float64Array
  /** Unit direction in which each edge starts. */
  readonly ux: Float64Array
  readonly uy: Float64Array
  /** Signed turn of the tangent at each corner, (−π, π], left positive. */
  readonly turn: Float64Array
  readonly mode: Uint8Array
  /** The corner's displacement per unit of offset (mitre vector), and per unit of unlike offset (mitres only). */
  readonly mx: Float64Array
  readonly my: Float64Array
  readonly kx: Float64Array
  readonly ky: Float64Array
  /** For corners of mode `branch`. */
  readonly branches: ReadonlyMap<number, Branch>
  readonly hasArcs: boolean
  readonly hasSteps: boolean
}

export const CornerMode = {
  /** Two lines at an angle: linear in both offsets. */
  mitre: 0,
  /** Tangent neighbours at the same offset: along the normal. */
  smooth: 1,
  /** Tangent neighbours whose offsets differ at some depth: each moves along the normal, a step lies between. */
  step: 2,
  /** At an angle, with an arc. */
  branch: 3,
  /** Two lines that double back on each other: nothing right can be said, it does not move. */
  spike: 4,
} as const

/**
 * Two lines that turn by less than this are in line, radians: 0.1 mm in a metre, what a drawing written to
 * 1e-4 mm says about an edge of 1 mm. Anything more is taken as meant, however far its seam then leans.
 */
export const STRAIGHT_TURN = 1e-4

/**
 * Neighbours of which one is an arc are tangent below this turn, radians: 10′, the tightest angle class of
 * ISO 13920 (A, from memory). An arc's ends are rounded, so that tangents are never exact, and a corner taken at its word
 * ends the body in the first micrometres of depth, where the line leaves the circle. The corner moves along
 * its mitre normal: exactly on lines, off the circle by at most (offset × turn)² / 8r.
 */
export const TANGENT_TURN = Math.PI / 1080

/**
 * On small arcs rounding turns the tangent further: tangent too, where moving the corner by this along would
 * make it so, mm (the gap that a drawing's reading joins unasked) ...
 */
const TANGENT_SHIFT = 0.01

/** ... but never past this turn, radians: 1°, the general tolerance of ISO 2768-1 on sides up to 10 mm (from memory). */
const SMALL_ARC_TURN = Math.PI / 180

/** Lines within this of doubling back form a spike, radians: their mitre would lie a million offsets away. */
const SPIKE_TURN = Math.PI - 1e-6

const frames = new WeakMap<Body, Frame>()

/** The compiled body; bodies never change, so each is compiled once. */
export function frameOf(body: Body): Frame {
  let frame = frames.get(body)
  if (!frame) {
    frame = compile(body)
    frames.set(body, frame)
  }
  return frame
}

function compile(body: Body): Frame {
  const table = wallTable(body)
  const count = table.rowOfEdge.length
  const loopStart = new Int32Array(body.loops.length + 1)
  const loopOf = new Int32Array(count)
  const edgeOf = new Int32Array(count)
  const previous = new Int32Array(count)
  const next = new Int32Array(count)
  const segments: Segment[] = []
  for (const [l, loop] of body.loops.entries()) {
    const start = segments.length
    for (const segment of loop) {
      const g = segments.push(segment) - 1
      loopOf[g] = l
      edgeOf[g] = g - start
      previous[g] = g - 1
      next[g] = g + 1
    }
    if (loop.length > 0) {
      previous[start] = segments.length - 1
      next[segments.length - 1] = start
    }
    loopStart[l + 1] = segments.length
  }
  const numbers = () => new Float64Array(count)
  const [px, py, ux, uy, turn] = [numbers(), numbers(), numbers(), numbers(), numbers()]
  const [mx, my, kx, ky] = [numbers(), numbers(), numbers(), numbers()]
  const arc = new Uint8Array(count)
  const [cx, cy, radius, sweep] = [numbers(), numbers(), numbers(), numbers()]
  const mode = new Uint8Array(count)
  const branches = new Map<number, Branch>()
  let hasArcs = false
  let hasSteps = false
  for (let g = 0; g < count; g++) {
    const direction = startTangent(segments[g]!)
    ux[g] = direction.x
    uy[g] = direction.y
  }
  for (let g = 0; g < count; g++) {
    const p = previous[g]!
    const after = segments[g]!
    const before = segments[p]!
    px[g] = after.from.x
    py[g] = after.from.y
    if (after.kind === 'arc') {
      hasArcs = true
      arc[g] = 1
      cx[g] = after.centre.x
      cy[g] = after.centre.y
      radius[g] = after.radius
      sweep[g] = after.sweep
    }
    const end = before.kind === 'arc' ? endTangent(before) : null
    const ax = end ? end.x : ux[p]!
    const ay = end ? end.y : uy[p]!
    const bx = ux[g]!
    const by = uy[g]!
    const sin = ax * by - ay * bx
    const cos = ax * bx + ay * by
    const phi = Math.atan2(sin, cos)
    turn[g] = phi
    const lines = before.kind === 'line' && after.kind === 'line'
    const smooth = Math.abs(phi) <= (lines ? STRAIGHT_TURN : tangentTurn(before, after))
    if (!smooth && !lines) {
      mode[g] = CornerMode.branch
      branches.set(g, branchOf(before, after))
      continue
    }
    if (Math.abs(phi) >= SPIKE_TURN) {
      mode[g] = CornerMode.spike
      continue
    }
    // m·n₁ = m·n₂ = 1: the sum of both normals over 1 + cos(turn), steady down to no turn at all.
    mx[g] = (ay + by) / (1 + cos)
    my[g] = -(ax + bx) / (1 + cos)
    if (!smooth) {
      mode[g] = CornerMode.mitre
      kx[g] = ax / sin
      ky[g] = ay / sin
    } else if (sameOffsets(table, table.rowOfEdge[p]!, table.rowOfEdge[g]!)) {
      mode[g] = CornerMode.smooth
    } else {
      mode[g] = CornerMode.step
      hasSteps = true
    }
  }
  return {
    body,
    table,
    count,
    loopStart,
    loopOf,
    edgeOf,
    previous,
    next,
    segments,
    arc,
    cx,
    cy,
    radius,
    sweep,
    px,
    py,
    ux,
    uy,
    turn,
    mode,
    mx,
    my,
    kx,
    ky,
    branches,
    hasArcs,
    hasSteps,
  }
}

/** Turn below which neighbours, at least one of them an arc, count as tangent. */
function tangentTurn(before: Segment, after: Segment): number {
  const radius = Math.min(
    before.kind === 'arc' ? before.radius : Infinity,
    after.kind === 'arc' ? after.radius : Infinity,
  )
  return Math.max(TANGENT_TURN, Math.min(SMALL_ARC_TURN, TANGENT_SHIFT / radius))
}

/** Ends of every edge at some offsets: edge g runs from (sx, sy)[g] to (ex, ey)[g]. */
export interface Places {
  readonly sx: Float64Array
  readonly sy: Float64Array
  readonly ex: Float64Array
  readonly ey: Float64Array
}

export function makePlaces(count: number): Places {
  return {
    sx: new Float64Array(count),
    sy: new Float64Array(count),
    ex: new Float64Array(count),
    ey: new Float64Array(count),
  }
}

/** Places every corner for the given offset of each edge from the drawing, at its two ends. */
export function place(frame: Frame, offsets: EdgeEnds, out: Places): void {
  const { count, previous, px, py, mode, mx, my, kx, ky, branches } = frame
  const { sx, sy, ex, ey } = out
  for (let g = 0; g < count; g++) {
    const p = previous[g]!
    const o1 = offsets.end[p]!
    const o2 = offsets.start[g]!
    let x = px[g]!
    let y = py[g]!
    switch (mode[g]) {
      case CornerMode.mitre:
        x += o1 * mx[g]! + (o2 - o1) * kx[g]!
        y += o1 * my[g]! + (o2 - o1) * ky[g]!
        break
      case CornerMode.smooth:
        x += o1 * mx[g]!
        y += o1 * my[g]!
        break
      case CornerMode.step:
        ex[p] = x + o1 * mx[g]!
        ey[p] = y + o1 * my[g]!
        sx[g] = x + o2 * mx[g]!
        sy[g] = y + o2 * my[g]!
        continue
      case CornerMode.branch: {
        // At rest a corner is where the drawing has it, to the bit.
        if (o1 !== 0 || o2 !== 0) ({ x, y } = branchPoint(branches.get(g)!, o1, o2))
        break
      }
      default: // a spike stays
    }
    ex[p] = sx[g] = x
    ey[p] = sy[g] = y
  }
}

/** Radius of an arc edge at an offset, mm; negative past its vanishing. */
export function radiusAt(frame: Frame, g: number, offset: number): number {
  return frame.arc[g] ? frame.radius[g]! + Math.sign(frame.sweep[g]!) * offset : 0
}

/**
 * Sweep of an arc edge when its ends are placed: the drawing's between smooth corners; otherwise each end has
 * turned by less than half a turn about the centre (a corner never crosses its axis).
 */
export function sweepAt(frame: Frame, g: number, places: Places): number {
  const segment = frame.segments[g]!
  if (segment.kind === 'line') return 0
  const { from, to, centre } = segment
  let sweep = segment.sweep
  if (frame.mode[g] === CornerMode.branch) {
    sweep -= turnAbout(
      from.x - centre.x,
      from.y - centre.y,
      places.sx[g]! - centre.x,
      places.sy[g]! - centre.y,
    )
  }
  if (frame.mode[frame.next[g]!] === CornerMode.branch) {
    sweep += turnAbout(to.x - centre.x, to.y - centre.y, places.ex[g]! - centre.x, places.ey[g]! - centre.y)
  }
  return sweep
}

function turnAbout(ax: number, ay: number, bx: number, by: number): number {
  return Math.atan2(ax * by - ay * bx, ax * bx + ay * by)
}
