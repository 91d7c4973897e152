import { BOX_STRIDE } from './boxes.ts'
import { chainTree, visitPairs, type MovingChain } from './chain-tree.ts'
import { rayCrossings } from './inside.ts'
import { commonPoint, commonPointBesideCorner } from './intersect.ts'
import { loopLength } from './loop.ts'
import { advanceOf, LEAST_ADVANCE } from './one-way.ts'
import { nearbyOrder } from './order.ts'
import { loopArea, loopOfEdge, outlineBounds, outlineOfLoops, segmentAt, type Outline } from './outline.ts'
import { roundingOf } from './rounding.ts'
import { segmentBounds } from './segment.ts'
import type { Bounds, Loop, Point } from './types.ts'

/** What can be wrong with a profile. */
export type ProfileProblemCode =
  /** No loop, or a loop of fewer than two edges. */
  | 'too-few-edges'
  /** A coordinate is not a finite number. */
  | 'not-finite'
  | 'zero-edge'
  /** The edge does not end where the next one starts. */
  | 'open'
  /** Two edges of a loop touch, cross or lie on each other other than at their corner. */
  | 'crosses-itself'
  /** Edges of two loops touch or cross. */
  | 'loops-cross'
  /** A hole that lies outside the outer loop. */
  | 'hole-outside'
  /** A hole within another hole. */
  | 'hole-in-hole'
  /** A loop that goes out and back over itself. */
  | 'no-area'
  /** The outer loop clockwise, or a hole counter-clockwise. */
  | 'wrong-orientation'

/** Loops and edges are counted from 0; loop 0 is the outer one. */
export interface ProfileProblem {
  readonly code: ProfileProblemCode
  readonly loop: number
  readonly edge: number | null
  readonly other: { readonly loop: number; readonly edge: number | null } | null
  readonly at: Point | null
}

/**
 * Every problem of the profile, by loop, then edge; empty when it is sound. Where single edges are unusable
 * the search ends with them. Edges that come nearer than rounding (see `roundingOf`) count as touching.
 */
export function profileProblems(loops: readonly Loop[]): ProfileProblem[] {
  const outline = outlineOfLoops(loops)
  const broken = [...edgeProblems(outline), ...openEnds(loops)].sort(byPlace)
  if (broken.length > 0) return broken
  const within = roundingOf(outlineBounds(outline))
  const areas = loops.map((_, l) => loopArea(outline, l))
  return shapeProblems(outline, areas, within, meetingsAtRest(outline, within))
}

/** What is wrong with single edges or their count; the rest of the search needs an outline without. */
export function edgeProblems(outline: Outline): ProfileProblem[] {
  const { loopStart, next, x, y, arc, radius } = outline
  const problems: ProfileProblem[] = []
  const add = (code: ProfileProblemCode, loop: number, edge: number | null, at: Point | null) =>
    problems.push({ code, loop, edge, other: null, at })
  const loops = loopStart.length - 1
  if (loops === 0) add('too-few-edges', 0, null, null)
  for (let l = 0; l < loops; l++) {
    const first = loopStart[l]!
    const end = loopStart[l + 1]!
    const from = first < end ? { x: x[first]!, y: y[first]! } : null
    if (end - first < 2) add('too-few-edges', l, null, from)
    for (let i = first; i < end; i++) {
      const n = next[i]!
      // A difference of two coordinates is finite only if both are (they are far from the largest number).
      const dx = x[n]! - x[i]!
      const dy = y[n]! - y[i]!
      if (!(Math.abs(dx) + Math.abs(dy) < Infinity)) add('not-finite', l, i - first, null)
      else if (arc[i] && !(radius[i]! < Infinity)) add('not-finite', l, i - first, { x: x[i]!, y: y[i]! })
      else if (dx === 0 && dy === 0) add('zero-edge', l, i - first, { x: x[i]!, y: y[i]! })
    }
  }
  return problems
}

function openEnds(loops: readonly Loop[]): ProfileProblem[] {
  return loops.flatMap((loop, l) =>
    loop.flatMap(({ to }, edge) => {
      const next = loop[(edge + 1) % loop.length]!.from
      if (to.x === next.x && to.y === next.y) return []
      return [{ code: 'open', loop: l, edge, other: null, at: to } satisfies ProfileProblem]
    }),
  )
}

/**
 * The problems of an outline whose edges are sound, once it is known where edges meet that must not. `areas`: signed,
 * by loop, mm². `within`: what counts as touching, mm.
 */
