import { frameOf } from '../contours/frame.ts'
import { datumReach } from '../walls/datum.ts'
import type { Body } from '../walls/types.ts'
import { reachAt } from '../walls/wall.ts'
import { jetAt, type JetLine } from './jet-at.ts'
import { MoveKind, type Jet, type Passes } from './types.ts'

export type PathFaultCode =
  /** A jet that should leave its wall stands off it or enters it. */
  | 'off-the-wall'
  /** A round move does not end where the next one begins. */
  | 'moves-do-not-join'
  /** A pass does not end with `end`, or goes on after it. */
  | 'ends-elsewhere'
  | 'not-finite'

export interface PathFault {
  readonly code: PathFaultCode
  readonly station: number
  /** mm; off the wall: positive outside the part. */
  readonly value: number
}

/** What is wrong with the passes of a body. `within`: how far a jet may stand off its wall, mm. */
export function pathFaults(body: Body, jet: Jet, { path, passes }: Passes, within: number): PathFault[] {
  const faults: PathFault[] = []
  const add = (code: PathFaultCode, station: number, value = 0) => faults.push({ code, station, value })
  for (const { first, last } of passes) {
    for (let i = first; i <= last; i++) {
      if (![path.x[i]!, path.y[i]!, path.p[i]!, path.q[i]!].every(Number.isFinite)) add('not-finite', i)
      if ((path.move[i] === MoveKind.end) !== (i === last)) add('ends-elsewhere', i)
      if (i === last) continue
      const end = jetAt(path, i, 1)
      const gap = Math.hypot(end.x - path.x[i + 1]!, end.y - path.y[i + 1]!)
      const slopeGap = Math.hypot(end.p - path.p[i + 1]!, end.q - path.q[i + 1]!) * body.thickness
      if (!(gap + slopeGap <= within)) add('moves-do-not-join', i, gap + slopeGap)
      if (path.move[i] !== MoveKind.cut) continue
      for (const part of [0, 0.3, 1]) {
        for (const depth of [0, body.thickness / 2, body.thickness]) {
          const off = standOff(body, jet, path.edge[i]!, path.facet[i]!, jetAt(path, i, part), depth)
          if (!(Math.abs(off) <= within)) add('off-the-wall', i, off)
        }
      }
    }
  }
  return faults
}

/**
 * How far outside a facet, prolonged, the near side of a jet stands at a depth, mm square to the facet; negative
 * inside. Worked out from the body alone.
 */
export function standOff(
  body: Body,
  jet: Jet,
  g: number,
  facet: number,
  line: JetLine,
  depth: number,
): number {
  const frame = frameOf(body)
  const wall = body.walls[frame.loopOf[g]!]![frame.edgeOf[g]!]!
  const { tilt } = wall.facets[facet]!
  const top = facet === 0 ? 0 : wall.facets[facet - 1]!.depth
  const offset =
    reachAt(wall, top) + (depth - top) * Math.tan(tilt) - datumReach(wall, body.datum, body.thickness)
  const x = line.x + depth * line.p
  const y = line.y + depth * line.q
  const outside = frame.arc[g]
    ? Math.sign(frame.sweep[g]!) * (Math.hypot(x - frame.cx[g]!, y - frame.cy[g]!) - frame.radius[g]!)
    : (x - frame.px[g]!) * frame.uy[g]! - (y - frame.py[g]!) * frame.ux[g]!
  const along = depth * Math.sqrt(1 + line.p * line.p + line.q * line.q)
  const half = jet.kerf / 2 - along * Math.tan(jet.taper)
  return (outside - offset) * Math.cos(tilt) - half * Math.cos(jet.taper)
}
