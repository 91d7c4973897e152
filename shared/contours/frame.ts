import { outlineBounds, outlineOfLoops, segmentAt, type Outline } from '../geometry/outline.ts'
import { roundingOf } from '../geometry/rounding.ts'
import type { Segment } from '../geometry/types.ts'
import { branchOf, type Branch } from './branch.ts'
import { levelsOfWalls } from '../walls/levels.ts'
import type { Body } from '../walls/types.ts'
import { sameOffsets, wallTable, type WallTable } from '../walls/wall-table.ts'

/**
 * A body compiled into flat arrays: everything about edges and corners that does not depend on depth. Edges
 * are numbered through all loops (`g`); corner g is where edge g starts.
 */
export interface Frame {
  readonly body: Body
  readonly outline: Outline
  readonly table: WallTable
  /** The depths between which no wall changes tilt: 0, every facet end within the plate, the thickness; rising. */
  readonly levels: readonly number[]
  /** What arithmetic may have done to a coordinate, mm: pieces nearer than this touch (see `roundingOf`). */
  readonly near: number
  readonly count: number
  /** Loop l has the edges loopStart[l] up to loopStart[l + 1]. */
  readonly loopStart: Int32Array
  readonly loopOf: Int32Array
  /** Number of each edge within its loop. */
  readonly edgeOf: Int32Array
  readonly previous: Int32Array
  readonly next: Int32Array
  /** Made when first asked for. */
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
  /** Length of each edge in the drawing. */
  readonly length: Float64Array
  /** Sine and cosine of the tangent's turn at each corner, left positive. */
  readonly turnSin: Float64Array
  readonly turnCos: Float64Array
  /** The turn itself, (−π, π]; made when first asked for. */
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
  readonly hasSpikes: boolean
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
const STRAIGHT_SIN = Math.sin(STRAIGHT_TURN)

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
const SPIKE_SIN = Math.sin(1e-6)

const frames = new WeakMap<Body, Frame>()

/** The compiled body; bodies never change, so each is compiled once. */
export function frameOf(body: Body): Frame {
  return frames.get(body) ?? frameFrom(body, outlineOfLoops(body.loops), wallTable(body))
}

/** Compiles a body whose outline and walls are at hand in columns already. */
export function frameFrom(body: Body, outline: Outline, table: WallTable): Frame {
  const frame = compile(body, outline, table)
  frames.set(body, frame)
  return frame
}

function compile(body: Body, outline: Outline, table: WallTable): Frame {
  const { count, loopStart } = outline
  const numbers = () => new Float64Array(count)
  const corners: Corners = {
    ux: numbers(),
    uy: numbers(),
    length: numbers(),
    turnSin: numbers(),
    turnCos: numbers(),
    mode: new Uint8Array(count),
  }
  const loopOf = new Int32Array(count)
  const edgeOf = new Int32Array(count)
  const previous = new Int32Array(count)
  for (let l = 0; l + 1 < loopStart.length; l++) {
    const first = loopStart[l]!
    const end = loopStart[l + 1]!
    for (let g = first; g < end; g++) {
      loopOf[g] = l
      edgeOf[g] = g - first
      previous[g] = g - 1
    }
    if (first < end) previous[first] = end - 1
  }
  for (let g = 0; g < count; g++) direct(outline, g, corners)
  let segments: readonly Segment[] | null = null
  const allSegments = () => (segments ??= Array.from({ length: count }, (_, g) => segmentAt(outline, g)))
  const branches = new Map<number, Branch>()
  let hasSteps = false
  let hasSpikes = false
  for (let g = 0; g < count; g++) {
    const p = previous[g]!
    const mode = turnCorner(outline, table, p, g, corners)
    corners.mode[g] = mode
    if (mode === CornerMode.branch) branches.set(g, branchOf(allSegments()[p]!, allSegments()[g]!))
    else if (mode === CornerMode.step) hasSteps = true
    else if (mode === CornerMode.spike) hasSpikes = true
  }
  const near = roundingOf(outlineBounds(outline))
  const levels = levelsOfWalls(table.walls, body.thickness)
  const drawn = {
    outline,
    near,
    loopOf,
    edgeOf,
    previous,
    corners,
    branches,
    hasSteps,
    hasSpikes,
    allSegments,
  }
  return new CompiledFrame(body, table, levels, drawn)
}

/**
 * The same frame with other walls, for whoever has seen to it that neither the levels nor the modes of corners change.
 * All columns that do not tell walls are shared.
 */
export function frameWithWalls(frame: Frame, body: Body, table: WallTable): Frame {
  if (!(frame instanceof CompiledFrame)) throw new Error('frames are compiled here alone')
  const rewalled = new CompiledFrame(body, table, frame.levels, frame.drawn)
  frames.set(body, rewalled)
  return rewalled
}

/** What of a frame does not depend on the walls, but for the difference between smooth corners and steps. */
interface Drawn {
  readonly outline: Outline
  readonly near: number
  readonly loopOf: Int32Array
  readonly edgeOf: Int32Array
  readonly previous: Int32Array
  readonly corners: Corners
  readonly branches: ReadonlyMap<number, Branch>
  readonly hasSteps: boolean
  readonly hasSpikes: boolean
  readonly allSegments: () => readonly Segment[]
}

/**
 * A class only so that the columns few ask for can be made late without slowing down all the others: accessors on
 * a plain object would turn it into a dictionary.
 */
class CompiledFrame implements Frame {
  readonly body: Body
  readonly outline: Outline
  readonly table: WallTable
  readonly levels: readonly number[]
  readonly near: number
  readonly count: number
  readonly loopStart: Int32Array
  readonly loopOf: Int32Array
  readonly edgeOf: Int32Array
  readonly previous: Int32Array
  readonly next: Int32Array
  readonly arc: Uint8Array
  readonly cx: Float64Array
  readonly cy: Float64Array
  readonly radius: Float64Array
  readonly sweep: Float64Array
  readonly px: Float64Array
  readonly py: Float64Array
  readonly ux: Float64Array
  readonly uy: Float64Array
  readonly length: Float64Array
  readonly turnSin: Float64Array
  readonly turnCos: Float64Array
  readonly mode: Uint8Array
  readonly branches: ReadonlyMap<number, Branch>
  readonly hasArcs: boolean
  readonly hasSteps: boolean
  readonly hasSpikes: boolean
  readonly drawn: Drawn
  private lateTurn: Float64Array | null = null
  private lateMitres: Mitres | null = null

