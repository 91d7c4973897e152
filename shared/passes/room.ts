import { makePlaces, place, type Frame, type Places } from '../contours/frame.ts'
import { fillOffsets, makeEdgeEnds, type EdgeEnds } from '../walls/wall-table.ts'

/**
 * The walls of a body as things that a jet must keep off, ready for many questions. Edges follow each other, so
 * boxes round short runs of them are index enough: a question reads one number per run, not per edge.
 */
export interface Room {
  readonly frame: Frame
  /** Depths between which no wall changes tilt, with every corner's place and every edge's offset there. */
  readonly depths: readonly number[]
  readonly places: readonly Places[]
  readonly offsets: readonly EdgeEnds[]
  /** minX, minY, maxX, maxY of every run of `RUN` edges over all depths. */
  readonly boxes: Float64Array
}

/** Edges per box. */
export const RUN = 32

export function roomOf(frame: Frame): Room {
  const depths = depthsOf(frame)
  const offsets = depths.map((depth) => {
    const out = makeEdgeEnds(frame.table)
    fillOffsets(frame.table, depth, out)
    return out
  })
  const places = offsets.map((own) => {
    const out = makePlaces(frame.count)
    place(frame, own, out)
    return out
  })
  const boxes = new Float64Array(4 * Math.ceil(frame.count / RUN))
  for (let b = 0; b < boxes.length / 4; b++) fillBox(frame, places, offsets, boxes, b)
  return { frame, depths, places, offsets, boxes }
}

/** Told by the distinct walls, so that it does not read every edge. */
function depthsOf({ table, body }: Frame): number[] {
  const depths = new Set([0, body.thickness])
  for (const { facets } of table.walls) {
    for (const { depth } of facets) if (depth < body.thickness) depths.add(depth)
  }
  return [...depths].sort((a, b) => a - b)
}

function fillBox(
  frame: Frame,
  places: readonly Places[],
  offsets: readonly EdgeEnds[],
  boxes: Float64Array,
  b: number,
): void {
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity]
  const last = Math.min(frame.count, (b + 1) * RUN)
  for (let k = 0; k < places.length; k++) {
    const { sx, sy, ex, ey } = places[k]!
    for (let g = b * RUN; g < last; g++) {
      // An arc stands off its chord by at most its whole radius, or its sagitta where it turns less than half.
      const pad = frame.arc[g] ? bulge(frame, g, offsets[k]!.start[g]!) : 0
      minX = Math.min(minX, sx[g]! - pad, ex[g]! - pad)
      minY = Math.min(minY, sy[g]! - pad, ey[g]! - pad)
      maxX = Math.max(maxX, sx[g]! + pad, ex[g]! + pad)
      maxY = Math.max(maxY, sy[g]! + pad, ey[g]! + pad)
    }
  }
  boxes.set([minX, minY, maxX, maxY], 4 * b)
}

function bulge(frame: Frame, g: number, offset: number): number {
  const radius = Math.max(0, frame.radius[g]! + Math.sign(frame.sweep[g]!) * offset)
  const half = Math.abs(frame.sweep[g]!) / 2
  // Ends beside another arc or a line at an angle move along the circle: a little more than the drawn sagitta.
  return half < Math.PI / 4 ? radius * (1 - Math.cos(Math.min(Math.PI / 2, 2 * half))) : 2 * radius
}

/** Calls `visit` for every edge whose run's box shares a point with the given one. */
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
