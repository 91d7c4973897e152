/**
 * Finding the few pairs of moving things that can meet, among many. Things are given in an order in which
 * neighbours lie near each other (edges along their loops), so a tree of boxes over runs of that order needs
 * no sorting and is built in one sweep. A box moves: it is told at the start and at the end of a span of time
 * and lies between, side by side, at any moment s in [0, 1]; things that move in straight lines keep within.
 */

/** Numbers per box: minX, minY, maxX, maxY at the start, then the same at the end. */
export const BOX_STRIDE = 8

/** Things per leaf: few enough to test all pairs, many enough to keep the tree small. */
const LEAF = 4

export interface BoxTree {
  readonly count: number
  readonly boxes: Float64Array
  /** Nodes of every layer, leaves first; node i of a layer covers nodes 2i and 2i + 1 of the one below. */
  readonly nodes: Float64Array
  readonly layerStart: readonly number[]
  readonly layerSize: readonly number[]
}

export function boxTree(boxes: Float64Array): BoxTree {
  const count = boxes.length / BOX_STRIDE
  const layerStart: number[] = []
  const layerSize: number[] = []
  let total = 0
  for (let size = Math.ceil(count / LEAF); size > 0; size = size === 1 ? 0 : (size + 1) >> 1) {
    layerStart.push(total)
    layerSize.push(size)
    total += size
  }
  const nodes = new Float64Array(total * BOX_STRIDE)
  let below = boxes
  let belowStart = 0
  let belowSize = count
  let fan = LEAF
  for (let layer = 0; layer < layerSize.length; layer++) {
    for (let i = 0; i < layerSize[layer]!; i++) {
      const at = (layerStart[layer]! + i) * BOX_STRIDE
      const last = Math.min(belowSize, (i + 1) * fan)
      merge(nodes, at, below, belowStart + i * fan, belowStart + last)
    }
    below = nodes
    belowStart = layerStart[layer]!
    belowSize = layerSize[layer]!
    fan = 2
  }
  return { count, boxes, nodes, layerStart, layerSize }
}

function merge(out: Float64Array, at: number, boxes: Float64Array, from: number, to: number): void {
  for (let side = 0; side < BOX_STRIDE; side++) {
    const low = side % 4 < 2
    let value = low ? Infinity : -Infinity
    for (let b = from; b < to; b++) {
      const v = boxes[b * BOX_STRIDE + side]!
      if (low ? v < value : v > value) value = v
    }
    out[at + side] = value
  }
}

/**
 * Calls `visit(i, j)`, i < j, for every pair whose boxes share a point at some moment in [0, until()].
 * `until` may fall while pairs are visited; pairs that can only meet later are then passed over.
 */
export function visitMeetingPairs(
  tree: BoxTree,
  until: () => number,
  visit: (i: number, j: number) => void,
): void {
  const { count, boxes, nodes, layerStart, layerSize } = tree
  if (count === 0) return
  within(layerSize.length - 1, 0)

  function within(layer: number, i: number): void {
    if (layer === 0) {
      const end = Math.min(count, (i + 1) * LEAF)
      for (let a = i * LEAF; a < end; a++) for (let b = a + 1; b < end; b++) pair(a, b)
      return
    }
    const second = 2 * i + 1 < layerSize[layer - 1]!
    within(layer - 1, 2 * i)
    if (!second) return
    within(layer - 1, 2 * i + 1)
    between(layer - 1, 2 * i, 2 * i + 1)
  }

  function between(layer: number, i: number, j: number): void {
    const start = layerStart[layer]!
    if (!boxesMeet(nodes, (start + i) * BOX_STRIDE, nodes, (start + j) * BOX_STRIDE, until())) return
    if (layer === 0) {
      const endA = Math.min(count, (i + 1) * LEAF)
      const endB = Math.min(count, (j + 1) * LEAF)
      for (let a = i * LEAF; a < endA; a++) for (let b = j * LEAF; b < endB; b++) pair(a, b)
      return
    }
    const size = layerSize[layer - 1]!
    for (let a = 2 * i; a < Math.min(size, 2 * i + 2); a++) {
      for (let b = 2 * j; b < Math.min(size, 2 * j + 2); b++) between(layer - 1, a, b)
    }
  }

  function pair(a: number, b: number): void {
    if (boxesMeet(boxes, a * BOX_STRIDE, boxes, b * BOX_STRIDE, until())) visit(a, b)
  }
}

/** Whether two moving boxes overlap at some moment in [0, until]: four linear gaps must be closed at once. */
function boxesMeet(p: Float64Array, i: number, q: Float64Array, j: number, until: number): boolean {
  let enter = 0
  let leave = until
  for (let axis = 0; axis < 2; axis++) {
    for (let turn = 0; turn < 2; turn++) {
      const start = turn === 0 ? p[i + axis]! - q[j + axis + 2]! : q[j + axis]! - p[i + axis + 2]!
      const end = turn === 0 ? p[i + axis + 4]! - q[j + axis + 6]! : q[j + axis + 4]! - p[i + axis + 6]!
      if (start > 0) {
        if (end > 0) return false
        const closes = start / (start - end)
        if (closes > enter) enter = closes
      } else if (end > 0) {
        const opens = start / (start - end)
        if (opens < leave) leave = opens
      }
    }
  }
  return enter <= leave
}