  constructor(body: Body, table: WallTable, levels: readonly number[], drawn: Drawn) {
    const { outline, corners } = drawn
    this.body = body
    this.outline = outline
    this.table = table
    this.levels = levels
    this.near = drawn.near
    this.count = outline.count
    this.loopStart = outline.loopStart
    this.loopOf = drawn.loopOf
    this.edgeOf = drawn.edgeOf
    this.previous = drawn.previous
    this.next = outline.next
    this.arc = outline.arc
    this.cx = outline.cx
    this.cy = outline.cy
    this.radius = outline.radius
    this.sweep = outline.sweep
    this.px = outline.x
    this.py = outline.y
    this.ux = corners.ux
    this.uy = corners.uy
    this.length = corners.length
    this.turnSin = corners.turnSin
    this.turnCos = corners.turnCos
    this.mode = corners.mode
    this.branches = drawn.branches
    this.hasArcs = outline.hasArcs
    this.hasSteps = drawn.hasSteps
    this.hasSpikes = drawn.hasSpikes
    this.drawn = drawn
  }

  get segments(): readonly Segment[] {
    return this.drawn.allSegments()
  }

  get turn(): Float64Array {
    const { turnSin, turnCos } = this
    return (this.lateTurn ??= turnSin.map((sin, g) => Math.atan2(sin, turnCos[g]!)))
  }

  get mx(): Float64Array {
    return this.mitres.mx
  }

  get my(): Float64Array {
    return this.mitres.my
  }

  get kx(): Float64Array {
    return this.mitres.kx
  }

  get ky(): Float64Array {
    return this.mitres.ky
  }

