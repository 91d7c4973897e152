import { BOX_STRIDE, boxTree, visitMeetingPairs } from './boxes.ts'
import { sideOfLoop } from './inside.ts'
import { commonPoint, commonPointBesideCorner } from './intersect.ts'
import { boundsOf, loopLength, signedArea } from './loop.ts'
import { nearbyOrder } from './order.ts'
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
  const broken = edgeProblems(loops)
  if (broken.length > 0) return broken
  const within = roundingOf(boundsOf(loops.flat()))
  const meetings = meetingProblems(loops, within)
  const problems = [...meetings, ...orientationProblems(loops, within)]
  const touched = new Set(meetings.flatMap((m) => (m.code === 'loops-cross' ? [m.loop, m.other?.loop] : [])))
  problems.push(...nestingProblems(loops, touched))
  return problems.sort((a, b) => a.loop - b.loop || (a.edge ?? -1) - (b.edge ?? -1))
}

function edgeProblems(loops: readonly Loop[]): ProfileProblem[] {
  const problems: ProfileProblem[] = []
  const add = (code: ProfileProblemCode, loop: number, edge: number | null, at: Point | null) =>
    problems.push({ code, loop, edge, other: null, at })
  if (loops.length === 0) add('too-few-edges', 0, null, null)
  for (const [l, loop] of loops.entries()) {
    if (loop.length < 2) add('too-few-edges', l, null, loop[0]?.from ?? null)
    for (const [e, segment] of loop.entries()) {
      const { from, to } = segment
      const next = loop[(e + 1) % loop.length]!.from
      if (!Number.isFinite(from.x + from.y + to.x + to.y)) add('not-finite', l, e, null)
      else if (segment.kind === 'arc' && !(segment.radius < Infinity)) add('not-finite', l, e, from)
      else if (from.x === to.x && from.y === to.y) add('zero-edge', l, e, from)
      if (to.x !== next.x || to.y !== next.y) add('open', l, e, to)
    }
  }
  return problems
}

function meetingProblems(loops: readonly Loop[], within: number): ProfileProblem[] {
  const order = nearbyOrder(loops.map((loop) => loop[0]!.from))
  const count = loops.reduce((sum, loop) => sum + loop.length, 0)
  const loopOf = new Int32Array(count)
  const edgeOf = new Int32Array(count)
  const boxes = new Float64Array(count * BOX_STRIDE)
  let i = 0
  for (const l of order) {
    for (const [e, segment] of loops[l]!.entries()) {
      loopOf[i] = l
      edgeOf[i] = e
      const box = segmentBounds(segment)
      // At rest: the visit below looks at the start only.
      const at = i++ * BOX_STRIDE
      boxes[at] = box.minX - within
      boxes[at + 1] = box.minY - within
      boxes[at + 2] = box.maxX + within
      boxes[at + 3] = box.maxY + within
    }
  }
  const problems: ProfileProblem[] = []
  visitMeetingPairs(
    boxTree(boxes),
    () => 0,
    (a, b) => {
      const earlier = loopOf[a]! - loopOf[b]! || edgeOf[a]! - edgeOf[b]!
      const [i, j] = earlier < 0 ? [a, b] : [b, a]
      const [loop, edge, otherLoop, otherEdge] = [loopOf[i]!, edgeOf[i]!, loopOf[j]!, edgeOf[j]!]
      const at = sharedPoint(loops, loop, edge, otherLoop, otherEdge, within)
      if (!at) return
      const code = loop === otherLoop ? 'crosses-itself' : 'loops-cross'
      problems.push({ code, loop, edge, other: { loop: otherLoop, edge: otherEdge }, at })
    },
  )
  return problems
}

function sharedPoint(
  loops: readonly Loop[],
  loopA: number,
  edgeA: number,
  loopB: number,
  edgeB: number,
  within: number,
): Point | null {
  const a = loops[loopA]![edgeA]!
  const b = loops[loopB]![edgeB]!
  if (loopA !== loopB) return commonPoint(a, b, within)
  const n = loops[loopA]!.length
  const follows = edgeB === edgeA + 1
  const leads = edgeA === 0 && edgeB === n - 1
  if (follows) return commonPointBesideCorner(a, b, leads, within)
  return leads ? commonPointBesideCorner(b, a, false, within) : commonPoint(a, b, within)
}

function orientationProblems(loops: readonly Loop[], within: number): ProfileProblem[] {
  return loops.flatMap((loop, l) => {
    const area = signedArea(loop)
    const flat = Math.abs(area) <= within * loopLength(loop)
    if (!flat && area > 0 === (l === 0)) return []
    const code = flat ? 'no-area' : 'wrong-orientation'
    return [{ code, loop: l, edge: null, other: null, at: loop[0]!.from } satisfies ProfileProblem]
  })
}

/** Loops that cross have been told already; of the others one corner says on which side the whole loop lies. */
function nestingProblems(loops: readonly Loop[], touched: ReadonlySet<number | undefined>): ProfileProblem[] {
  const problems: ProfileProblem[] = []
  const boxes = loops.map(boundsOf)
  for (let l = 1; l < loops.length; l++) {
    if (touched.has(l)) continue
    const at = loops[l]![0]!.from
    const within = (other: number) =>
      boxHolds(boxes[other]!, at) && sideOfLoop(loops[other]!, at, -1) === 'inside'
    const add = (code: ProfileProblemCode, other: number) =>
      problems.push({ code, loop: l, edge: null, other: { loop: other, edge: null }, at })
    if (!within(0)) add('hole-outside', 0)
    for (let k = 1; k < loops.length; k++) if (k !== l && within(k)) add('hole-in-hole', k)
  }
  return problems
}

function boxHolds({ minX, minY, maxX, maxY }: Bounds, { x, y }: Point): boolean {
  return x >= minX && x <= maxX && y >= minY && y <= maxY
}
