import type { Contour } from '../contours/types.ts'
import { reachAt } from '../walls/wall.ts'
import { edgeInDrawing } from '../geometry/orient.ts'
import { segmentLength } from '../geometry/segment.ts'
import { radians } from '../units/angle.ts'
import { metalPath } from '../jet/axis.ts'
import type { ReadRequest } from './read.ts'
import type { EvaluatedEdge } from './schema.ts'

type WallFigures = Pick<EvaluatedEdge, 'bottomOffset' | 'jetTilts' | 'wholeTilt' | 'metalPath'>

/** Every edge in the caller's order. `top` and `bottom` are null where the contour is not sound there. */
export function evaluatedEdges(
  { body, facets, reversed }: ReadRequest,
  taper: number,
  top: Contour | null,
  bottom: Contour | null,
): EvaluatedEdge[] {
  const figures = new Map<unknown, WallFigures>()
  const edges: EvaluatedEdge[] = []
  // Neighbours mostly share a prep: the map is asked only where it changes.
  let lastList: unknown
  let known: WallFigures | undefined
  for (const [loop, segments] of body.loops.entries()) {
    const n = segments.length
    const turned = reversed[loop] ?? false
    const topLengths = edgeLengths(top, loop, n)
    const bottomLengths = edgeLengths(bottom, loop, n)
    for (let edge = 0; edge < n; edge++) {
      const own = edgeInDrawing(edge, n, turned)
      const wall = body.walls[loop]?.[own]
      const list = facets[loop]?.[edge]
      if (!wall || !list) throw new Error('every edge has a wall')
      if (list !== lastList) known = figures.get(list)
      lastList = list
      if (!known) {
        const jetTilts = list.map(({ tilt }) => tilt - taper)
        const wholeTilt = jetTilts.reduce((most, tilt) => Math.max(most, Math.abs(tilt)), 0)
        known = {
          bottomOffset: reachAt(wall, body.thickness),
          jetTilts,
          wholeTilt,
          metalPath: metalPath(body.thickness, radians(wholeTilt)),
        }
        figures.set(list, known)
      }
      edges.push({
        loop,
        edge,
        topLength: topLengths?.[own] ?? null,
        bottomLength: bottomLengths?.[own] ?? null,
        bottomOffset: known.bottomOffset,
        jetTilts: known.jetTilts,
        wholeTilt: known.wholeTilt,
        metalPath: known.metalPath,
      })
    }
  }
  return edges
}

/** Lengths by edge in the body's numbering; steps belong to no edge. */
function edgeLengths(contour: Contour | null, loop: number, count: number): Float64Array | null {
  const segments = contour?.loops[loop]
  if (!segments) return null
  const lengths = new Float64Array(count)
  for (const segment of segments) if (segment.edge !== null) lengths[segment.edge]! += segmentLength(segment)
  return lengths
}
