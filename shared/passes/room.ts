import { CornerMode, radiusAt, type Frame } from '../contours/frame.ts'
import type { Point } from '../geometry/types.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'
import { cornerAt } from './level.ts'

/**
 * The walls of a body as things that a jet must keep off, ready for many questions. Edges follow each other, so
 * boxes round short runs of them are index enough: a question reads one box per run, and places only the edges
 * of the runs that it meets.
 */
export interface Room {
  readonly frame: Frame
  /** Depths between which no wall changes tilt, with every edge's offset there. */
  readonly depths: readonly number[]
  readonly offsets: readonly EdgeEnds[]
  /** minX, minY, maxX, maxY of every run of `RUN` edges over all depths. */
  readonly boxes: Float64Array
}

/** Edges per box. */
const RUN = 8

export function roomOf(frame: Frame): Room {
  const depths = depthsOf(frame)
  const offsets = depths.map((depth) => {
    const out = makeEdgeEnds(frame.table)
    fillOffsets(frame.table, depth, out)
    return out
  })
  // The farthest that any wall stands from the drawing, at any depth, and the most that two of them differ by.
  let [least, most] = [0, 0]
  for (const { start, end } of offsets) {
    for (const column of start === end ? [start] : [start, end]) {
      for (let g = 0; g < frame.count; g++) {
        const own = column[g]!
        if (own < least) least = own
        if (own > most) most = own
      }
    }
  }
  const boxes = new Float64Array(4 * Math.ceil(frame.count / RUN))
  for (let b = 0; b < boxes.length / 4; b++) {
    fillBox(frame, Math.max(most, -least), most - least, offsets, boxes, b)
  }
  return { frame, depths, offsets, boxes }
}

/** Told by the distinct walls, so that it does not read every edge. */
function depthsOf({ table, body }: Frame): number[] {
  const depths = new Set([0, body.thickness])
  for (const { facets } of table.walls) {
    for (const { depth } of facets) if (depth < body.thickness) depths.add(depth)
  }
  return [...depths].sort((a, b) => a - b)
}

/**
 * Drawn corners, widened by the farthest that a corner of the run can move: offset times its mitre vector, and the
 * difference of two offsets times the vector for unlike ones. Corners beside arcs are placed at every depth.
 */
function fillBox(
  frame: Frame,
  farthest: number,
  unlike: number,
  offsets: readonly EdgeEnds[],
  boxes: Float64Array,
  b: number,
): void {
  const { px, py, mx, my, kx, ky, arc, mode, next, previous } = frame
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity]
  let square = 0
  let unlikeSquare = 0
  let pad = 0
  const include = (x: number, y: number) => {
    if (x < minX) minX = x
    if (x > maxX) maxX = x
    if (y < minY) minY = y
    if (y > maxY) maxY = y
  }
  const corner = (g: number) => {
    include(px[g]!, py[g]!)
    square = Math.max(square, mx[g]! * mx[g]! + my[g]! * my[g]!)
    unlikeSquare = Math.max(unlikeSquare, kx[g]! * kx[g]! + ky[g]! * ky[g]!)
    if (mode[g] !== CornerMode.branch) return
    for (const { start, end } of offsets) {
      const { x, y } = cornerAt(frame, g, end[previous[g]!]!, start[g]!)
      include(x, y)
    }
  }
  const last = Math.min(frame.count, (b + 1) * RUN)
  for (let g = b * RUN; g < last; g++) {
    corner(g)
    if (next[g] !== g + 1 || g + 1 === last) corner(next[g]!)
    if (arc[g]) for (const { start } of offsets) pad = Math.max(pad, bulge(frame, g, start[g]!))
  }
  pad += farthest * Math.sqrt(square) + unlike * Math.sqrt(unlikeSquare)
  boxes[4 * b] = minX - pad
  boxes[4 * b + 1] = minY - pad
  boxes[4 * b + 2] = maxX + pad
  boxes[4 * b + 3] = maxY + pad
}

/** How far an arc stands off its chord at an offset: its sagitta, or where it turns more than a quarter its whole width. */
function bulge(frame: Frame, g: number, offset: number): number {
  const radius = Math.max(0, radiusAt(frame, g, offset))
  const half = Math.abs(frame.sweep[g]!) / 2
  // Ends at an angle move along the circle: a little more than the drawn sagitta.
  return half < Math.PI / 4 ? radius * (1 - Math.cos(2 * half)) : 2 * radius
}

/** Start and end of edge g at the depth of index k. */
export function edgeAt({ frame, offsets }: Room, g: number, k: number): readonly [Point, Point] {
  const { start, end } = offsets[k]!
  const h = frame.next[g]!
  // At a step the edge's own start stands at its own offset.
  const before = frame.mode[g] === CornerMode.step ? start[g]! : end[frame.previous[g]!]!
  return [cornerAt(frame, g, before, start[g]!), cornerAt(frame, h, end[g]!, start[h]!)]
}

/** Calls `visit` for every edge whose run's box shares a point with the given one, until it says false. */
export function visitEdgesNear(
  room: Room,
  minX: number,
  minY: number,
  maxX: number,
  maxY: number,
  visit: (g: number) => boolean,
): boolean {
  const { boxes, frame } = room
  for (let b = 0; b < boxes.length; b += 4) {
    if (boxes[b]! > maxX || boxes[b + 2]! < minX || boxes[b + 1]! > maxY || boxes[b + 3]! < minY) continue
    const last = Math.min(frame.count, (b / 4 + 1) * RUN)
    for (let g = (b / 4) * RUN; g < last; g++) if (!visit(g)) return false
  }
  return true
}
