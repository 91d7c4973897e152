import { axesAlong } from '../head/axes-along.ts'
import { headSpec } from '../head/schema.ts'
import type { HeadAxes } from '../head/types.ts'
import { strictestLimit } from '../findings/place.ts'
import { interferencesOf } from '../interference/interference.ts'
import type { Interference } from '../interference/types.ts'
import type { CornerMoveName, PassChoicesSpec } from '../passes/schema.ts'
import { rootFacet } from '../passes/axis-table.ts'
import { metalPath } from '../jet/axis.ts'
import { passesOf } from '../passes/passes.ts'
import { CornerMove, type Jet, type PassChoices, type Passes } from '../passes/types.ts'
import { radians } from '../units/angle.ts'
import { reachability } from '../walls/reachability.ts'
import type { Body, Wall } from '../walls/types.ts'
import { wayOut } from '../way-out/way-out.ts'
import type { WaysOut } from '../way-out/types.ts'
import { limitsOf } from './columns.ts'
import type { ReadRequest } from './read.ts'

/** What follows from the walls once they stand: how the jet goes, what it meets, how the head follows, how the piece leaves. */
export interface JetWay {
  /** Null where no kerf is told. */
  readonly cut: {
    readonly passes: Passes
    readonly interference: Interference
    /** Null where the head's motion is not told. */
    readonly axes: HeadAxes | null
  } | null
  readonly ways: WaysOut
}

/**
 * Null where there is nothing sound to cut: the profile has problems, the walls have an event within the plate, or
 * a facet cannot be reached by a straight jet.
 */
export function jetWayOf(read: ReadRequest): JetWay | null {
  const { body, problems, event, preps, request } = read
  if (problems.length > 0 || event) return null
  const blocked = preps.list.map(({ wall }) => reachability(wall.facets).kind === 'blocked')
  if (preps.ofEdge.some((prep) => blocked[prep])) return null
  const { kerf, taper = 0, standoff, nozzleDiameter } = request.jet ?? {}
  const ways = wayOut(asFreed(body), kerf ?? 0)
  if (kerf === undefined) return { cut: null, ways }
  if (kerfClosesAt(read) !== null) return { cut: null, ways }
  const jet: Jet = { kerf, taper: radians(taper), standoff, nozzleDiameter }
  const limits = limitsOf(request)
  const tilt = limits && radians(strictestLimit(limits))
  const passes = passesOf(body, jet, { tilt }, choicesOf(read))
  const interference = interferencesOf(body, passes, jet, { seamsTold: true })
  const motion = request.head?.motion
  const axes = motion ? axesAlong(passes.path, passes.passes, headSpec(motion)) : null
  return { cut: { passes, interference, axes }, ways }
}

/**
 * What the freeing passes cut loose: every wall as its root facet alone, through the whole plate. What the other
 * facets cut off beside it travels along or has fallen, so that it holds nothing.
 */
function asFreed(body: Body): Body {
  const { thickness, loops, walls } = body
  if (walls.every((ofLoop) => ofLoop.every(({ facets }) => facets.length === 1))) return body
  const freed = new Map<Wall, Wall>()
  const alone = (wall: Wall): Wall => {
    const known = freed.get(wall)
    if (known) return known
    const made = { facets: [{ ...wall.facets[rootFacet(wall)]!, depth: thickness }] }
    freed.set(wall, made)
    return made
  }
  return { thickness, datum: 'top', loops, walls: walls.map((ofLoop) => ofLoop.map(alone)) }
}

const moveOfName: Record<NonNullable<PassChoicesSpec['corners']>[number]['move'], CornerMove> = {
  lean: CornerMove.lean,
  'run-out': CornerMove.runOut,
  pivot: CornerMove.pivot,
}
export const nameOfMove: Record<CornerMove, CornerMoveName> = {
  [CornerMove.none]: 'none',
  [CornerMove.lean]: 'lean',
  [CornerMove.runOut]: 'run-out',
  [CornerMove.pivot]: 'pivot',
  [CornerMove.step]: 'step',
}

/** The ways round a corner that a set of bits names. */
export function movesIn(offers: number): CornerMoveName[] {
  return Object.values(CornerMove)
    .filter((move) => (offers & (1 << move)) !== 0)
    .map((move) => nameOfMove[move])
}

/** How far down its path the jet has narrowed to nothing, mm, where that is within the plate; null otherwise. */
export function kerfClosesAt({ request, body, preps }: ReadRequest): number | null {
  const { kerf, taper = 0 } = request.jet ?? {}
  if (kerf === undefined || taper <= 0) return null
  const steepest = preps.list.reduce(
    (most, { facets }) => facets.reduce((own, { tilt }) => Math.max(own, Math.abs(tilt - taper)), most),
    0,
  )
  const closes = kerf / 2 / Math.tan(radians(taper))
  return closes < metalPath(body.thickness, radians(steepest)) ? closes : null
}

/** The caller's choices by the body's numbers; those for corners that the profile does not have are passed over. */
function choicesOf({ request, frame, numbering }: ReadRequest): PassChoices {
  const { corners = [], leadIn, leadOut, overlap } = request.passes ?? {}
  const chosen = new Map<number, CornerMove>()
  for (const { move, ...ref } of corners) {
    const first = frame.loopStart[ref.loop]
    const end = frame.loopStart[ref.loop + 1]
    if (first === undefined || end === undefined || first + ref.vertex >= end) continue
    chosen.set(first + numbering.cornerRef(ref).vertex, moveOfName[move])
  }
  return { corners: chosen, leadIn, leadOut, overlap }
}
