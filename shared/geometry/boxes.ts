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
  for (let end = 0; end < BOX_STRIDE; end += 4) {
    let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity]
    for (let b = from * BOX_STRIDE + end; b < to * BOX_STRIDE; b += BOX_STRIDE) {
      if (boxes[b]! < minX) minX = boxes[b]!
      if (boxes[b + 1]! < minY) minY = boxes[b + 1]!
      if (boxes[b + 2]! > maxX) maxX = boxes[b + 2]!
      if (boxes[b + 3]! > maxY) maxY = boxes[b + 3]!
    }
    out[at + end] = minX
    out[at + end + 1] = minY
    out[at + end + 2] = maxX
    out[at + end + 3] = maxY
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
export function boxesMeet(p: Float64Array, i: number, q: Float64Array, j: number, until: number): boolean {
  const left = p[i]! - q[j + 2]!
  const right = q[j]! - p[i + 2]!
  const below = p[i + 1]! - q[j + 3]!
  const above = q[j + 1]! - p[i + 3]!
  const apart = left > 0 || right > 0 || below > 0 || above > 0
  if (!apart) return true
  if (until <= 0) return false
  // Each gap that is open at the start closes at some moment, and each that is closed opens; open throughout: never.
  const leftEnd = p[i + 4]! - q[j + 6]!
  const rightEnd = q[j + 4]! - p[i + 6]!
  const belowEnd = p[i + 5]! - q[j + 7]!
  const aboveEnd = q[j + 5]! - p[i + 7]!
  if (left > 0 && leftEnd > 0) return false
  if (right > 0 && rightEnd > 0) return false
  if (below > 0 && belowEnd > 0) return false
  if (above > 0 && aboveEnd > 0) return false
  const enter = Math.max(
    left > 0 ? left / (left - leftEnd) : 0,
    right > 0 ? right / (right - rightEnd) : 0,
    below > 0 ? below / (below - belowEnd) : 0,
    above > 0 ? above / (above - aboveEnd) : 0,
  )
  const leave = Math.min(
    left <= 0 && leftEnd > 0 ? left / (left - leftEnd) : until,
    right <= 0 && rightEnd > 0 ? right / (right - rightEnd) : until,
    below <= 0 && belowEnd > 0 ? below / (below - belowEnd) : until,
    above <= 0 && aboveEnd > 0 ? above / (above - aboveEnd) : until,
    until,
  )
  return enter <= leave
}
