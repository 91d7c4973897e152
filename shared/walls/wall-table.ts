import type { Body, EdgeEnd, Wall } from './types.ts'
import { datumReach } from './datum.ts'
import { blends, facetTilt } from './wall.ts'

/**
 * The distinct walls of a body with their tangents worked out, so that a whole plate is placed at a depth
 * without a tangent per edge. Walls are told apart by identity: edges that share one share its row.
 */
export interface WallTable {
  readonly walls: readonly Wall[]
  /** Row of each edge, edges numbered through all loops. */
  readonly rowOfEdge: Int32Array
  /** Whether any wall changes its tilt along its edge; otherwise `start` and `end` are the same columns. */
  readonly blends: boolean
  /** Per row: 1 where the wall blends. */
  readonly blended: Uint8Array
  /** Rows' facets are firstFacet[row] up to firstFacet[row + 1]. */
  readonly firstFacet: Int32Array
  readonly facetEnd: Float64Array
  /** What holds at the edge's start and at its end. */
  readonly start: WallColumns
  readonly end: WallColumns
}

export interface WallColumns {
  /** Per row: what is taken from its reach so that it is 0 at the datum, mm. */
  readonly datum: Float64Array
  /** Per facet: the tangent of its tilt. */
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
  return tableOf(walls, rowOfEdge, body)
}

/** The table of walls that are known to be distinct; `rowOfEdge` by edge through all loops. */
export function tableOf(
  walls: readonly Wall[],
  rowOfEdge: Int32Array,
  { datum, thickness }: Pick<Body, 'datum' | 'thickness'>,
): WallTable {
  const facetCount = walls.reduce((sum, wall) => sum + wall.facets.length, 0)
  const firstFacet = new Int32Array(walls.length + 1)
  const facetEnd = new Float64Array(facetCount)
  let f = 0
  for (const [row, wall] of walls.entries()) {
    for (const facet of wall.facets) facetEnd[f++] = facet.depth
    firstFacet[row + 1] = f
  }
  const blended = Uint8Array.from(walls, (wall) => (blends(wall) ? 1 : 0))
  const anyBlends = blended.includes(1)
  const columns = (end: EdgeEnd): WallColumns => ({
    datum: Float64Array.from(walls, (wall) => datumReach(wall, datum, thickness, end)),
    facetTan: Float64Array.from(
      walls.flatMap(({ facets }) => facets.map((facet) => Math.tan(facetTilt(facet, end)))),
    ),
  })
  const start = columns('start')
  const end = anyBlends ? columns('end') : start
  return { walls, rowOfEdge, blends: anyBlends, blended, firstFacet, facetEnd, start, end }
}

/** A figure for every edge at its start and at its end; one array serves both where no wall changes along its edge. */
export interface EdgeEnds {
  readonly start: Float64Array
  readonly end: Float64Array
}

/** Columns for the edges of a table. */
export function makeEdgeEnds({ rowOfEdge, blends: unlike }: WallTable): EdgeEnds {
  const start = new Float64Array(rowOfEdge.length)
  return { start, end: unlike ? new Float64Array(rowOfEdge.length) : start }
}

/** Fills `out` with the offset of every edge's contour at a depth from the drawing's outline, mm. */
export function fillOffsets(table: WallTable, depth: number, out: EdgeEnds): void {
  fillEnds(table, out, (columns) => rowOffsets(table, columns, depth))
}

/** Per row: offset of its contour at a depth from the drawing's outline, mm. */
export function rowOffsets(table: WallTable, columns: WallColumns, depth: number): number[] {
  return table.walls.map((_, row) => {
    const last = table.firstFacet[row + 1]! - 1
    let reach = 0
    let top = 0
    for (let f = table.firstFacet[row]!; f <= last; f++) {
      const end = f === last ? depth : Math.min(depth, table.facetEnd[f]!)
      reach += (end - top) * columns.facetTan[f]!
      top = table.facetEnd[f]!
      if (depth <= top) break
    }
    return reach - columns.datum[row]!
  })
}

/** Fills `out` with the tangent of the tilt just below a depth: how fast each contour moves outward with depth. */
export function fillRates(table: WallTable, depth: number, out: EdgeEnds): void {
  fillEnds(table, out, (columns) => rowRates(table, columns, depth))
}

/** Per row: tangent of the tilt just below a depth. */
export function rowRates(table: WallTable, { facetTan }: WallColumns, depth: number): number[] {
  return table.walls.map((_, row) => facetTan[facetBelow(table, row, depth)]!)
}

function fillEnds(table: WallTable, out: EdgeEnds, perRow: (columns: WallColumns) => number[]): void {
  spread(table, perRow(table.start), out.start)
  if (!table.blends) return
  if (out.end === out.start) throw new Error('walls that blend need a column for each end')
  spread(table, perRow(table.end), out.end)
}

/** Index into the table's facets of the one just below a depth. */
function facetBelow(table: WallTable, row: number, depth: number): number {
  const last = table.firstFacet[row + 1]! - 1
  let f = table.firstFacet[row]!
  while (f < last && depth >= table.facetEnd[f]!) f++
  return f
}

/** Whether the wall of row `a` stands, at its edge's end, at the same offset as that of row `b` at its start, at every depth. */
export function sameOffsets(table: WallTable, a: number, b: number): boolean {
  if (a === b && !table.blended[a]) return true
  const { start, end } = table
  if (end.datum[a] !== start.datum[b]) return false
  let fa = table.firstFacet[a]!
  let fb = table.firstFacet[b]!
  const lastA = table.firstFacet[a + 1]! - 1
  const lastB = table.firstFacet[b + 1]! - 1
  for (;;) {
    if (end.facetTan[fa] !== start.facetTan[fb]) return false
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
