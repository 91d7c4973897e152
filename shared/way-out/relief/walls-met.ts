import { commonPoint } from '../../geometry/intersect.ts'
import { segmentBounds } from '../../geometry/segment.ts'
import type { LineSegment, Loop, Segment } from '../../geometry/types.ts'

/**
 * The walls of a loop at several depths, to ask which of them a line meets. Neighbours in a loop lie near each
 * other, so boxes round so many in a row pass over most of them.
 */
export interface Walls {
  readonly segments: readonly Segment[]
  /** Boxes (minX, minY, maxX, maxY) of single segments, and of `IN_A_ROW` of them together. */
  readonly boxes: Float64Array
  readonly rowBoxes: Float64Array
}

const IN_A_ROW = 32

export function wallsOf(contours: readonly Loop[]): Walls {
  const segments = contours.flat()
  const boxes = new Float64Array(4 * segments.length)
  const rowBoxes = new Float64Array(4 * Math.ceil(segments.length / IN_A_ROW))
  for (const [i, segment] of segments.entries()) {
    const { minX, minY, maxX, maxY } = segmentBounds(segment)
    boxes.set([minX, minY, maxX, maxY], 4 * i)
    const r = 4 * Math.floor(i / IN_A_ROW)
    const first = i % IN_A_ROW === 0
    rowBoxes[r] = first ? minX : Math.min(rowBoxes[r]!, minX)
    rowBoxes[r + 1] = first ? minY : Math.min(rowBoxes[r + 1]!, minY)
    rowBoxes[r + 2] = first ? maxX : Math.max(rowBoxes[r + 2]!, maxX)
    rowBoxes[r + 3] = first ? maxY : Math.max(rowBoxes[r + 3]!, maxY)
  }
  return { segments, boxes, rowBoxes }
}

/** Whether a line meets any of the walls. */
export function meetsWall({ segments, boxes, rowBoxes }: Walls, line: LineSegment): boolean {
  const { minX, minY, maxX, maxY } = segmentBounds(line)
  const near = (of: Float64Array, i: number) =>
    of[4 * i]! <= maxX && of[4 * i + 1]! <= maxY && of[4 * i + 2]! >= minX && of[4 * i + 3]! >= minY
  for (let r = 0; 4 * r < rowBoxes.length; r++) {
    if (!near(rowBoxes, r)) continue
    const end = Math.min(segments.length, (r + 1) * IN_A_ROW)
    for (let i = r * IN_A_ROW; i < end; i++) {
      if (near(boxes, i) && commonPoint(line, segments[i]!, 0)) return true
    }
  }
  return false
}
