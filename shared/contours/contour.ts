import type { Point } from '../geometry/types.ts'
import {
  CornerMode,
  frameOf,
  makePlaces,
  place,
  radiusAt,
  sweepAt,
  type Frame,
  type Places,
} from './frame.ts'
import type { Body } from '../walls/types.ts'
import type { Contour, ContourSegment } from './types.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'

/**
 * The body's outline at a depth: lines moved, arcs with their new radius, neighbours met again. Edge e of a
 * loop is its e-th segment that is not a step. The caller keeps within `soundRange`: outside it the plain
 * contour is wrong, and nothing is promised about it.
 */
export function contourAt(body: Body, depth: number): Contour {
  const frame = frameOf(body)
  const offsets = makeEdgeEnds(frame.table)
  const places = makePlaces(frame.count)
  fillOffsets(frame.table, depth, offsets)
  place(frame, offsets, places)
  return { depth, loops: body.loops.map((_, l) => contourLoop(frame, l, offsets, places)) }
}

function contourLoop(frame: Frame, loop: number, offsets: EdgeEnds, places: Places): ContourSegment[] {
  const first = frame.loopStart[loop]!
  const end = frame.loopStart[loop + 1]!
  const out: ContourSegment[] = []
  const opening: Point = { x: places.sx[first]!, y: places.sy[first]! }
  let from = opening
  for (let g = first; g < end; g++) {
    const next = frame.next[g]!
    const stepped = frame.mode[next] === CornerMode.step && offsets.end[g] !== offsets.start[next]
    const to = !stepped && g === end - 1 ? opening : { x: places.ex[g]!, y: places.ey[g]! }
    const segment = frame.segments[g]!
    if (segment.kind === 'line') {
      out.push({ kind: 'line', from, to, edge: frame.edgeOf[g]! })
    } else {
      const radius = radiusAt(frame, g, offsets.start[g]!)
      const sweep = sweepAt(frame, g, places)
      out.push({ kind: 'arc', from, to, centre: segment.centre, radius, sweep, edge: frame.edgeOf[g]! })
    }
    from = to
    if (stepped) {
      from = g === end - 1 ? opening : { x: places.sx[next]!, y: places.sy[next]! }
      out.push({ kind: 'line', from: to, to: from, edge: null })
    }
  }
  return out
}
