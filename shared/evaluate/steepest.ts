import { blockCount, blockRange } from '../geometry/blocks.ts'
import { LIMIT_ROUNDING } from '../findings/place.ts'
import { radians } from '../units/angle.ts'
import { slopeDegrees, type CornerColumns } from './corner-columns.ts'
import type { EdgeColumns } from './edge-columns.ts'
import type { ReadRequest } from './read.ts'
import type { Evaluation } from './schema.ts'

/**
 * The largest need of every block of edges and of corners, in the caller's order. They only let whole blocks be passed
 * over: what is found is the same without them.
 */
export interface NeedBlocks {
  /** Degrees. */
  readonly edges: Float64Array
  /** Squared slopes. */
  readonly corners: Float64Array
}

export function needBlocks(read: ReadRequest, edges: EdgeColumns, corners: CornerColumns): NeedBlocks {
  const blocks = blockCount(read.frame.count)
  const out = { edges: new Float64Array(blocks), corners: new Float64Array(blocks) }
  for (let block = 0; block < blocks; block++) {
    refreshEdgeNeed(read, edges, block, out)
    refreshCornerNeed(read, corners, block, out)
  }
  return out
}

export function refreshEdgeNeed(
  { preps }: ReadRequest,
  edges: EdgeColumns,
  block: number,
  out: NeedBlocks,
): void {
  const [first, end] = blockRange(block, preps.ofEdge.length)
  let most = -1
  for (let e = first; e < end; e++) most = Math.max(most, edges.preps[preps.ofEdge[e]!]!.wholeTilt)
  out.edges[block] = most
}

export function refreshCornerNeed(
  { frame, numbering }: ReadRequest,
  { jet }: CornerColumns,
  block: number,
  out: NeedBlocks,
): void {
  const [first, end] = blockRange(block, frame.count)
  let most = -1
  for (let c = first; c < end; c++) most = Math.max(most, jet[numbering.corner ? numbering.corner[c]! : c]!)
  out.corners[block] = most
}

/** Where the jet needs the largest tilt. A corner counts only where it asks for more than every edge. */
export function neededTilt(
  read: ReadRequest,
  edges: EdgeColumns,
  corners: CornerColumns,
  blocks: NeedBlocks | null = null,
): Evaluation['neededTilt'] {
  const { numbering } = read
  const edge = steepestEdge(read, edges, blocks)
  if (edge < 0) return null
  const most = edges.preps[read.preps.ofEdge[edge]!]!.wholeTilt
  const corner = steepestCorner(read, corners, most, blocks)
  if (corner < 0) return { tilt: most, at: numbering.edgeAt(edge) }
  const g = numbering.corner ? numbering.corner[corner]! : corner
  return { tilt: slopeDegrees(corners.jet[g]!)!, at: numbering.cornerAt(corner) }
}

/** The first edge, in the caller's order, of those that need the most. */
function steepestEdge({ preps }: ReadRequest, edges: EdgeColumns, blocks: NeedBlocks | null): number {
  const { ofEdge } = preps
  const wholeTilt = Float64Array.from(edges.preps, (figures) => figures.wholeTilt)
  let most = -1
  let steepest = -1
  for (let block = 0; block < blockCount(ofEdge.length); block++) {
    if (blocks && !(blocks.edges[block]! > most)) continue
    const [first, end] = blockRange(block, ofEdge.length)
    for (let e = first; e < end; e++) {
      const tilt = wholeTilt[ofEdge[e]!]!
      if (tilt > most) [most, steepest] = [tilt, e]
    }
  }
  return steepest
}

/** The first corner, in the caller's order, that needs more than `least` degrees and than all others; −1 for none. */
function steepestCorner(
  { frame, numbering }: ReadRequest,
  { jet }: CornerColumns,
  least: number,
  blocks: NeedBlocks | null,
): number {
  let most = least
  let square = squareBelow(most)
  let steepest = -1
  for (let block = 0; block < blockCount(frame.count); block++) {
    if (blocks && !(blocks.corners[block]! > square)) continue
    const [first, end] = blockRange(block, frame.count)
    for (let c = first; c < end; c++) {
      const slope = jet[numbering.corner ? numbering.corner[c]! : c]!
      // The tangent only sorts out; the comparison itself is in degrees.
      if (!(slope > square)) continue
      const tilt = slopeDegrees(slope)!
      if (tilt > most + LIMIT_ROUNDING) [most, square, steepest] = [tilt, squareBelow(tilt), c]
    }
  }
  return steepest
}

/** Share by which rounding may have moved a squared slope: a thousand times what a tangent and a square lose. */
const SLOPE_ROUNDING = 1e-12

/** A squared slope that no tilt above the given one, degrees, falls below. */
function squareBelow(tilt: number): number {
  return Math.tan(radians(Math.min(tilt + LIMIT_ROUNDING, 90))) ** 2 * (1 - SLOPE_ROUNDING)
}
