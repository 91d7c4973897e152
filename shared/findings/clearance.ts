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

export function jetCutsWall({ cutting, hit, depth, bite }: Bite): Finding {
  const [own, other] = [edgeName(cutting), edgeName(hit)]
  const wall = own === other ? 'its own wall' : `wall ${other}`
  return {
    code: 'jet-cuts-wall',
    severity: 'stop',
    loop: hit.loop,
    edge: hit.edge,
    value: bite,
    limit: 0,
    message: `The jet on its way along ${own} enters ${wall} by ${formatNumber(bite)} mm, ${formatNumber(depth)} mm deep.`,
    cure: { message: `Lessen the tilt of ${own}, widen the gap there, or use a jet with a narrower kerf.` },
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
