import type { Body, Wall } from './types.ts'
import { datumReach } from './datum.ts'

/**
 * The distinct walls of a body with their tangents worked out, so that a whole plate is placed at a depth
 * without a tangent per edge. Walls are told apart by identity: edges that share one share its row.
 */
export interface WallTable {
  readonly walls: readonly Wall[]
  /** Row of each edge, edges numbered through all loops. */
  readonly rowOfEdge: Int32Array
  /** Per row: what is taken from its reach so that it is 0 at the datum, mm. */
  readonly datum: Float64Array
  /** Rows' facets are firstFacet[row] up to firstFacet[row + 1]. */
  readonly firstFacet: Int32Array
  readonly facetEnd: Float64Array
  readonly facetTan: Float64Array
}

export function wallTable(body: Body): WallTable {
  const walls: Wall[] = []
  const rows = new Map<Wall, number>()
  const edgeCount = body.loops.reduce((sum, loop) => sum + loop.length, 0)
  const rowOfEdge = new Int32Array(edgeCount)
  let g = 0
  for (const [l, loop] of body.loops.entries()) {
    for (let e = 0; e < loop.length; e++) {
      const wall = body.walls[l]?.[e]
      if (!wall) throw new RangeError(`no wall for edge ${e} of loop ${l}`)
      let row = rows.get(wall)
      if (row === undefined) {
        row = walls.push(wall) - 1
        rows.set(wall, row)
      }
      rowOfEdge[g++] = row
    }
  }
  const facetCount = walls.reduce((sum, wall) => sum + wall.facets.length, 0)
  const datum = new Float64Array(walls.length)
  const firstFacet = new Int32Array(walls.length + 1)
  const facetEnd = new Float64Array(facetCount)
  const facetTan = new Float64Array(facetCount)
  let f = 0
  for (const [row, wall] of walls.entries()) {
    for (const facet of wall.facets) {
      facetEnd[f] = facet.depth
      facetTan[f++] = Math.tan(facet.tilt)
    }
    firstFacet[row + 1] = f
    datum[row] = datumReach(wall, body.datum, body.thickness)
  }
  return { walls, rowOfEdge, datum, firstFacet, facetEnd, facetTan }
}

/** A figure for every edge at its start and at its end; one array serves both where no wall changes along its edge. */
export interface EdgeEnds {
  readonly start: Float64Array
  readonly end: Float64Array
}

export function makeEdgeEnds(count: number): EdgeEnds {
  const both = new Float64Array(count)
  return { start: both, end: both }
}

/** Fills `out` with the offset of every edge's contour at a depth from the drawing's outline, mm. */
export function fillOffsets(table: WallTable, depth: number, out: EdgeEnds): void {
  const perRow = table.walls.map((_, row) => {
    const last = table.firstFacet[row + 1]! - 1
    let reach = 0
    let top = 0
    for (let f = table.firstFacet[row]!; f <= last; f++) {
      const end = f === last ? depth : Math.min(depth, table.facetEnd[f]!)
      reach += (end - top) * table.facetTan[f]!
      top = table.facetEnd[f]!
      if (depth <= top) break
    }
    return reach - table.datum[row]!
  })
  spread(table, perRow, out.start)
}

/** Fills `out` with the tangent of the tilt just below a depth: how fast each contour moves outward with depth. */
export function fillRates(table: WallTable, depth: number, out: EdgeEnds): void {
  const perRow = table.walls.map((_, row) => table.facetTan[facetBelow(table, row, depth)]!)
  spread(table, perRow, out.start)
}

/** Index into the table's facets of the one just below a depth. */
function facetBelow(table: WallTable, row: number, depth: number): number {
  const last = table.firstFacet[row + 1]! - 1
  let f = table.firstFacet[row]!
  while (f < last && depth >= table.facetEnd[f]!) f++
  return f
}

/** Whether two rows stand at the same offset at every depth. */
export function sameOffsets(table: WallTable, a: number, b: number): boolean {
  if (a === b) return true
  if (table.datum[a] !== table.datum[b]) return false
  let fa = table.firstFacet[a]!
  let fb = table.firstFacet[b]!
  const lastA = table.firstFacet[a + 1]! - 1
  const lastB = table.firstFacet[b + 1]! - 1
  for (;;) {
    if (table.facetTan[fa] !== table.facetTan[fb]) return false
    const endA = fa < lastA ? table.facetEnd[fa]! : Infinity
    const endB = fb < lastB ? table.facetEnd[fb]! : Infinity
    if (endA === Infinity && endB === Infinity) return true
    if (endA <= endB) fa++
    if (endB <= endA) fb++
  }
}

function spread(table: WallTable, perRow: readonly number[], out: Float64Array): void {
  for (let g = 0; g < out.length; g++) out[g] = perRow[table.rowOfEdge[g]!]!
}
