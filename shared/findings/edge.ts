import { edgeName } from '../walls/names.ts'
import { radians } from '../units/angle.ts'
import { formatAngle, formatLength } from '../units/format.ts'
import { firstRise, reachability } from '../walls/reachability.ts'
import {
  LIMIT_ROUNDING,
  limitPassed,
  roundTilt,
  strictestLimit,
  withTilt,
  type EdgeWall,
  type Limits,
} from './place.ts'
import type { Cure, Finding } from './schema.ts'

/** Findings about one edge. */

/** Null when the jet stays within the limits along the whole edge. `taper` in degrees per side. */
export function edgeOverLimit(wall: EdgeWall, taper: number, limits: Limits): Finding | null {
  const facet = steepestFacet(wall, taper)
  const tilt = (wall.facets[facet]?.tilt ?? 0) - taper
  const value = Math.abs(tilt)
  const passed = limitPassed(value, limits)
  if (!passed) return null
  const name = edgeName(wall)
  const lean = taper === 0 ? '' : ` (wall ${formatAngle(wall.facets[facet]?.tilt ?? 0)}, taper tilted away)`
  return {
    code: passed.kind === 'mechanical' ? 'edge-over-mechanical-limit' : 'edge-over-working-limit',
    severity: passed.kind === 'mechanical' ? 'stop' : 'warning',
    loop: wall.loop,
    edge: wall.edge,
    value,
    limit: passed.limit,
    message: `Edge ${name} needs ${formatAngle(value)}${lean}; the ${passed.kind} limit is ${formatAngle(passed.limit)}.`,
    cure: cureEdge(wall, facet, taper, strictestLimit(limits)),
  }
}

function steepestFacet({ facets }: EdgeWall, taper: number): number {
  let steepest = 0
  facets.forEach(({ tilt }, i) => {
    if (Math.abs(tilt - taper) > Math.abs((facets[steepest]?.tilt ?? 0) - taper)) steepest = i
  })
  return steepest
}

function cureEdge(wall: EdgeWall, facet: number, taper: number, limit: number): Cure {
  const outward = (wall.facets[facet]?.tilt ?? 0) - taper > 0
  const most = taper + (outward ? limit : -limit)
  const tilt = roundTilt(most, outward ? 'down' : 'up')
  const cured = withTilt(wall, facet, tilt)
  const name = edgeName(wall)
  const whole = cured?.facets.every((own) => Math.abs(own.tilt - taper) <= limit + LIMIT_ROUNDING)
  if (!whole)
    return { message: `Bring every facet of ${name} to ${formatAngle(limit)} from vertical or less.` }
  const which = wall.facets.length === 1 ? name : `facet ${facet + 1} of ${name}`
  return {
    message: `Set ${which} to ${formatAngle(tilt)}.`,
    set: { edges: [{ loop: wall.loop, edge: wall.edge }], facet, tilt },
  }
}

/** A wall whose tilt increases with depth, at either end of its edge: a straight jet would cut into the part. */
export function facetsCutIn(wall: EdgeWall): Finding | null {
  const blends = wall.facets.some(({ endTilt }) => endTilt !== undefined)
  return cutIn(wall, wall, blends) ?? (blends ? cutIn(wall, atEnd(wall), blends) : null)
}

/** The wall as it stands at its edge's end. */
function atEnd(wall: EdgeWall): EdgeWall {
  return { ...wall, facets: wall.facets.map(({ depth, tilt, endTilt = tilt }) => ({ depth, tilt: endTilt })) }
}

/** `section`: the wall as it stands at one end. Along a blend what holds at both ends holds between them. */
function cutIn(wall: EdgeWall, section: EdgeWall, blends: boolean): Finding | null {
  if (firstRise(section.facets) < 0) return null
  const reach = reachability(section.facets.map(({ depth, tilt }) => ({ depth, tilt: radians(tilt) })))
  if (reach.kind === 'reachable') return null
  const { facet } = reach
  const above = section.facets[facet - 1]!
  const below = section.facets[facet]!
  const name = edgeName(wall)
  const overs = reach.turnedOverDoes
    ? 'Turned over, the plate could be cut.'
    : 'Turning the plate over does not help: the jet goes through the whole plate from either face.'
  return {
    code: 'facets-cut-into-part',
    severity: 'stop',
    loop: wall.loop,
    edge: wall.edge,
    value: below.tilt,
    limit: above.tilt,
    message:
      `Facet ${facet + 1} of edge ${name} leans ${formatAngle(below.tilt, { sign: true })} under ` +
      `${formatAngle(above.tilt, { sign: true })} at ${formatLength(above.depth, 'mm')}. Cutting either facet, a ` +
      `straight jet would go up to ${formatLength(reach.intoPart, 'mm')} into the part. ${overs}`,
    cure: cureFacet(wall, facet, blends ? null : above.tilt, reach.partDepth),
  }
}

/** `tilt`: the one that would do for the whole edge; null along a blend, where no one number does. */
function cureFacet(
  wall: EdgeWall,
  facet: number,
  tilt: number | null,
  partDepth: { readonly fromTop: readonly number[]; readonly fromBottom: readonly number[] } | null,
): Cure {
  const name = edgeName(wall)
  const list = (facets: readonly number[]) => facets.map((i) => i + 1).join(' and ')
  const split = partDepth
    ? ` Only cuts that stop inside the plate could keep the shape: facet ${list(partDepth.fromTop)} from the top, ` +
      `${list(partDepth.fromBottom)} from the bottom.`
    : ''
  if (tilt === null || !withTilt(wall, facet, tilt))
    return { message: `Let the tilt of ${name} only decrease with depth.${split}` }
  return {
    message: `Set facet ${facet + 1} of ${name} to ${formatAngle(tilt, { sign: true })} or less.${split}`,
    set: { edges: [{ loop: wall.loop, edge: wall.edge }], facet, tilt },
  }
}
