import { edgeName } from '../walls/names.ts'
import type { Body, Wall } from '../walls/types.ts'
import { reversedWall, squareWall } from '../walls/wall.ts'
import type { FacetDegrees } from '../findings/place.ts'
import { loopFromVertices } from '../geometry/bulge.ts'
import { edgeInDrawing, orientLoops } from '../geometry/orient.ts'
import { profileProblems, type ProfileProblem } from '../geometry/problems.ts'
import { radians } from '../units/angle.ts'
import { formatNumber } from '../units/format.ts'
import { EvaluationError, type EvaluationErrorCode } from './error.ts'
import type { EvaluationRequest } from './schema.ts'
import type { WallSpec } from '../walls/schema.ts'

/**
 * A request made sound. The body runs each loop with the material on its left; where the caller's loop ran the
 * other way, its edge k is the caller's edge n − 1 − k and its corner k the caller's corner (n − k) mod n
 * (`reversed` tells). Everything beside the body is in the caller's numbering.
 */
export interface ReadRequest {
  readonly body: Body
  readonly reversed: readonly boolean[]
  /** facets[loop][edge] in degrees, the caller's numbering; edges with equal walls share one list. */
  readonly facets: readonly (readonly (readonly FacetDegrees[])[])[]
  /** What is wrong with the profile but can still be shown: crossings and stray loops, the caller's numbering. */
  readonly problems: readonly ProfileProblem[]
}

/** How far the last facet may end from the plate's bottom and still mean it, mm: rounding of inches to text. */
const THICKNESS_ROUNDING = 1e-6

/** Throws `EvaluationError`. */
export function readRequest(request: EvaluationRequest): ReadRequest {
  const { thickness } = request.plate
  const { loops, reversed } = orientLoops(request.loops.map(loopFromVertices))
  const facets = facetsByEdge(
    request.loops.map(({ length }) => length),
    request.walls,
    thickness,
  )
  const problems = profileProblems(loops).map((problem) => renumbered(problem, loops, reversed))
  for (const problem of problems) refuse(problem)
  return {
    body: {
      thickness,
      datum: request.datum ?? 'top',
      loops,
      walls: radianWalls(facets, thickness).map((walls, l) => (reversed[l] ? turnedRound(walls) : walls)),
    },
    reversed,
    facets,
    problems,
  }
}

function facetsByEdge(
  edgeCounts: readonly number[],
  walls: readonly WallSpec[],
  thickness: number,
): (readonly FacetDegrees[])[][] {
  const square: readonly FacetDegrees[] = [{ depth: thickness, tilt: 0 }]
  const facets = edgeCounts.map((count) => new Array<readonly FacetDegrees[]>(count).fill(square))
  const named = edgeCounts.map((count) => new Uint8Array(count))
  const share = sharer(square)
  for (const wall of walls) {
    const { loop, edge } = wall
    const ofLoop = facets[loop]
    const seen = named[loop]
    if (!seen || ofLoop?.[edge] === undefined) {
      throw new EvaluationError(
        'wall-names-no-edge',
        `A wall is given for edge ${edge} of loop ${loop}, which the profile does not have. Count loops and edges from 0.`,
        wall,
      )
    }
    if (seen[edge]) {
      throw new EvaluationError(
        'wall-named-twice',
        `Edge ${edgeName(wall)} (loop ${loop}, edge ${edge}) is given two walls. Keep one.`,
        wall,
      )
    }
    seen[edge] = 1
    ofLoop[edge] = share(soundFacets(wall, thickness))
  }
  return facets
}

function soundFacets(wall: WallSpec, thickness: number): readonly FacetDegrees[] {
  const { facets } = wall
  let above = 0
  for (const { depth } of facets) {
    if (!(depth > above)) {
      throw new EvaluationError(
        'facets-out-of-order',
        `The facets of edge ${edgeName(wall)} must end deeper one after the other; ${formatNumber(depth)} mm follows ${formatNumber(above)} mm.`,
        wall,
      )
    }
    above = depth
  }
  if (Math.abs(above - thickness) > THICKNESS_ROUNDING) {
    throw new EvaluationError(
      'facets-miss-thickness',
      `The last facet of edge ${edgeName(wall)} ends at ${formatNumber(above, { decimals: 6 })} mm; ` +
        `it must end at the plate's thickness, ${formatNumber(thickness, { decimals: 6 })} mm.`,
      wall,
    )
  }
  if (above === thickness) return facets
  return facets.map((facet, i) => (i === facets.length - 1 ? { ...facet, depth: thickness } : facet))
}

