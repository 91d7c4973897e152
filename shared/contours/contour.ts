import type { Point } from '../geometry/types.ts'
import { CornerMode, frameOf, type Frame } from './frame.ts'
import { makePlaces, place, radiusAt, sweepAt, type Places } from './places.ts'
import type { Body } from '../walls/types.ts'
import { spiralArcs } from './spiral.ts'
import type { Contour, ContourSegment } from './types.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'

/**
 * How far a contour may stand from the spiral of a blended arc, mm: a fiftieth of the finest general tolerance of
 * ISO 2768-1 (f: 0.05 mm, from memory), so that a drawing made of it shows nothing.
 */
export const SPIRAL_TOLERANCE = 1e-3

/**
 * The body's outline at a depth: lines moved, arcs with their new radius, neighbours met again. A line that blends
 * runs straight between its corners. Every segment tells its edge; an edge has one segment, or as many arcs as keep
 * within `tolerance` (mm) of the spiral where an arc blends. The caller keeps within `soundRange`: outside it the
 * plain contour is wrong, and nothing is promised about it.
 */
export function contourAt(body: Body, depth: number, tolerance = SPIRAL_TOLERANCE): Contour {
  const frame = frameOf(body)
  const offsets = makeEdgeEnds(frame.table)
  const places = makePlaces(frame.count)
  fillOffsets(frame.table, depth, offsets)
  place(frame, offsets, places)
  return { depth, loops: body.loops.map((_, l) => contourLoop(frame, l, offsets, places, tolerance)) }
}

function contourLoop(
  frame: Frame,
  loop: number,
  offsets: EdgeEnds,
  places: Places,
  tolerance: number,
): ContourSegment[] {
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
      const endRadius = radiusAt(frame, g, offsets.end[g]!)
      const edge = frame.edgeOf[g]!
      if (radius === endRadius) {
        out.push({ kind: 'arc', from, to, centre: segment.centre, radius, sweep, edge })
      } else {
        const spiral = { centre: segment.centre, from, to, fromRadius: radius, toRadius: endRadius, sweep }
        for (const arc of spiralArcs(spiral, tolerance)) out.push({ ...arc, edge })
      }
    }
    from = to
    if (stepped) {
      from = g === end - 1 ? opening : { x: places.sx[next]!, y: places.sy[next]! }
      out.push({ kind: 'line', from: to, to: from, edge: null })
    }
  }
  return out
}
