import { plainLengths } from '../contours/plain-lengths.ts'
import { contourAt } from '../contours/contour.ts'
import { segmentLength } from '../geometry/segment.ts'
import { isPlain } from '../events/plain.ts'
import type { SoundRange } from '../events/range.ts'
import { metalPath } from '../jet/axis.ts'
import { facetsCutIn } from '../findings/edge.ts'
import { limitPassed, type Limits } from '../findings/place.ts'
import { reachAt } from '../walls/wall.ts'
import { radians } from '../units/angle.ts'
import type { Prep } from './preps.ts'
import type { ReadRequest } from './read.ts'

/** Everything about edges: what depends on the prep alone by prep, lengths by edge of the body. mm, degrees. */
export interface EdgeColumns {
  readonly preps: PrepFigures[]
  /** At every level of the frame; only the first and the last where the body is not plain. Null below an event. */
  readonly top: Float64Array | null
  readonly bottom: Float64Array | null
  /** All levels of a plain body; empty otherwise. */
  readonly lengths: readonly Float64Array[]
}

export interface PrepFigures {
  readonly bottomOffset: number
  readonly jetTilts: number[]
  readonly wholeTilt: number
  readonly metalPath: number
  /** Whether an edge with this prep has a finding of its own. */
  readonly found: boolean
}

export function edgeColumns(read: ReadRequest, range: SoundRange | null, limits: Limits | null): EdgeColumns {
  const { request, frame, preps } = read
  const taper = request.jet?.taper ?? 0
  const { thickness } = request.plate
  const figures = preps.list.map((prep) => prepFigures(prep, thickness, taper, limits))
  if (isPlain(frame)) {
    return { preps: figures, ...soundLengths(read, range, range ? plainLengths(frame) : []) }
  }
  const at = (depth: number) => (isSound(range, depth) ? contourLengths(read, depth) : null)
  return { preps: figures, top: at(0), bottom: at(thickness), lengths: [] }
}

/** What of the lengths of a plain body at all levels may be told. */
export function soundLengths(
  { request }: ReadRequest,
  range: SoundRange | null,
  lengths: readonly Float64Array[],
): Omit<EdgeColumns, 'preps'> {
  const at = (depth: number, level: number) => (isSound(range, depth) ? lengths.at(level)! : null)
  return { top: at(0, 0), bottom: at(request.plate.thickness, -1), lengths }
}

function isSound(range: SoundRange | null, depth: number): boolean {
  return range !== null && !range.empty && range.from <= depth && depth <= range.to
}

export function prepFigures(
  { facets, wall }: Prep,
  thickness: number,
  taper: number,
  limits: Limits | null,
): PrepFigures {
  const jetTilts = facets.map(({ tilt }) => tilt - taper)
  let wholeTilt = 0
  for (const { tilt, endTilt } of facets) {
    wholeTilt = Math.max(wholeTilt, Math.abs(tilt - taper), Math.abs((endTilt ?? tilt) - taper))
  }
  return {
    bottomOffset: reachAt(wall, thickness),
    jetTilts,
    wholeTilt,
    metalPath: metalPath(thickness, radians(wholeTilt)),
    found:
      (limits !== null && limitPassed(wholeTilt, limits) !== null) ||
      (facets.length > 1 && facetsCutIn({ loop: 0, edge: 0, facets }) !== null),
  }
}

/** Lengths by edge; steps belong to no edge. */
function contourLengths({ body, frame }: ReadRequest, depth: number): Float64Array {
  const lengths = new Float64Array(frame.count)
  contourAt(body, depth).loops.forEach((loop, l) => {
    for (const segment of loop) {
      if (segment.edge !== null) lengths[frame.loopStart[l]! + segment.edge]! += segmentLength(segment)
    }
  })
  return lengths
}
