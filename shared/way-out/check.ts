import { arcFraction, normalAt } from '../geometry/segment.ts'
import type { Point, Segment } from '../geometry/types.ts'
import type { Body, Facet } from '../walls/types.ts'
import { FLATTEST, TOUCH } from './nearest.ts'
import type { Direction, Hold, PieceWayOut, WayOut } from './types.ts'

/** Checker of a way out, told from the drawing and the walls alone; nothing of the search is used. */

export type WayOutProblemCode =
  /** Direction, angle, heading and verdict do not say the same. */
  | 'told-wrongly'
  /** The move leans into a wall. */
  | 'enters-wall'
  /** The piece is said to slide or drop although it leaves straight up, or to slide although it drops. */
  | 'not-the-first'
  /** The walls named do not contradict each other. */
  | 'no-trap'

export interface WayOutProblem {
  readonly code: WayOutProblemCode
  readonly loop: number
  /** Edge of the loop, where one is to blame. */
  readonly edge: number | null
}

/** What is wrong with a piece's way out, free and within the kerf; empty when it is sound. */
export function wayOutProblems(body: Body, kerf: number, piece: PieceWayOut): WayOutProblem[] {
  return [
    ...problemsOf(body, 0, piece.loop, piece.free),
    ...problemsOf(body, kerf, piece.loop, piece.withinKerf),
  ]
}

function problemsOf(body: Body, kerf: number, loop: number, way: WayOut): WayOutProblem[] {
  const problem = (code: WayOutProblemCode, edge: number | null = null) => ({ code, loop, edge })
  if (way.verdict === 'trapped') {
    const proved =
      !way.direction &&
      way.trap &&
      contradicts(body, kerf, way.trap.up, 1) &&
      contradicts(body, kerf, way.trap.down, -1)
    return proved ? [] : [problem('no-trap')]
  }
  const { direction } = way
  if (!direction || way.trap || !toldRightly(way.verdict, direction)) return [problem('told-wrongly')]
  const problems: WayOutProblem[] = []
  const { x, y, z } = direction
  const slope = { x: x / Math.abs(z), y: y / Math.abs(z) }
  const rise = z > 0 ? 1 : -1
  const edge = worstEdge(body, kerf, loop, slope, rise)
  if (edge !== null) problems.push(problem('enters-wall', edge))
  const still = { x: 0, y: 0 }
  if (way.verdict !== 'lifts' && worstEdge(body, kerf, loop, still, 1) === null)
    problems.push(problem('not-the-first'))
  else if (way.verdict === 'slides' && worstEdge(body, kerf, loop, still, -1) === null) {
    problems.push(problem('not-the-first'))
  }
  return problems
}

function toldRightly(verdict: WayOut['verdict'], { x, y, z, angle, heading }: Direction): boolean {
  const straight = verdict === 'lifts' || verdict === 'drops'
  const way = verdict === 'lifts' ? z > 0 : verdict === 'drops' ? z < 0 : true
  const unit = Math.abs(Math.hypot(x, y, z) - 1) <= TOUCH
  const leans = Math.abs(Math.atan2(Math.hypot(x, y), Math.abs(z)) - angle) <= TOUCH
  const heads =
    heading === null ? x === 0 && y === 0 : Math.abs(Math.sin(heading - Math.atan2(y, x))) <= TOUCH
  return way && unit && leans && heads && straight === (heading === null)
}

/** The edge that a move (x, y, ±1) leans into most, past `TOUCH`; null where it clears them all. */
function worstEdge(body: Body, kerf: number, loop: number, slope: Point, rise: 1 | -1): number | null {
  let worst: number | null = null
  let most = TOUCH
  for (const [e, segment] of body.loops[loop]!.entries()) {
    const lean = mostOutward(segment, loop === 0 ? slope : { x: -slope.x, y: -slope.y })
    for (const facet of body.walls[loop]![e]!.facets) {
      const excess = lean - boundOf(body, kerf, facet, loop, rise)
      if (excess > most) [most, worst] = [excess, e]
    }
  }
  return worst
}

/** Largest n·(x, y) over the segment's outward normals. */
export function mostOutward(segment: Segment, { x, y }: Point): number {
  const at = (fraction: number) => {
    const n = normalAt(segment, fraction)
    return n.x * x + n.y * y
  }
  if (segment.kind === 'line') return at(0)
  // Seen from the centre the outward normal looks along the radius, or against it on a clockwise arc.
  const way = Math.sign(segment.sweep)
  const within = arcFraction(segment, Math.atan2(way * y, way * x)) <= 1
  return within ? Math.hypot(x, y) : Math.max(at(0), at(1))
}

/** Room that a facet leaves along its piece's outward normal, mm per mm of rise or fall. */
export function boundOf(body: Body, kerf: number, facet: Facet, loop: number, rise: 1 | -1): number {
  const sign = loop === 0 ? -rise : rise
  return Math.min(
    ...[facet.tilt, facet.endTilt ?? facet.tilt].map(
      (tilt) => sign * Math.tan(tilt) + kerf / (body.thickness * Math.cos(tilt)),
    ),
  )
}

/**
 * Whether the walls' rules add up to a contradiction: for every |(x, y)| ≤ `FLATTEST`, Σ weight·n·(x, y) is at
 * least −|Σ weight·n|·FLATTEST, so a Σ weight·bound below that leaves nothing.
 */
function contradicts(body: Body, kerf: number, holds: readonly Hold[], rise: 1 | -1): boolean {
  let [rx, ry, bound] = [0, 0, 0]
  for (const { loop, edge, facet, heading, weight } of holds) {
    const segment = body.loops[loop]?.[edge]
    const wall = body.walls[loop]?.[edge]?.facets[facet]
    if (!segment || !wall || !(weight > 0)) return false
    const n = { x: Math.cos(heading), y: Math.sin(heading) }
    const out = loop === 0 ? n : { x: -n.x, y: -n.y }
    // The heading must be one of the edge's normals.
    if (mostOutward(segment, out) < 1 - TOUCH) return false
    rx += weight * n.x
    ry += weight * n.y
    bound += weight * boundOf(body, kerf, wall, loop, rise)
  }
  return bound < -Math.hypot(rx, ry) * FLATTEST
}
