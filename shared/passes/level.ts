import { branchPoint } from '../contours/branch.ts'
import { CornerMode, type Frame } from '../contours/frame.ts'
import type { Point } from '../geometry/types.ts'
import type { AxisTable } from './axis-table.ts'
import { seamLength } from './jet-lines.ts'
import type { Jet } from './types.ts'

/**
 * One pass level of a body: which facet of every edge the jet follows, and the jet at every corner. Level 0 has
 * the root facets; an edge without the level's facet stands in with its nearest, as the neighbour that a run of
 * bevelled edges ends against.
 */
export interface Level {
  readonly frame: Frame
  readonly axis: AxisTable
  readonly jet: Jet
  readonly level: number
  /** Per edge: the facet's place in the axis table; the facet counted from its wall's top; whether the level is its own. */
  readonly figure: Int32Array
  readonly facet: Uint8Array
  readonly member: Uint8Array
  /** Every edge has the level's facet for its own. */
  readonly whole: boolean
  /** Neighbours on the way of the axis: those of the frame, less the edges that the jet is too thick for. */
  readonly previous: Int32Array
  readonly next: Int32Array
  readonly gone: Uint8Array
  /** Whether any edge is gone. */
  readonly gaps: boolean
  /** Sine and cosine of the turn, and the kind, of every corner: the frame's, but where edges are gone. */
  readonly turnSin: Float64Array
  readonly turnCos: Float64Array
  readonly mode: Uint8Array
  /** The jet along the seam at corner g, in the columns of a jet path; at a step, the jet of the edge before. */
  readonly x: Float64Array
  readonly y: Float64Array
  readonly p: Float64Array
  readonly q: Float64Array
  /** 1 where no jet leaves both walls: the seam's own slope stands in. */
  readonly unfit: Uint8Array
}

export function makeLevel(frame: Frame, axis: AxisTable, jet: Jet, level: number): Level {
  const { count } = frame
  const numbers = () => new Float64Array(count)
  const out: Level = {
    frame,
    axis,
    jet,
    level,
    ...facetsOf(frame, axis, level),
    previous: frame.previous,
    next: frame.next,
    gone: new Uint8Array(count),
    gaps: false,
    turnSin: frame.turnSin,
    turnCos: frame.turnCos,
    mode: frame.mode,
    x: numbers(),
    y: numbers(),
    p: numbers(),
    q: numbers(),
    unfit: new Uint8Array(count),
  }
  fillCornerJets(out)
  return out
}

function facetsOf(
  { count, table }: Frame,
  axis: AxisTable,
  level: number,
): Pick<Level, 'figure' | 'facet' | 'member' | 'whole'> {
  const { rowOfEdge } = table
  const { firstFacet, root } = axis
  const facet = new Uint8Array(count)
  const member = new Uint8Array(count)
  // Walls of one facet each: a figure per row, and every edge has level 0 for its own.
  if (level === 0 && firstFacet.at(-1) === root.length) {
    return { figure: rowOfEdge, facet, member: member.fill(1), whole: true }
  }
  const figure = new Int32Array(count)
  let whole = true
  for (let g = 0; g < count; g++) {
    const row = rowOfEdge[g]!
    const first = firstFacet[row]!
    const last = firstFacet[row + 1]! - 1 - first
    const wished = root[row]! + level
    const own = wished < 0 ? 0 : wished > last ? last : wished
    facet[g] = own
    figure[g] = first + own
    if (own === wished) member[g] = 1
    else whole = false
  }
  return { figure, facet, member, whole }
}

/**
 * Works out the seam jets of all corners, in place. Between two lines a figure that is a along the outward normal
 * n₁ of the edge before and b along that of the edge after has (b − a)/sin φ + a·tan(φ/2) along the edge before.
 */
