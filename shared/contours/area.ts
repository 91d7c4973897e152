import { capFactor } from '../geometry/loop.ts'
import type { Body } from '../walls/types.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'
import { frameOf, type Frame } from './frame.ts'
import { makePlaces, place, radiusAt, sweepAt, type Places } from './places.ts'
import { twiceSpiralCap } from './spiral.ts'

/** Area of the contour as a function of depth, mm², exact on arcs that blend too. Sound depths only (`soundRange`). */
export function areaByDepth(body: Body): (depth: number) => number {
  const frame = frameOf(body)
  const offsets = makeEdgeEnds(frame.table)
  const places = makePlaces(frame.count)
  return (depth) => {
    fillOffsets(frame.table, depth, offsets)
    place(frame, offsets, places)
    return areaOf(frame, offsets, places)
  }
}

/** Chords about the first corner, steps between unlike neighbours, and the caps of arcs. */
function areaOf(frame: Frame, offsets: EdgeEnds, places: Places): number {
  const { sx, sy, ex, ey } = places
  const { blends } = frame.table
  const ox = sx[0] ?? 0
  const oy = sy[0] ?? 0
  let twice = 0
  for (let g = 0; g < frame.count; g++) {
    const n = frame.next[g]!
    const ax = sx[g]! - ox
    const ay = sy[g]! - oy
    const bx = ex[g]! - ox
    const by = ey[g]! - oy
    twice += ax * by - ay * bx
    if (frame.hasSteps) twice += bx * (sy[n]! - oy) - by * (sx[n]! - ox)
    if (frame.hasArcs && frame.arc[g]) {
      const radius = radiusAt(frame, g, offsets.start[g]!)
      const sweep = sweepAt(frame, g, places)
      twice += blends
        ? twiceSpiralCap(radius, radiusAt(frame, g, offsets.end[g]!), sweep)
        : radius * radius * capFactor(sweep)
    }
  }
  return twice / 2
}