export function shapeProblems(
  outline: Outline,
  areas: readonly number[],
  within: number,
  meetings: readonly ProfileProblem[],
): ProfileProblem[] {
  const problems = [...meetings, ...orientationProblems(outline, areas, within)]
  const touched = new Set(meetings.flatMap((m) => (m.code === 'loops-cross' ? [m.loop, m.other?.loop] : [])))
  problems.push(...nestingProblems(outline, touched))
  return problems.sort(byPlace)
}

function byPlace(a: ProfileProblem, b: ProfileProblem): number {
  return (
    a.loop - b.loop ||
    (a.edge ?? -1) - (b.edge ?? -1) ||
    (a.other?.loop ?? -1) - (b.other?.loop ?? -1) ||
    (a.other?.edge ?? -1) - (b.other?.edge ?? -1)
  )
}

/** Edges that touch or cross other than where they must. */
export function meetingsAtRest(outline: Outline, within: number): ProfileProblem[] {
  const { loopStart, x, y } = outline
  const starts = Array.from(loopStart.subarray(0, -1), (first) => ({ x: x[first]!, y: y[first]! }))
  const edges = nearbyOrder(starts).flatMap((l) => range(loopStart[l]!, loopStart[l + 1]!))
  const problems: ProfileProblem[] = []
  visitPairs(
    chainTree(restingChain(outline, edges, within)),
    () => 0,
    (i, j) => {
      const problem = meetingOf(outline, edges[i]!, edges[j]!, within)
      if (problem) problems.push(problem)
    },
  )
  return problems
}

const range = (from: number, end: number) => Array.from({ length: end - from }, (_, i) => from + i)

/** The outline standing still, its edges taken in the given order, in which loops are whole. */
function restingChain(outline: Outline, edges: readonly number[], near: number): MovingChain {
  const placeOf = new Int32Array(edges.length)
  edges.forEach((edge, place) => (placeOf[edge] = place))
  const ownBox = (place: number, out: Float64Array, at: number) => {
    const edge = edges[place]!
    if (!outline.arc[edge]) return false
    const box = segmentBounds(segmentAt(outline, edge))
    for (let end = 0; end < BOX_STRIDE; end += 4)
      out.set([box.minX - near, box.minY - near, box.maxX + near, box.maxY + near], at + end)
    return true
  }
  return {
    count: edges.length,
    next: Int32Array.from(edges, (edge) => placeOf[outline.next[edge]!]!),
    x: Float64Array.from(edges, (edge) => outline.x[edge]!),
    y: Float64Array.from(edges, (edge) => outline.y[edge]!),
    vx: new Float64Array(edges.length),
    vy: new Float64Array(edges.length),
    span: 0,
    advance: Uint16Array.from(edges, (edge) => edgeAdvance(outline, edge, near)),
    ownBox: outline.hasArcs ? ownBox : null,
    near,
  }
}

/** Pieces shorter than so many times what counts as touching may bring their neighbours to touch. */
const SHORT = 4 / LEAST_ADVANCE

/**
 * Directions in which an edge of the outline advances (see `advanceOf`); 0 where it is too short, or turns too far, to
 * say. An arc of less than a quarter turn advances wherever both its ends do.
 */
export function edgeAdvance(outline: Outline, e: number, near: number): number {
  const { next, x, y, arc, cx, cy, sweep } = outline
  const n = next[e]!
  const dx = x[n]! - x[e]!
  const dy = y[n]! - y[e]!
  if (!(Math.abs(dx) + Math.abs(dy) > SHORT * near)) return 0
  if (!arc[e]) return advanceOf(dx, dy)
  const turn = sweep[e]!
  if (Math.abs(turn) >= Math.PI / 2) return 0
  const way = Math.sign(turn)
  const start = advanceOf(way * (cy[e]! - y[e]!), way * (x[e]! - cx[e]!))
  return start & advanceOf(way * (cy[e]! - y[n]!), way * (x[n]! - cx[e]!))
}

/** Two edges that touch or cross other than where they must; null when they do not. */
export function meetingOf(outline: Outline, a: number, b: number, within: number): ProfileProblem | null {
  const [i, j] = a < b ? [a, b] : [b, a]
  const at = sharedPoint(outline, i, j, within)
  if (!at) return null
  const [loop, otherLoop] = [loopOfEdge(outline, i), loopOfEdge(outline, j)]
  const other = { loop: otherLoop, edge: j - outline.loopStart[otherLoop]! }
  const code = loop === otherLoop ? 'crosses-itself' : 'loops-cross'
  return { code, loop, edge: i - outline.loopStart[loop]!, other, at }
}

