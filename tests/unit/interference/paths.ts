import { frameOf } from '../../../shared/contours/frame.ts'
import { axisOffset } from '../../../shared/jet/axis.ts'
import { jetTilt } from '../../../shared/jet/taper.ts'
import { MoveKind, type Jet, type JetPath } from '../../../shared/passes/types.ts'
import type { Body } from '../../../shared/walls/types.ts'
import { offsetAt } from '../../../shared/walls/datum.ts'

/** Paths made by hand for the tests of interference. */

export interface Station {
  readonly x: number
  readonly y: number
  readonly p: number
  readonly q: number
  readonly move: number
  readonly edge?: number
  readonly round?: { readonly sweep: number; readonly cx: number; readonly cy: number }
}

export function pathOfStations(stations: readonly Station[]): JetPath {
  return {
    count: stations.length,
    x: Float64Array.from(stations, (s) => s.x),
    y: Float64Array.from(stations, (s) => s.y),
    p: Float64Array.from(stations, (s) => s.p),
    q: Float64Array.from(stations, (s) => s.q),
    move: Uint8Array.from(stations, (s) => s.move),
    edge: Int32Array.from(stations, (s) => s.edge ?? -1),
    facet: new Uint8Array(stations.length),
    sweep: Float64Array.from(stations, (s) => s.round?.sweep ?? 0),
    cx: Float64Array.from(stations, (s) => s.round?.cx ?? 0),
    cy: Float64Array.from(stations, (s) => s.round?.cy ?? 0),
  }
}

/** One path of its own, corner to corner and square to the edge, for every facet of every wall: it bites wherever corners turn in. */
export function alongWalls(body: Body, jet: Jet): { path: JetPath; passes: [] } {
  const frame = frameOf(body)
  const stations: Station[] = []
  for (let g = 0; g < frame.count; g++) {
    const [loop, edge] = [frame.loopOf[g]!, frame.edgeOf[g]!]
    const segment = body.loops[loop]![edge]!
    let top = 0
    for (const { depth, tilt } of body.walls[loop]![edge]!.facets) {
      const beside =
        offsetAt(body, loop, edge, top) - top * Math.tan(tilt) + axisOffset(jet.kerf, tilt, jet.taper)
      top = depth
      const slope = Math.tan(jetTilt(tilt, jet.taper))
      for (const [k, at] of [segment.from, segment.to].entries()) {
        let [nx, ny] = [frame.uy[g]!, -frame.ux[g]!]
        let round: Station['round']
        if (segment.kind === 'arc') {
          const out = Math.sign(segment.sweep)
          const { centre, sweep, radius } = segment
          nx = (out * (at.x - centre.x)) / radius
          ny = (out * (at.y - centre.y)) / radius
          round = { sweep, cx: centre.x, cy: centre.y }
        }
        stations.push({
          x: at.x + beside * nx,
          y: at.y + beside * ny,
          p: slope * nx,
          q: slope * ny,
          move: k === 0 ? MoveKind.cut : MoveKind.end,
          edge: g,
          ...(round && k === 0 ? { round } : {}),
        })
      }
    }
  }
  return { path: pathOfStations(stations), passes: [] }
}
