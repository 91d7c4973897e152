import { rimClearance, standoffFor } from '../jet/nozzle.ts'
import type { Passes } from '../passes/types.ts'
import type { HeadShape, RimClearance } from './types.ts'

/**
 * How near the head's rims come to the plate's top plane, and where. A rim only sinks as the whole tilt grows, and
 * along a move the tilt is greatest at one of its ends (slopes go evenly, or evenly in a frame that turns), so the
 * steepest station of all tells. The whole sheet counts as plate, whatever has been cut out of it.
 */
export function rimsOf(
  { path, passes }: Pick<Passes, 'path' | 'passes'>,
  head: HeadShape,
): readonly RimClearance[] {
  let steepest = -1
  let station = -1
  let pass = -1
  for (const [k, { first, last }] of passes.entries()) {
    for (let i = first; i <= last; i++) {
      const square = path.p[i]! * path.p[i]! + path.q[i]! * path.q[i]!
      if (square > steepest) {
        steepest = square
        station = i
        pass = k
      }
    }
  }
  if (station < 0) return []
  const tilt = Math.atan(Math.sqrt(steepest))
  const at = { tilt, station, pass, x: path.x[station]!, y: path.y[station]! }
  const rim = (name: RimClearance['rim'], diameter: number, above: number): RimClearance => ({
    rim: name,
    clearance: rimClearance({ diameter, standoff: head.nozzle.standoff + above }, tilt),
    standoff: Math.max(0, standoffFor(diameter, tilt, 0) - above),
    ...at,
  })
  const rims = [rim('nozzle', head.nozzle.diameter, 0)]
  if (head.cone) rims.push(rim('head', head.cone.diameter, head.cone.above))
  return rims
}
