import type { EdgeRef } from '../walls/types.ts'
import { edgeName } from '../walls/names.ts'
import { formatNumber } from '../units/format.ts'
import { RIM_MARGIN } from './nozzle.ts'
import type { Finding } from './schema.ts'

/** Findings about what the jet and the head come too near to. mm; the caller's numbering. */

export interface Bite {
  readonly cutting: EdgeRef
  readonly hit: EdgeRef
  readonly depth: number
  /** How deep the jet stands in the wall, mm. */
  readonly bite: number
}

/** Below `graze` (mm) it is a note: no cut shows it. */
export function jetCutsWall({ cutting, hit, depth, bite }: Bite, graze: number): Finding {
  const [own, other] = [edgeName(cutting), edgeName(hit)]
  const wall = own === other ? 'its own wall' : `wall ${other}`
  return {
    code: 'jet-cuts-wall',
    severity: bite < graze ? 'note' : 'stop',
    loop: hit.loop,
    edge: hit.edge,
    value: bite,
    limit: 0,
    message: `The jet on its way along ${own} enters ${wall} by ${biteText(bite)}, ${formatNumber(depth)} mm deep.`,
    cure: { message: `Lessen the tilt of ${own}, widen the gap there, or use a jet with a narrower kerf.` },
  }
}

function biteText(bite: number): string {
  return bite < 0.01 ? 'less than 0.01 mm' : `${formatNumber(bite)} mm`
}

/** Pairs of walls whose jets touch each other’s walls, if at all, by less than anyone can see. */
export function jetMayGraze(pairs: number, graze: number): Finding {
  return {
    code: 'jet-may-graze',
    severity: 'note',
    value: pairs,
    message: `In ${pairs} places the jet runs so close along a wall that a touch of up to ${formatNumber(graze)} mm could not be ruled out.`,
  }
}

/** Pairs of walls for which the search gave up. */
export function jetClearanceUnknown(pairs: number): Finding {
  return {
    code: 'jet-clearance-unknown',
    severity: 'warning',
    value: pairs,
    message: `For ${pairs} pairs of walls it could not be shown whether the jet of one enters the other.`,
    cure: { message: 'Look at narrow places by eye before cutting.' },
  }
}

/** `clearance`: height of the head's rim over the plate, negative when it would touch; `least`: the stand-off that clears. */
export function headTouchesPlate(clearance: number, least: number): Finding {
  const standoff = Math.ceil((least + RIM_MARGIN) * 10) / 10
  return {
    code: 'head-touches-plate',
    severity: 'warning',
    value: clearance,
    limit: 0,
    message: `The head’s widest rim would reach ${formatNumber(-clearance)} mm into the plate; it clears from a stand-off of ${formatNumber(least)} mm.`,
    cure: { message: `Set the stand-off to ${formatNumber(standoff)} mm.`, standoff },
  }
}
