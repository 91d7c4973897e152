import { frameOf } from '../contours/frame.ts'
import type { Body, EdgeEnd, Wall } from '../walls/types.ts'
import { blends, facetTilt } from '../walls/wall.ts'
import { bottomEdgeErrors, type ErrorBudget, type Uncertainty } from './error-budget.ts'

/**
 * What each uncertainty does to every facet of a wall, to first order. Every pass is set from the top face: its line in
 * the wall's section is y = o + d·tan β, turning about the top face by its own angle error, while the height error
 * carries all lines sideways by δz·tan β at once, which lowers or raises every meeting of two facets by δz. The
 * bottom face alone moves with the thickness, so the lowest facet takes the whole of δt: a root face set from the top
 * is shorter or longer by all of it.
 */
export interface FacetErrors {
  /** Of the facet's length down the plate, mm. */
  readonly length: ErrorBudget
  /** Of the facet's lower edge: sideways, and in depth below the top face, mm. */
  readonly sideways: ErrorBudget
  readonly depth: ErrorBudget
}

export interface WallErrors {
  readonly facets: readonly FacetErrors[]
  /** The facet nearest to vertical (of two alike the lower) where there are several: its index; null on a wall of one. */
  readonly rootFace: number | null
  /** The lowest facet's lower edge, sideways. */
  readonly bottomEdge: ErrorBudget
}

/**
 * Errors of one wall at one end of its edge. Where neighbouring facets are nearly in line their meeting is nearly
 * anywhere, and the errors from tilt grow without bound: infinite where they are in line and the angle is uncertain.
 */
export function wallErrors(
  { facets }: Wall,
  thickness: number,
  uncertainty: Uncertainty,
  end: EdgeEnd = 'start',
): WallErrors {
  const [dt, dz, db] = [uncertainty.thickness, uncertainty.height, uncertainty.tilt].map(Math.abs) as [
    number,
    number,
    number,
  ]
  const tilts = facets.map((facet) => facetTilt(facet, end))
  const w = tilts.map(Math.tan)
  /** Sideways move of a facet's line at a depth for a unit of its angle's error. */
  const swing = (k: number, depth: number) => depth / Math.cos(tilts[k]!) ** 2
  const last = facets.length - 1
  /** How the meeting of facet k with the next answers to the angle errors of k and k + 1: in depth, and sideways. */
  const meetings = facets.slice(0, -1).map(({ depth }, k) => {
    const [a, b] = [swing(k, depth), swing(k + 1, depth)]
    const apart = w[k]! - w[k + 1]!
    return {
      depth: [-a / apart, b / apart] as const,
      sideways: [(-a * w[k + 1]!) / apart, (b * w[k]!) / apart] as const,
    }
  })
  const rows = facets.map((_, k): FacetErrors => {
    const above = k > 0 ? meetings[k - 1]! : null
    const below = k < last ? meetings[k]! : null
    // Length is the lower end's depth less the upper end's; both share this facet's own angle error.
    const [fromPrevious, ownAbove] = above ? above.depth : [0, 0]
    const [ownBelow, fromNext] = below ? below.depth : [0, 0]
    const length = budget(
      below ? 0 : dt,
      // The plate's faces do not follow the head: only a facet between two meetings keeps its length.
      (above === null) === (below === null) ? 0 : dz,
      times(Math.hypot(fromPrevious, ownBelow - ownAbove, fromNext), db),
    )
    if (!below) {
      const sideways = bottomEdgeErrors(thickness, tilts[k]!, uncertainty)
      return { length, sideways, depth: budget(dt, 0, 0) }
    }
    return {
      length,
      sideways: budget(0, 0, times(Math.hypot(...below.sideways), db)),
      depth: budget(0, dz, times(Math.hypot(...below.depth), db)),
    }
  })
  const rootFace = last > 0 ? nearestToVertical(tilts) : null
  return { facets: rows, rootFace, bottomEdge: rows[last]!.sideways }
}

export interface BodyErrors {
  /** Errors of each distinct wall at the start and the end of its edges (the same where it does not blend). */
  readonly start: readonly WallErrors[]
  readonly end: readonly WallErrors[]
  /** Row of each edge, numbered through all loops. */
  readonly rowOfEdge: Int32Array
  /** Edge whose bottom edge may be off the most, and by how much all together; −1 and 0 without edges. */
  readonly worstEdge: number
  readonly worst: number
}

/** Errors of every wall; each distinct wall is worked out once. */
export function bodyErrors(body: Body, uncertainty: Uncertainty): BodyErrors {
  const { table } = frameOf(body)
  const start = table.walls.map((wall) => wallErrors(wall, body.thickness, uncertainty))
  const end = table.walls.map((wall, row) =>
    blends(wall) ? wallErrors(wall, body.thickness, uncertainty, 'end') : start[row]!,
  )
  const most = start.map((errors, row) => Math.max(errors.bottomEdge.together, end[row]!.bottomEdge.together))
  let worstEdge = -1
  let worst = 0
  for (const [g, row] of table.rowOfEdge.entries()) {
    if (worstEdge >= 0 && !(most[row]! > worst)) continue
    worstEdge = g
    worst = most[row]!
  }
  return { start, end, rowOfEdge: table.rowOfEdge, worstEdge, worst }
}

function nearestToVertical(tilts: readonly number[]): number {
  return tilts.reduce((best, tilt, k) => (Math.abs(tilt) <= Math.abs(tilts[best]!) ? k : best), 0)
}

/** An error of nothing is nothing, whatever it would be multiplied by. */
function times(factor: number, error: number): number {
  return error === 0 ? 0 : factor * error
}

function budget(fromThickness: number, fromHeight: number, fromTilt: number): ErrorBudget {
  return { fromThickness, fromHeight, fromTilt, together: Math.hypot(fromThickness, fromHeight, fromTilt) }
}