/** Edges i < j. */
function sharedPoint(outline: Outline, i: number, j: number, within: number): Point | null {
  if (linesKeepApart(outline, i, j, within)) return null
  const a = segmentAt(outline, i)
  const b = segmentAt(outline, j)
  const follows = outline.next[i] === j
  const leads = outline.next[j] === i
  if (follows) return commonPointBesideCorner(a, b, leads, within)
  return leads ? commonPointBesideCorner(b, a, false, within) : commonPoint(a, b, within)
}

/** Told without an object: lines that follow one another and do not double back, or of which one lies beside the other. */
function linesKeepApart(outline: Outline, i: number, j: number, within: number): boolean {
  const { next, x, y, arc } = outline
  if (arc[i] || arc[j]) return false
  const ux = x[next[i]!]! - x[i]!
  const uy = y[next[i]!]! - y[i]!
  const vx = x[next[j]!]! - x[j]!
  const vy = y[next[j]!]! - y[j]!
  if (next[i] === j || next[j] === i) return ux * vx + uy * vy >= 0
  const wx = x[j]! - x[i]!
  const wy = y[j]! - y[i]!
  const turn = ux * vy - uy * vx
  const before = ux * wy - uy * wx
  const apart = 2 * within * (Math.abs(ux) + Math.abs(uy))
  if ((before > apart && before + turn > apart) || (before < -apart && before + turn < -apart)) return true
  // The ends of edge i seen from edge j.
  const other = wx * vy - wy * vx
  const gap = 2 * within * (Math.abs(vx) + Math.abs(vy))
  return (other > gap && other - turn > gap) || (other < -gap && other - turn < -gap)
}

/** An edge is no longer than this many times the largest coordinate: an arc's radius keeps within its chord and box. */
const LONGEST = 20

function orientationProblems(outline: Outline, areas: readonly number[], within: number): ProfileProblem[] {
  const { minX, minY, maxX, maxY } = outlineBounds(outline)
  const longest = LONGEST * Math.max(-minX, -minY, maxX, maxY) * outline.count
  return areas.flatMap((area, l) => {
    const flat = Math.abs(area) <= within * longest && Math.abs(area) <= within * lengthOf(outline, l)
    if (!flat && area > 0 === (l === 0)) return []
    const first = outline.loopStart[l]!
    const at = { x: outline.x[first]!, y: outline.y[first]! }
    const code = flat ? 'no-area' : 'wrong-orientation'
    return [{ code, loop: l, edge: null, other: null, at } satisfies ProfileProblem]
  })
}

function lengthOf(outline: Outline, l: number): number {
  const edges = range(outline.loopStart[l]!, outline.loopStart[l + 1]!)
  return loopLength(edges.map((e) => segmentAt(outline, e)))
}

/** Loops that cross have been told already; of the others one corner says on which side the whole loop lies. */
function nestingProblems(outline: Outline, touched: ReadonlySet<number | undefined>): ProfileProblem[] {
  const { loopStart } = outline
  const loops = loopStart.length - 1
  if (loops === 1) return []
  const problems: ProfileProblem[] = []
  const boxes = range(0, loops).map((l) => outlineBounds(outline, loopStart[l], loopStart[l + 1]))
  for (let l = 1; l < loops; l++) {
    if (touched.has(l)) continue
    const at = { x: outline.x[loopStart[l]!]!, y: outline.y[loopStart[l]!]! }
    const within = (other: number) => boxHolds(boxes[other]!, at) && insideLoop(outline, other, at)
    const add = (code: ProfileProblemCode, other: number) =>
      problems.push({ code, loop: l, edge: null, other: { loop: other, edge: null }, at })
    if (!within(0)) add('hole-outside', 0)
    for (let k = 1; k < loops; k++) if (k !== l && within(k)) add('hole-in-hole', k)
  }
  return problems
}

/** Even–odd rule with a ray to +x. */
function insideLoop(outline: Outline, l: number, point: Point): boolean {
  const { loopStart, next, x, y, arc } = outline
  let inside = false
  for (let e = loopStart[l]!; e < loopStart[l + 1]!; e++) {
    if (arc[e]) {
      if (rayCrossings(segmentAt(outline, e), point) % 2 === 1) inside = !inside
      continue
    }
    const ay = y[e]!
    const by = y[next[e]!]!
    if (ay > point.y === by > point.y) continue
    const ax = x[e]!
    if (point.x < ax + ((point.y - ay) / (by - ay)) * (x[next[e]!]! - ax)) inside = !inside
  }
  return inside
}

function boxHolds({ minX, minY, maxX, maxY }: Bounds, { x, y }: Point): boolean {
  return x >= minX && x <= maxX && y >= minY && y <= maxY
}
