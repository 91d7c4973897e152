import { edgeName } from '../walls/names.ts'
import { formatAngle } from '../units/format.ts'
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

/** A wall whose tilt increases with depth: a straight jet from the top would cut into the part. */
export function facetsCutIn(wall: EdgeWall): Finding | null {
  const index = wall.facets.findIndex(({ tilt }, i) => i > 0 && tilt > (wall.facets[i - 1]?.tilt ?? tilt))
  const [above, below] = [wall.facets[index - 1], wall.facets[index]]
  if (!above || !below) return null
  const name = edgeName(wall)
  return {
    code: 'facets-cut-into-part',
    severity: 'stop',
    loop: wall.loop,
    edge: wall.edge,
    value: below.tilt,
    limit: above.tilt,
    message:
      `Edge ${name} goes from ${formatAngle(above.tilt, { sign: true })} to ${formatAngle(below.tilt, { sign: true })} ` +
      `at ${formatDepth(above.depth)}. A straight jet from the top would cut into the part.`,
    cure: {
      message: `Cut ${name} in a second set-up with the plate turned over, or let its tilt only decrease with depth.`,
    },
  }
}

function formatDepth(depth: number): string {
  return `${Number(depth.toFixed(2))} mm`
}
