import { contourAt } from '../contours/contour.ts'
import { frameOf } from '../contours/frame.ts'
import { distanceToSegment, pointInProfile } from '../geometry/inside.ts'
import type { Loop, Point } from '../geometry/types.ts'
import type { Jet, JetPath } from '../passes/types.ts'
import type { Body } from '../walls/types.ts'
import { jetAt, type JetLine } from '../passes/jet-at.ts'
import { hasMove } from './moves.ts'
import { BITE_ACCURACY, type Interference, type JetBite } from './types.ts'

/**
 * Checkers: slow and obvious, sharing no formula with the search. A jet is a cone in space; a point is in the part
 * when it is in the outline at its depth.
 */

export type BiteProblemCode = 'not-on-the-wall' | 'not-so-deep' | 'not-sorted' | 'count'

export interface BiteProblem {
  readonly code: BiteProblemCode
  /** Index into the bites; null for the list as a whole. */
  readonly bite: number | null
}

/** How far a told place may lie off its wall, mm, and a told bite off the jet's at that place. */
const PLACE_SLACK = 1e-7
const BITE_SLACK = 1e-6

/** Lines looked at along a move to find the one that bites at a told place. */
const LINES = 400

/** What is wrong with told bites: each must lie on its wall and stand in the jet as deep as told. */
export function biteProblems(body: Body, path: JetPath, jet: Jet, result: Interference): BiteProblem[] {
  const problems: BiteProblem[] = []
  const frame = frameOf(body)
  if (result.pairs < result.bites.length) problems.push({ code: 'count', bite: null })
  for (const [k, bite] of result.bites.entries()) {
    if (k > 0 && bite.bite > result.bites[k - 1]!.bite) problems.push({ code: 'not-sorted', bite: k })
    const outline = contourAt(body, bite.depth).loops[frame.loopOf[bite.hit]!]!
    const wall = outline.filter((segment) => segment.edge === frame.edgeOf[bite.hit])
    const off = Math.min(...wall.map((segment) => distanceToSegment(segment, bite)))
    if (!(off <= PLACE_SLACK)) problems.push({ code: 'not-on-the-wall', bite: k })
    const deepest = deepestOfMove(path, jet, bite)
    if (!(deepest >= bite.bite - BITE_SLACK && deepest <= bite.bite + BITE_ACCURACY + BITE_SLACK)) {
      problems.push({ code: 'not-so-deep', bite: k })
    }
  }
  return problems
}

/** How deep the told place stands in the move's jet at its deepest: by lines along the move, then ever closer ones. */
export function deepestOfMove(path: JetPath, jet: Jet, { station, x, y, depth }: JetBite): number {
  let [from, to] = [0, 1]
  let best = -Infinity
  for (let round = 0; round < 4; round++) {
    let at = from
    for (let k = 0; k <= LINES; k++) {
      const u = from + (k / LINES) * (to - from)
      const bite = depthInJet(jetAt(path, station, u), jet, x, y, depth)
      if (bite > best) {
        best = bite
        at = u
      }
    }
    const step = (to - from) / LINES
    ;[from, to] = [Math.max(0, at - step), Math.min(1, at + step)]
  }
  return best
}

/** Depth of a point inside the cone, square to its side, by vectors in space; negative outside. */
export function depthInJet(line: JetLine, jet: Jet, x: number, y: number, depth: number): number {
  const length = Math.hypot(line.p, line.q, 1)
  const [ax, ay, az] = [line.p / length, line.q / length, 1 / length]
  const [vx, vy, vz] = [x - line.x, y - line.y, depth]
  const along = vx * ax + vy * ay + vz * az
  const off = Math.hypot(vx - along * ax, vy - along * ay, vz - along * az)
  return (jet.kerf / 2 - along * Math.tan(jet.taper) - off) * Math.cos(jet.taper)
}

export interface SampledBite {
  readonly station: number
  readonly bite: number
  readonly x: number
  readonly y: number
  readonly depth: number
}

export interface Sampling {
  /** Lines along each move. */
  readonly lines: number
  readonly depths: readonly number[]
  /** Directions round the axis. */
  readonly directions: number
}

/** Shares of the way from the axis to the jet's side at which points are tried. */
const SHARES = [0, 0.3, 0.6, 0.8, 0.9, 0.96, 0.99, 0.999]

/**
 * Points in the jet that are in the part: of every move, the deepest of those tried (none where no point is in the
 * part). Never more than the truth; how much less is a matter of the sampling.
 */
export function sampledBites(body: Body, path: JetPath, jet: Jet, sampling: Sampling): SampledBite[] {
  const contours = sampling.depths.map((depth) => contourAt(body, depth))
  const found: SampledBite[] = []
  for (let i = 0; i < path.count; i++) {
    if (!hasMove(path, i)) continue
    let best: SampledBite | null = null
    for (let k = 0; k <= sampling.lines; k++) {
      const line = jetAt(path, i, k / sampling.lines)
      for (const { depth, loops } of contours) {
        const sampled = deepestInSection(loops, line, jet, depth, sampling.directions)
        if (sampled && (!best || sampled.bite > best.bite)) best = { station: i, depth, ...sampled }
      }
    }
    if (best) found.push(best)
  }
  return found
}

function deepestInSection(
  loops: readonly Loop[],
  line: JetLine,
  jet: Jet,
  depth: number,
  directions: number,
) {
  const axis: Point = { x: line.x + line.p * depth, y: line.y + line.q * depth }
  const length = Math.hypot(line.p, line.q, 1)
  const reach = jet.kerf * length
  const near = Math.min(...loops.flat().map((segment) => distanceToSegment(segment, axis)))
  if (near > reach && !pointInProfile(loops, axis)) return null
  let best: { bite: number; x: number; y: number } | null = null
  for (let k = 0; k < directions; k++) {
    const heading = (2 * Math.PI * k) / directions
    const [ux, uy] = [Math.cos(heading), Math.sin(heading)]
    const side = sideOfJet((t) => depthInJet(line, jet, axis.x + t * ux, axis.y + t * uy, depth), 2 * reach)
    for (const share of SHARES) {
      const x = axis.x + share * side * ux
      const y = axis.y + share * side * uy
      const bite = depthInJet(line, jet, x, y, depth)
      if (bite > (best?.bite ?? 0) && pointInProfile(loops, { x, y })) best = { bite, x, y }
    }
  }
  return best
}

/** Where a function that is positive at 0 and falls turns negative, by halving. */
function sideOfJet(value: (t: number) => number, most: number): number {
  let [from, to] = [0, most]
  for (let k = 0; k < 40; k++) {
    const middle = (from + to) / 2
    if (value(middle) > 0) from = middle
    else to = middle
  }
  return from
}
