import type { EvaluatedPass } from '../passes/schema.ts'
import type { Passes } from '../passes/types.ts'
import { runAtDepth } from '../process/move-length.ts'
import { degrees } from '../units/angle.ts'
import type { EvaluatedPiece, EvaluatedWayOut } from '../way-out/schema.ts'
import type { PieceWayOut, WayOut, WaysOut } from '../way-out/types.ts'

/** The jet's way and the way out as the answer's schema has them. */

export function passViews({ path, passes }: Passes): EvaluatedPass[] {
  return passes.map(({ loop, level, closed, reasons, first, last }) => {
    const run = { length: 0, fastest: 0 }
    let length = 0
    let steepest = 0
    for (let i = first; i <= last; i++) {
      steepest = Math.max(steepest, Math.hypot(path.p[i]!, path.q[i]!))
      if (i === last) break
      runAtDepth(path, i, 0, run)
      length += run.length
    }
    return {
      loop,
      level,
      closed,
      reasons: [...reasons],
      pierce: { x: path.x[first]!, y: path.y[first]! },
      length,
      largestTilt: degrees(Math.atan(steepest)),
    }
  })
}

export function wayOutViews({ part, slugs }: WaysOut): EvaluatedPiece[] {
  return [part, ...slugs].map(({ loop, free, withinKerf }: PieceWayOut) => ({
    loop,
    free: wayView(free),
    withinKerf: wayView(withinKerf),
  }))
}

function wayView({ verdict, direction }: WayOut): EvaluatedWayOut {
  return {
    verdict,
    upward: direction && direction.z > 0,
    angle: direction && degrees(direction.angle),
    heading: direction === null || direction.heading === null ? null : degrees(direction.heading),
  }
}
