import { CornerMode, type Frame } from '../contours/frame.ts'
import { radiusAt } from '../contours/places.ts'
import type { Point } from '../geometry/types.ts'
import { rowOffsets } from '../walls/wall-table.ts'
import { cornerAt } from './level.ts'

/**
 * The walls of a body as things that a jet must keep off. Edges follow each other, so boxes round short runs of them,
 * and boxes round runs of those boxes, are index enough. They are made with the first question.
 */
export interface Room {
  readonly frame: Frame
  /** Depths between which no wall changes tilt, with the offset of every distinct wall there. */
  readonly depths: readonly number[]
  readonly offsets: readonly RowOffsets[]
  boxes: readonly Float64Array[] | null
}

/** Per row of the wall table. */
interface RowOffsets {
  readonly start: readonly number[]
  readonly end: readonly number[]
}

/** Edges per box, and boxes per box of the next layer, as a power of two. */
const RUN_BITS = 3
const RUN = 1 << RUN_BITS

export function roomOf(frame: Frame): Room {
  const { table, levels } = frame
  const offsets = levels.map((depth): RowOffsets => {
    const start = rowOffsets(table, table.start, depth)
    return { start, end: table.blends ? rowOffsets(table, table.end, depth) : start }
  })
  return { frame, depths: levels, offsets, boxes: null }
}

/** minX, minY, maxX, maxY of every run of `RUN` edges over all depths, then of every run of those, and so on. */
function boxesOf({ frame, offsets }: Room): Float64Array[] {
  // The farthest that any wall stands from the drawing, at any depth, and the most that two of them differ by.
  let [least, most] = [0, 0]
  for (const { start, end } of offsets) {
    for (const own of start === end ? start : [...start, ...end]) {
      if (own < least) least = own
      if (own > most) most = own
    }
  }
  const first = new Float64Array(4 * Math.ceil(frame.count / RUN))
  for (let b = 0; 4 * b < first.length; b++) {
    fillBox(frame, Math.max(most, -least), most - least, offsets, first, b)
  }
  const layers = [first]
  for (let below = first; below.length > 4 * RUN;) {
    const own = new Float64Array(4 * Math.ceil(below.length / 4 / RUN))
    for (let at = 0; at < own.length; at += 4) {
      own[at] = own[at + 1] = Infinity
      own[at + 2] = own[at + 3] = -Infinity
      for (let b = at * RUN; b < Math.min(below.length, (at + 4) * RUN); b += 4) {
        own[at] = Math.min(own[at]!, below[b]!)
        own[at + 1] = Math.min(own[at + 1]!, below[b + 1]!)
        own[at + 2] = Math.max(own[at + 2]!, below[b + 2]!)
        own[at + 3] = Math.max(own[at + 3]!, below[b + 3]!)
      }
    }
    layers.push(own)
    below = own
  }
  return layers
}

/**
 * Drawn corners, widened by the farthest that a corner of the run can move: offset times its mitre vector, of length
 * √(2 / (1 + cos φ)), and the difference of two offsets times the vector for unlike ones, of length 1 / |sin φ|.
 * Corners beside arcs are placed at every depth.
 */
function fillBox(
  frame: Frame,
  farthest: number,
  unlike: number,
  offsets: readonly RowOffsets[],
  boxes: Float64Array,
  b: number,
): void {
  const { px, py, turnSin, turnCos, arc, mode, next } = frame
  let minX = Infinity
  let minY = Infinity
  let maxX = -Infinity
  let maxY = -Infinity
  // The sharpest turn of the run, and the one nearest to straight or back of those between unlike walls.
  let sharpest = 2
  let flattest = 1
  let pad = 0
  const last = Math.min(frame.count, (b + 1) * RUN) - 1
  for (let g = b * RUN; g <= last; g++) {
    const h = next[g]!
    // The end of an edge is mostly the start of the next one.
    for (let k = g; ; k = h) {
      const x = px[k]!
      const y = py[k]!
      if (x < minX) minX = x
      if (x > maxX) maxX = x
      if (y < minY) minY = y
      if (y > maxY) maxY = y
      if (mode[k] === CornerMode.mitre) {
        const sin = Math.abs(turnSin[k]!)
        if (sin < flattest) flattest = sin
        if (1 + turnCos[k]! < sharpest) sharpest = 1 + turnCos[k]!
      } else if (mode[k] === CornerMode.branch) {
        for (let d = 0; d < offsets.length; d++) {
          const at = cornerAt(frame, k, before(frame, offsets[d]!, k), after(frame, offsets[d]!, k))
          minX = Math.min(minX, at.x)
          maxX = Math.max(maxX, at.x)
          minY = Math.min(minY, at.y)
          maxY = Math.max(maxY, at.y)
        }
      }
      if (k === h || (h === g + 1 && g < last)) break
    }
    if (arc[g]) for (const at of offsets) pad = Math.max(pad, bulge(frame, g, after(frame, at, g)))
  }
  pad += farthest * Math.sqrt(2 / sharpest) + unlike / flattest
  boxes[4 * b] = minX - pad
  boxes[4 * b + 1] = minY - pad
  boxes[4 * b + 2] = maxX + pad
  boxes[4 * b + 3] = maxY + pad
}

/** Offset of the edge after a corner, and of the one before it. */
function after({ table }: Frame, { start }: RowOffsets, corner: number): number {
  return start[table.rowOfEdge[corner]!]!
}

function before({ table, previous }: Frame, { end }: RowOffsets, corner: number): number {
  return end[table.rowOfEdge[previous[corner]!]!]!
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
  const at = offsets[k]!
  const h = frame.next[g]!
  const own = after(frame, at, g)
  // At a step the edge's own start stands at its own offset.
  const prior = frame.mode[g] === CornerMode.step ? own : before(frame, at, g)
  return [cornerAt(frame, g, prior, own), cornerAt(frame, h, before(frame, at, h), after(frame, at, h))]
}

/** Radius of arc g at the depth of index k. */
export function radiusOf({ frame, offsets }: Room, g: number, k: number): number {
  return radiusAt(frame, g, after(frame, offsets[k]!, g))
}

/** A box to be looked into. */
export interface Box {
  readonly minX: number
  readonly minY: number
  readonly maxX: number
  readonly maxY: number
}

/** Edges whose run's box shares a point with the given one, by number. */
export function edgesNear(room: Room, box: Box): number[] {
  room.boxes ??= boxesOf(room)
  const found: number[] = []
  collect(room, room.boxes.length - 1, 0, room.boxes.at(-1)!.length / 4, box, found)
  return found
}

function collect(room: Room, layer: number, first: number, end: number, box: Box, found: number[]): void {
  const boxes = room.boxes![layer]!
  const size = layer > 0 ? room.boxes![layer - 1]!.length / 4 : room.frame.count
  for (let b = first; b < end; b++) {
    const at = 4 * b
    if (boxes[at]! > box.maxX || boxes[at + 2]! < box.minX) continue
    if (boxes[at + 1]! > box.maxY || boxes[at + 3]! < box.minY) continue
    const last = Math.min(size, (b + 1) << RUN_BITS)
    if (layer > 0) collect(room, layer - 1, b << RUN_BITS, last, box, found)
    else for (let g = b << RUN_BITS; g < last; g++) found.push(g)
  }
}