  private get mitres(): Mitres {
    return (this.lateMitres ??= mitresOf(this.outline, this.previous, this.drawn.corners))
  }
}

type Corners = {
  readonly [column in 'ux' | 'uy' | 'length' | 'turnSin' | 'turnCos']: Float64Array
} & { readonly mode: Uint8Array }

type Mitres = { readonly [column in 'mx' | 'my' | 'kx' | 'ky']: Float64Array }

/** Direction in which an edge starts, and its length. */
function direct(outline: Outline, g: number, { ux, uy, length }: Corners): void {
  const { next, x, y, arc, cx, cy, radius, sweep } = outline
  const n = next[g]!
  if (arc[g]) {
    const way = Math.sign(sweep[g]!)
    const far = Math.hypot(x[g]! - cx[g]!, y[g]! - cy[g]!)
    ux[g] = (-way * (y[g]! - cy[g]!)) / far
    uy[g] = (way * (x[g]! - cx[g]!)) / far
    length[g] = radius[g]! * Math.abs(sweep[g]!)
    return
  }
  const dx = x[n]! - x[g]!
  const dy = y[n]! - y[g]!
  const chord = Math.sqrt(dx * dx + dy * dy)
  length[g] = chord
  ux[g] = chord === 0 ? dx : dx / chord
  uy[g] = chord === 0 ? dy : dy / chord
}

/** The turn from edge p to edge g, and the mode of the corner between them. */
function turnCorner(outline: Outline, table: WallTable, p: number, g: number, out: Corners): number {
  const { arc } = outline
  const { ux, uy } = out
  let ax = ux[p]!
  let ay = uy[p]!
  if (arc[p]) [ax, ay] = arcEnd(outline, p, g)
  const bx = ux[g]!
  const by = uy[g]!
  const sin = ax * by - ay * bx
  const cos = ax * bx + ay * by
  out.turnSin[g] = sin
  out.turnCos[g] = cos
  const lines = !arc[p] && !arc[g]
  const smooth = cos > 0 && Math.abs(sin) <= (lines ? STRAIGHT_SIN : Math.sin(tangentTurn(outline, p, g)))
  if (!smooth) {
    if (!lines) return CornerMode.branch
    return cos < 0 && Math.abs(sin) <= SPIKE_SIN ? CornerMode.spike : CornerMode.mitre
  }
  return sameOffsets(table, table.rowOfEdge[p]!, table.rowOfEdge[g]!) ? CornerMode.smooth : CornerMode.step
}

/** Direction in which arc p ends, at corner g. */
function arcEnd({ x, y, cx, cy, sweep }: Outline, p: number, g: number): [number, number] {
  const way = Math.sign(sweep[p]!)
  const far = Math.hypot(x[g]! - cx[p]!, y[g]! - cy[p]!)
  return [(-way * (y[g]! - cy[p]!)) / far, (way * (x[g]! - cx[p]!)) / far]
}

function mitresOf(outline: Outline, previous: Int32Array, corners: Corners): Mitres {
  const { count, arc } = outline
  const { ux, uy, turnSin, turnCos, mode } = corners
  const numbers = () => new Float64Array(count)
  const [mx, my, kx, ky] = [numbers(), numbers(), numbers(), numbers()]
  for (let g = 0; g < count; g++) {
    if (mode[g] === CornerMode.branch || mode[g] === CornerMode.spike) continue
    const p = previous[g]!
    const [ax, ay] = arc[p] ? arcEnd(outline, p, g) : [ux[p]!, uy[p]!]
    // m·n₁ = m·n₂ = 1: the sum of both normals over 1 + cos(turn), steady down to no turn at all.
    mx[g] = (ay + uy[g]!) / (1 + turnCos[g]!)
    my[g] = -(ax + ux[g]!) / (1 + turnCos[g]!)
    if (mode[g] !== CornerMode.mitre) continue
    kx[g] = ax / turnSin[g]!
    ky[g] = ay / turnSin[g]!
  }
  return { mx, my, kx, ky }
}

/** Turn below which neighbours, at least one of them an arc, count as tangent. */
function tangentTurn({ arc, radius }: Outline, p: number, g: number): number {
  const narrowest = Math.min(arc[p] ? radius[p]! : Infinity, arc[g] ? radius[g]! : Infinity)
  return Math.max(TANGENT_TURN, Math.min(SMALL_ARC_TURN, TANGENT_SHIFT / narrowest))
}