function fillCornerJets(level: Level): void {
  const { frame, axis, figure, mode, x, y, p, q, unfit } = level
  const { px, py, ux, uy, previous, turnSin, turnCos, count } = frame
  const sin = Math.sin(level.jet.taper)
  const { axis: axisBefore, tan: tanBefore, sec: secBefore } = axis.end
  const { axis: axisAfter, tan: tanAfter, sec: secAfter } = axis.start
  for (let g = 0; g < count; g++) {
    if (mode[g] !== CornerMode.mitre) {
      fillUnlikeCorner(level, g)
      continue
    }
    const e = previous[g]!
    const before = figure[e]!
    const after = figure[g]!
    const vx = ux[e]!
    const vy = uy[e]!
    const perSin = 1 / turnSin[g]!
    const half = turnSin[g]! / (1 + turnCos[g]!)
    const o = axisBefore[before]!
    const ahead = (axisAfter[after]! - o) * perSin + o * half
    x[g] = px[g]! + o * vy + ahead * vx
    y[g] = py[g]! + ahead * vy - o * vx
    let out = tanBefore[before]!
    let along = (tanAfter[after]! - out) * perSin + out * half
    if (sin !== 0) {
      const c = secBefore[before]!
      const d = (secAfter[after]! - c) * perSin + c * half
      const length = seamLength(sin, out, along, c, d)
      if (length === length) {
        out -= sin * length * c
        along -= sin * length * d
      } else unfit[g] = 1
    }
    p[g] = out * vy + along * vx
    q[g] = along * vy - out * vx
  }
}

function fillUnlikeCorner(level: Level, g: number): void {
  const { frame, axis, figure, x, y, p, q } = level
  const before = figure[frame.previous[g]!]!
  switch (level.mode[g]) {
    case CornerMode.branch:
      branchJet(level, g, before, figure[g]!)
      return
    case CornerMode.spike:
      x[g] = frame.px[g]!
      y[g] = frame.py[g]!
      level.unfit[g] = 1
      return
    default: {
      // Smooth and step: square to the edge before.
      const top = cornerAt(frame, g, axis.end.axis[before]!, axis.end.axis[before]!)
      const unit = cornerShift(frame, g, 1, 1)
      x[g] = top.x
      y[g] = top.y
      p[g] = axis.end.slope[before]! * unit.x
      q[g] = axis.end.slope[before]! * unit.y
    }
  }
}

/**
 * Beside an arc the seam is bent. The straight jet that stands in for it meets the axes' curves at the top face
 * and at the bottom.
 */
function branchJet(level: Level, g: number, before: number, after: number): void {
  const { frame, axis, x, y, p, q } = level
  const branch = frame.branches.get(g)!
  const t = frame.body.thickness
  const o1 = axis.end.axis[before]!
  const o2 = axis.start.axis[after]!
  const top = branchPoint(branch, o1, o2)
  const bottom = branchPoint(branch, o1 + t * axis.end.slope[before]!, o2 + t * axis.start.slope[after]!)
  x[g] = top.x
  y[g] = top.y
  p[g] = (bottom.x - top.x) / t
  q[g] = (bottom.y - top.y) / t
}

/** Signed turn at corner g, radians, left positive. */
export function turnAt({ turnSin, turnCos }: Level, g: number): number {
  return Math.atan2(turnSin[g]!, turnCos[g]!)
}

/** Where the two facets at a corner, prolonged to the top face, meet there. */
export function wallCorner(level: Level, g: number): Point {
  return wallCornerAt(level, g, 0)
}

/** The same at a depth, mm. */
export function wallCornerAt(level: Level, g: number, depth: number): Point {
  const { axis, figure, previous } = level
  const [before, after] = [figure[previous[g]!]!, figure[g]!]
  const o1 = axis.end.wall[before]! + depth * axis.end.tan[before]!
  const o2 = axis.start.wall[after]! + depth * axis.start.tan[after]!
  return cornerAt(level.frame, g, o1, o2)
}

/** Corner g when the edge before it stands at offset o1 and its own at o2; at a step, the end of the edge before. */
export function cornerAt(frame: Frame, g: number, o1: number, o2: number): Point {
  if (frame.mode[g] === CornerMode.branch) return branchPoint(frame.branches.get(g)!, o1, o2)
  const { x, y } = cornerShift(frame, g, o1, o2)
  return { x: frame.px[g]! + x, y: frame.py[g]! + y }
}

/** By how much a corner that is no branch moves from the drawing. */
function cornerShift(frame: Frame, g: number, o1: number, o2: number): Point {
  if (frame.mode[g] === CornerMode.spike) return { x: 0, y: 0 }
  const e = frame.previous[g]!
  const sin = frame.turnSin[g]!
  // Between lines without the frame's mitre vectors, which are only made for those who need them all.
  if (frame.arc[e] || frame.arc[g]) return { x: o1 * frame.mx[g]!, y: o1 * frame.my[g]! }
  const unlike = frame.mode[g] === CornerMode.mitre ? (o2 - o1) / sin : 0
  const ahead = unlike + (o1 * sin) / (1 + frame.turnCos[g]!)
  const ux = frame.ux[e]!
  const uy = frame.uy[e]!
  return { x: o1 * uy + ahead * ux, y: ahead * uy - o1 * ux }
}
