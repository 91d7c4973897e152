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
  /** Neighbours on the way of the axis: those of the frame, less the edges that the jet is too thick for. */
  readonly previous: Int32Array
  readonly next: Int32Array
  readonly gone: Uint8Array
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
  const { count, table } = frame
  const figure = new Int32Array(count)
  const facet = new Uint8Array(count)
  const member = new Uint8Array(count)
  for (let g = 0; g < count; g++) {
    const row = table.rowOfEdge[g]!
    const first = axis.firstFacet[row]!
    const last = axis.firstFacet[row + 1]! - 1 - first
    const wished = axis.root[row]! + level
    facet[g] = wished < 0 ? 0 : wished > last ? last : wished
    member[g] = facet[g] === wished ? 1 : 0
    figure[g] = first + facet[g]!
  }
  const numbers = () => new Float64Array(count)
  const out: Level = {
    frame,
    axis,
    jet,
    level,
    figure,
    facet,
    member,
    previous: frame.previous,
    next: frame.next,
    gone: new Uint8Array(count),
    turnSin: frame.turnSin,
    turnCos: frame.turnCos,
    mode: frame.mode,
    x: numbers(),
    y: numbers(),
    p: numbers(),
    q: numbers(),
    unfit: new Uint8Array(count),
  }
  fillCornerJets(out, 0, count)
  return out
}

/** Works out the seam jets of corners from ≤ g < to, in place. */
export function fillCornerJets(level: Level, from: number, to: number): void {
  const { frame, axis, figure, previous, mode, x, y, p, q, unfit } = level
  const { px, py, mx, my, kx, ky } = frame
  const sin = Math.sin(level.jet.taper)
  const { start, end } = axis
  for (let g = from; g < to; g++) {
    const before = figure[previous[g]!]!
    const after = figure[g]!
    const o1 = end.axis[before]!
    unfit[g] = 0
    switch (mode[g]) {
      case CornerMode.mitre: {
        const o = start.axis[after]! - o1
        x[g] = px[g]! + o1 * mx[g]! + o * kx[g]!
        y[g] = py[g]! + o1 * my[g]! + o * ky[g]!
        const w1 = end.tan[before]!
        const w = start.tan[after]! - w1
        const ax = w1 * mx[g]! + w * kx[g]!
        const ay = w1 * my[g]! + w * ky[g]!
        if (sin === 0) {
          p[g] = ax
          q[g] = ay
          break
        }
        const c1 = end.sec[before]!
        const c = start.sec[after]! - c1
        const bx = c1 * mx[g]! + c * kx[g]!
        const by = c1 * my[g]! + c * ky[g]!
        const length = seamLength(sin, ax, ay, bx, by)
        if (Number.isNaN(length)) {
          unfit[g] = 1
          p[g] = ax
          q[g] = ay
          break
        }
        p[g] = ax - sin * length * bx
        q[g] = ay - sin * length * by
        break
      }
      case CornerMode.branch:
        branchJet(level, g, before, after)
        break
      case CornerMode.spike:
        x[g] = px[g]!
        y[g] = py[g]!
        p[g] = q[g] = 0
        unfit[g] = 1
        break
      default: // smooth and step: square to the edge before
        x[g] = px[g]! + o1 * mx[g]!
        y[g] = py[g]! + o1 * my[g]!
        p[g] = end.slope[before]! * mx[g]!
        q[g] = end.slope[before]! * my[g]!
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
  const branch = frame.branches.get(g)
  if (branch) return branchPoint(branch, o1, o2)
  const o = frame.mode[g] === CornerMode.mitre ? o2 - o1 : 0
  return {
    x: frame.px[g]! + o1 * frame.mx[g]! + o * frame.kx[g]!,
    y: frame.py[g]! + o1 * frame.my[g]! + o * frame.ky[g]!,
  }
}