/** Lists remembered for sharing; a part seldom has more preps, and missing one costs room, not truth. */
const MOST_SHARED = 8

/** Gives equal lists back as one, so that what follows from a prep is worked out once for thousands of edges. */
function sharer(first: readonly FacetDegrees[]): (list: readonly FacetDegrees[]) => readonly FacetDegrees[] {
  const recent = [first]
  return (list) => {
    for (const other of recent) if (sameFacets(list, other)) return other
    if (recent.length === MOST_SHARED) recent.shift()
    recent.push(list)
    return list
  }
}

export function sameFacets(a: readonly FacetDegrees[], b: readonly FacetDegrees[]): boolean {
  if (a.length !== b.length) return false
  for (let i = 0; i < a.length; i++) {
    if (a[i]?.depth !== b[i]?.depth || a[i]?.tilt !== b[i]?.tilt) return false
    if ((a[i]?.endTilt ?? a[i]?.tilt) !== (b[i]?.endTilt ?? b[i]?.tilt)) return false
  }
  return true
}

/** One wall in radians for every list of facets, shared as they are. */
function radianWalls(facets: readonly (readonly (readonly FacetDegrees[])[])[], thickness: number): Wall[][] {
  const square = squareWall(thickness)
  const made = new Map<readonly FacetDegrees[], Wall>()
  const wallOf = (list: readonly FacetDegrees[]): Wall => {
    const known = made.get(list)
    if (known) return known
    const vertical = list.every(({ tilt, endTilt }) => tilt === 0 && (endTilt ?? 0) === 0)
    const wall = vertical
      ? square
      : {
          facets: list.map(({ depth, tilt, endTilt }) =>
            endTilt === undefined
              ? { depth, tilt: radians(tilt) }
              : { depth, tilt: radians(tilt), endTilt: radians(endTilt) },
          ),
        }
    made.set(list, wall)
    return wall
  }
  return facets.map((ofLoop) => ofLoop.map(wallOf))
}

/** The walls of a loop travelled the other way; edges that share a wall still do. */
function turnedRound(walls: readonly Wall[]): Wall[] {
  const turned = new Map<Wall, Wall>()
  for (const wall of walls) if (!turned.has(wall)) turned.set(wall, reversedWall(wall))
  return walls.map((wall) => turned.get(wall) ?? wall).reverse()
}

function renumbered(
  problem: ProfileProblem,
  loops: readonly (readonly unknown[])[],
  reversed: readonly boolean[],
): ProfileProblem {
  const edgeOf = (loop: number, edge: number | null) =>
    edge === null ? null : edgeInDrawing(edge, loops[loop]?.length ?? 0, reversed[loop] ?? false)
  const { other } = problem
  return {
    ...problem,
    edge: edgeOf(problem.loop, problem.edge),
    other: other && { loop: other.loop, edge: edgeOf(other.loop, other.edge) },
  }
}

/** Profiles that have no meaning at all are errors; those that merely cross are findings. */
function refuse(problem: ProfileProblem): void {
  const { loop, edge } = problem
  const place = { loop, edge: edge ?? undefined }
  const name = edge === null ? `loop ${loop}` : `edge ${edgeName({ loop, edge })}`
  const fail = (code: EvaluationErrorCode, message: string) => {
    throw new EvaluationError(code, message, place)
  }
  switch (problem.code) {
    case 'zero-edge':
      return fail('edge-of-no-length', `The ${name} has no length. Remove the repeated vertex.`)
    case 'too-few-edges':
    case 'no-area':
      return fail(
        'loop-of-no-area',
        `Loop ${loop} encloses no area. Draw it with at least two vertices and an arc, or three.`,
      )
    case 'not-finite':
      return fail('not-finite', `The ${name} has a coordinate that is no finite number. Correct it.`)
    case 'open':
    case 'wrong-orientation':
      throw new Error(`a loop of vertices cannot be ${problem.code} once it is put right`)
    case 'crosses-itself':
    case 'loops-cross':
    case 'hole-outside':
    case 'hole-in-hole':
      return
  }
}
