import type { Body, Datum, EdgeEnd, Wall } from './types.ts'
import { outermostReach, reachAt } from './wall.ts'

/** Reach, at one end of the edge, of the line of a wall that the drawing shows: what is taken from every reach so that it is 0 there. */
export function datumReach(wall: Wall, datum: Datum, thickness: number, end: EdgeEnd = 'start'): number {
  switch (datum) {
    case 'top':
      return 0
    case 'bottom':
      return reachAt(wall, thickness, end)
    case 'root':
      return outermostReach(wall, end)
  }
}

/** How far the edge's contour at a depth stands outside the drawing's outline at one of its ends, mm. */
export function offsetAt(
  body: Body,
  loop: number,
  edge: number,
  depth: number,
  end: EdgeEnd = 'start',
): number {
  const wall = body.walls[loop]?.[edge]
  if (!wall) throw new RangeError(`no wall for edge ${edge} of loop ${loop}`)
  return reachAt(wall, depth, end) - datumReach(wall, body.datum, body.thickness, end)
}
