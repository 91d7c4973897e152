import { type Frame } from '../contours/frame.ts'
import { makePlaces, place, radiusAt, sweepAt } from '../contours/places.ts'
import type { Jet } from '../passes/types.ts'
import type { EdgeEnds, WallColumns } from '../walls/wall-table.ts'
import { putSpot, type Spots } from './spots.ts'

/** Corners and, round arcs, chords padded outward of all loops (or the outer one) at given offsets from the drawing. */
export function putContour(
  spots: Spots,
  frame: Frame,
  offsets: EdgeEnds,
  chordTolerance: number,
  outerOnly = false,
): void {
  const places = makePlaces(frame.count)
  place(frame, offsets, places)
  const count = outerOnly ? frame.loopStart[1]! : frame.count
  for (let g = 0; g < count; g++) {
    const loop = frame.loopOf[g]!
    putSpot(spots, loop, places.sx[g]!, places.sy[g]!)
    putSpot(spots, loop, places.ex[g]!, places.ey[g]!)
    // Hollows reach nothing that their ends do not.
    if (!(frame.arc[g]! && frame.sweep[g]! > 0) && !(frame.arc[g] && loop > 0)) continue
    const sweep = sweepAt(frame, g, places)
    const [cx, cy] = [frame.cx[g]!, frame.cy[g]!]
    // A blended arc goes evenly from one radius to the other; the larger one holds it.
    const radius = Math.max(radiusAt(frame, g, offsets.start[g]!), radiusAt(frame, g, offsets.end[g]!))
    const heading = Math.atan2(places.sy[g]! - cy, places.sx[g]! - cx)
    const pieces = Math.max(
      1,
      Math.ceil((Math.abs(sweep) * Math.sqrt(Math.max(0, radius))) / Math.sqrt(8 * chordTolerance)),
    )
    const pad = radius * (1 - Math.cos(sweep / (2 * pieces)))
    for (let k = 0; k <= pieces; k++) {
      const at = heading + (k / pieces) * sweep
      putSpot(spots, loop, cx + radius * Math.cos(at), cy + radius * Math.sin(at), 0, 0, 0, pad)
    }
  }
}

/**
 * Offset, at a depth, of the far side of the kerf of that facet of each wall which reaches furthest there when it is
 * prolonged through the plate: a jet cuts it on from the top face to below the plate. W/cos β beside the facet.
 */
export function kerfOffsets(
  { table, count }: Frame,
  { kerf, taper }: Jet,
  depth: number,
  deepest: number,
): EdgeEnds {
  const at = ({ facetTan, datum }: WallColumns) => {
    const perRow = table.walls.map((_, row) => {
      let furthest = -Infinity
      let top = 0
      let reach = 0
      for (let f = table.firstFacet[row]!; f < table.firstFacet[row + 1]!; f++) {
        const tan = facetTan[f]!
        const secant = Math.sqrt(1 + tan * tan)
        // A kerf that widens (τ < 0) does so on both sides over the whole path.
        const width = kerf + 2 * Math.max(0, -Math.tan(taper)) * deepest * secant
        furthest = Math.max(furthest, reach + (depth - top) * tan + width * secant)
        reach += (table.facetEnd[f]! - top) * tan
        top = table.facetEnd[f]!
      }
      return furthest - datum[row]!
    })
    return Float64Array.from({ length: count }, (_, g) => perRow[table.rowOfEdge[g]!]!)
  }
  const start = at(table.start)
  return { start, end: table.blends ? at(table.end) : start }
}
