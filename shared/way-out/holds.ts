import type { Frame } from '../contours/frame.ts'
import { allowanceOf, type Allowance } from './walls-hold.ts'

/**
 * What holds a piece, in columns: row i says that a move (x, y, ±1) must keep n·(x, y) ≤ bound for every unit
 * normal n from (ax, ay) counter-clockwise to (bx, by). A line has one normal, an arc a range of them; longer
 * arcs take several rows.
 */
export interface Holds {
  readonly count: number
  readonly ax: Float64Array
  readonly ay: Float64Array
  readonly bx: Float64Array
  readonly by: Float64Array
  /** 1 where the two ends differ. */
  readonly round: Uint8Array
  /** Edge through all loops. */
  readonly edge: Int32Array
  readonly up: Float64Array
  readonly down: Float64Array
}

/**
 * Widest range of headings in one row, radians. A row whose bound is 0 or less is settled by its two ends
 * alone only below half a turn, and two ends that nearly oppose each other would lose figures.
 */
export const WIDEST_ROW = 2

/**
 * Rows of one loop's edges in order. `side`: 1 for the piece on the loop's material side, −1 for the waste
 * beyond. `widest`: arcs are divided into rows of at most so many radians, evenly.
 */
export function holdsOf(frame: Frame, loop: number, side: 1 | -1, kerf: number, widest = WIDEST_ROW): Holds {
  const { loopStart, sweep, ux, uy, table } = frame
  const first = loopStart[loop]!
  const end = loopStart[loop + 1]!
  let count = 0
  for (let g = first; g < end; g++) count += rowsOf(sweep[g]!, widest)
  const allowances = allowancesOf(frame, side, kerf)
  const numbers = () => new Float64Array(count)
  const [ax, ay, bx, by, up, down] = [numbers(), numbers(), numbers(), numbers(), numbers(), numbers()]
  const round = new Uint8Array(count)
  const edge = new Int32Array(count)
  let i = 0
  for (let g = first; g < end; g++) {
    const rows = rowsOf(sweep[g]!, widest)
    const { up: upward, down: downward } = allowances[table.rowOfEdge[g]!]!
    // Normal at the edge's start, to the right of travel; along an arc it turns with the sweep.
    const nx = side * uy[g]!
    const ny = -side * ux[g]!
    for (let k = 0; k < rows; k++, i++) {
      edge[i] = g
      up[i] = upward
      down[i] = downward
      const from = (sweep[g]! * k) / rows
      const to = (sweep[g]! * (k + 1)) / rows
      if (from === to) {
        ax[i] = bx[i] = nx
        ay[i] = by[i] = ny
        continue
      }
      round[i] = 1
      const low = Math.min(from, to)
      const high = Math.max(from, to)
      ax[i] = nx * Math.cos(low) - ny * Math.sin(low)
      ay[i] = nx * Math.sin(low) + ny * Math.cos(low)
      bx[i] = nx * Math.cos(high) - ny * Math.sin(high)
      by[i] = nx * Math.sin(high) + ny * Math.cos(high)
    }
  }
  return { count, ax, ay, bx, by, round, edge, up, down }
}

/** What each distinct wall of the body allows, by its row in the table. */
export function allowancesOf({ table, body }: Frame, side: 1 | -1, kerf: number): readonly Allowance[] {
  return table.walls.map((wall) => allowanceOf(wall, side, body.thickness, kerf))
}

function rowsOf(sweep: number, widest: number): number {
  return sweep === 0 ? 1 : Math.ceil(Math.abs(sweep) / widest)
}
