import { cornerName, edgeName } from '../walls/names.ts'
import type { CornerRef, EdgeRef } from '../walls/types.ts'
import { rimClearance, standoffFor, type Nozzle } from '../jet/nozzle.ts'
import { radians } from '../units/angle.ts'
import { formatAngle, formatNumber } from '../units/format.ts'
import type { Finding } from './schema.ts'

/** Room that a cure leaves under the nozzle's rim, mm. Our choice, no source: the plate is never quite flat. */
export const RIM_MARGIN = 0.5

/**
 * One finding for the whole part, at the place of the largest tilt: the cure is one stand-off for all. Null when
 * the rim clears. `tilt` in degrees.
 */
export function nozzleTouches(place: EdgeRef | CornerRef, tilt: number, nozzle: Nozzle): Finding | null {
  const lean = radians(tilt)
  const clearance = rimClearance(nozzle, lean)
  if (clearance >= 0) return null
  const least = standoffFor(nozzle.diameter, lean, 0)
  const standoff = Math.ceil(standoffFor(nozzle.diameter, lean, RIM_MARGIN) * 10) / 10
  const where = 'edge' in place ? `edge ${edgeName(place)}` : `corner ${cornerName(place)}`
  return {
    code: 'nozzle-touches-plate',
    severity: 'warning',
    ...place,
    value: clearance,
    limit: 0,
    message:
      `At ${formatAngle(tilt)} (${where}) the rim of a ${formatNumber(nozzle.diameter)} mm nozzle would reach ` +
      `${formatNumber(-clearance)} mm into the plate; it clears from a stand-off of ${formatNumber(least)} mm.`,
    cure: { message: `Set the stand-off to ${formatNumber(standoff)} mm.`, standoff },
  }
}
