import { BOX_STRIDE, boxesMeet } from './boxes.ts'

/**
 * Finding the few pairs of a chain's moving pieces that can meet. A tree of moving boxes (see `boxes.ts`) over runs of
 * the chain, where runs that go one way (`one-way.ts`) are left out: they cannot meet themselves. That holds as long
 * as no piece has shrunk to nothing, which the caller sees to through `until`.
 */
export interface MovingChain {
  readonly count: number
  /** Piece e runs from point e to point next[e]; pieces that follow one another are mostly numbered so. */
  readonly next: Int32Array
  /** Points at the start of the span and their velocities. */
  readonly x: Float64Array
  readonly y: Float64Array
  readonly vx: Float64Array
  readonly vy: Float64Array
  readonly span: number
  /** Directions in which a piece advances throughout; 0 where it cannot be said. */
  readonly advance: Uint16Array
  /** Pieces that are not straight, or whose points do not go evenly, tell their own box. */
  readonly ownBox: ((piece: number, out: Float64Array, at: number) => boolean) | null
  /** How near counts as touching, mm; boxes are widened by it. */
  readonly near: number
}

export interface ChainTree {
  readonly chain: MovingChain
  /** Nodes of every layer, leaves first; node i of a layer covers nodes 2i and 2i + 1 of the one below. */
  readonly nodes: Float64Array
  readonly advance: Uint16Array
  readonly layerStart: readonly number[]
  readonly layerSize: readonly number[]
}

/** Pieces per leaf, as a power of two: few enough to test all pairs, many enough to keep the tree small. */
const LEAF_BITS = 3
const LEAF = 1 << LEAF_BITS

export function chainTree(chain: MovingChain): ChainTree {
  const layerStart: number[] = []
  const layerSize: number[] = []
  let total = 0
  for (let size = (chain.count + LEAF - 1) >> LEAF_BITS; size > 0; size = size === 1 ? 0 : (size + 1) >> 1) {
    layerStart.push(total)
    layerSize.push(size)
    total += size
  }
  const tree = {
    chain,
    nodes: new Float64Array(total * BOX_STRIDE),
    advance: new Uint16Array(total),
    layerStart,
    layerSize,
  }
  for (let layer = 0; layer < layerSize.length; layer++) {
    for (let i = 0; i < layerSize[layer]!; i++) {
      if (layer === 0) fillLeaf(tree, i)
      else fillNode(tree, layer, i)
    }
  }
  return tree
}

/** Works out anew what depends on some pieces: their leaves and all nodes above. */
export function refresh(tree: ChainTree, pieces: readonly number[]): void {
  for (const piece of pieces) {
    let i = piece >> LEAF_BITS
    fillLeaf(tree, i)
    for (let layer = 1; layer < tree.layerSize.length; layer++) fillNode(tree, layer, (i >>= 1))
  }
}

function fillLeaf({ chain, nodes, advance }: ChainTree, i: number): void {
  const { count, next, x, y, vx, vy, span, ownBox, near } = chain
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity]
  let [endMinX, endMinY, endMaxX, endMaxY] = [Infinity, Infinity, -Infinity, -Infinity]
  let shared = 0xffff
  const last = Math.min(count, (i + 1) << LEAF_BITS) - 1
  for (let e = i << LEAF_BITS; e <= last; e++) {
    shared &= chain.advance[e]!
    const n = next[e]!
    if (n !== e + 1 && e !== last) shared = 0
    if (ownBox?.(e, scratch, 0)) {
      minX = Math.min(minX, scratch[0]! + near)
      minY = Math.min(minY, scratch[1]! + near)
      maxX = Math.max(maxX, scratch[2]! - near)
      maxY = Math.max(maxY, scratch[3]! - near)
      endMinX = Math.min(endMinX, scratch[4]! + near)
      endMinY = Math.min(endMinY, scratch[5]! + near)
      endMaxX = Math.max(endMaxX, scratch[6]! - near)
      endMaxY = Math.max(endMaxY, scratch[7]! - near)
      continue
    }
    // A piece's end is mostly the start of the next one in the leaf.
    for (let p = e; ; p = n) {
      const px = x[p]!
      const py = y[p]!
      if (px < minX) minX = px
      if (px > maxX) maxX = px
      if (py < minY) minY = py
      if (py > maxY) maxY = py
      const qx = px + span * vx[p]!
      const qy = py + span * vy[p]!
      if (qx < endMinX) endMinX = qx
      if (qx > endMaxX) endMaxX = qx
      if (qy < endMinY) endMinY = qy
      if (qy > endMaxY) endMaxY = qy
      if (p === n || (n === e + 1 && e !== last && !ownBox)) break
    }
  }
  const at = i * BOX_STRIDE
  nodes[at] = minX - near
  nodes[at + 1] = minY - near
  nodes[at + 2] = maxX + near
  nodes[at + 3] = maxY + near
  nodes[at + 4] = endMinX - near
  nodes[at + 5] = endMinY - near
  nodes[at + 6] = endMaxX + near
  nodes[at + 7] = endMaxY + near
  advance[i] = shared
}

const scratch = new Float64Array(BOX_STRIDE)

function fillNode(
  { chain, nodes, advance, layerStart, layerSize }: ChainTree,
  layer: number,
  i: number,
): void {
  const below = layerStart[layer - 1]!
  const one = below + 2 * i
  const own = layerStart[layer]! + i
  const at = own * BOX_STRIDE
  const a = one * BOX_STRIDE
  if (2 * i + 1 >= layerSize[layer - 1]!) {
    nodes.copyWithin(at, a, a + BOX_STRIDE)
    advance[own] = advance[one]!
    return
  }
  const b = a + BOX_STRIDE
  for (let side = 0; side < BOX_STRIDE; side += 4) {
    nodes[at + side] = Math.min(nodes[a + side]!, nodes[b + side]!)
    nodes[at + side + 1] = Math.min(nodes[a + side + 1]!, nodes[b + side + 1]!)
    nodes[at + side + 2] = Math.max(nodes[a + side + 2]!, nodes[b + side + 2]!)
    nodes[at + side + 3] = Math.max(nodes[a + side + 3]!, nodes[b + side + 3]!)
  }
  const seam = (2 * i + 1) << (LEAF_BITS + layer - 1)
  advance[own] = chain.next[seam - 1] === seam ? advance[one]! & advance[one + 1]! : 0
}

/** Called for i < j whose boxes share a point at some moment; `atRest` says whether they do so at the start. */
export type VisitPair = (i: number, j: number, atRest: boolean) => void

/**
 * Visits every pair of pieces that can meet at some moment in [0, until()], a share of the span. `until` may fall
 * while pairs are visited; pairs that can only meet later are then passed over.
 */
export function visitPairs(tree: ChainTree, until: () => number, visit: VisitPair): void {
  const { chain, nodes, advance, layerStart, layerSize } = tree
  const { count, next } = chain
  if (count === 0) return
  within(layerSize.length - 1, 0)

  function within(layer: number, i: number): void {
    if (advance[layerStart[layer]! + i] !== 0) return
    if (layer === 0) return withinLeaf(i)
    within(layer - 1, 2 * i)
    if (2 * i + 1 >= layerSize[layer - 1]!) return
    within(layer - 1, 2 * i + 1)
    between(layer - 1, 2 * i, 2 * i + 1)
  }

  function withinLeaf(i: number): void {
    const first = i << LEAF_BITS
    const end = Math.min(count, first + LEAF)
    fillBoxes(chain, first, end, boxesA)
    for (let a = first; a < end; a++) {
      let shared = chain.advance[a]!
      for (let b = a + 1; b < end; b++) {
        shared = next[b - 1] === b ? shared & chain.advance[b]! : 0
        if (shared === 0) pair(a, b, boxesA, a - first, boxesA, b - first)
      }
    }
  }

  /** Nodes i < j of a layer. */
  function between(layer: number, i: number, j: number): void {
    const start = layerStart[layer]!
    if (!boxesMeet(nodes, (start + i) * BOX_STRIDE, nodes, (start + j) * BOX_STRIDE, until())) return
    const bits = LEAF_BITS + layer
    if ((advance[start + i]! & advance[start + j]!) !== 0) {
      const follows = next[((i + 1) << bits) - 1] === j << bits
      const closes = next[Math.min(count, (j + 1) << bits) - 1] === i << bits
      if (follows || closes) return
    }
    if (layer === 0) return betweenLeaves(i, j)
    const size = layerSize[layer - 1]!
    for (let a = 2 * i; a < Math.min(size, 2 * i + 2); a++) {
      for (let b = 2 * j; b < Math.min(size, 2 * j + 2); b++) between(layer - 1, a, b)
    }
  }

  function betweenLeaves(i: number, j: number): void {
    const [firstA, firstB] = [i << LEAF_BITS, j << LEAF_BITS]
    const endA = Math.min(count, firstA + LEAF)
    const endB = Math.min(count, firstB + LEAF)
    fillBoxes(chain, firstA, endA, boxesA)
    fillBoxes(chain, firstB, endB, boxesB)
    for (let a = firstA; a < endA; a++) {
      if (!boxesMeet(boxesA, (a - firstA) * BOX_STRIDE, nodes, j * BOX_STRIDE, until())) continue
      for (let b = firstB; b < endB; b++) pair(a, b, boxesA, a - firstA, boxesB, b - firstB)
    }
  }

  function pair(a: number, b: number, p: Float64Array, i: number, q: Float64Array, j: number): void {
    if (!boxesMeet(p, i * BOX_STRIDE, q, j * BOX_STRIDE, until())) return
    visit(a, b, boxesMeet(p, i * BOX_STRIDE, q, j * BOX_STRIDE, 0))
  }
}

/** Visits every pair of one piece with another that can meet it. */
export function visitPairsOf(tree: ChainTree, piece: number, until: () => number, visit: VisitPair): void {
  const { chain, nodes, layerStart, layerSize } = tree
  fillBoxes(chain, piece, piece + 1, boxesB)
  const own = boxesB.slice(0, BOX_STRIDE)
  descend(layerSize.length - 1, 0)

  function descend(layer: number, i: number): void {
    if (!boxesMeet(own, 0, nodes, (layerStart[layer]! + i) * BOX_STRIDE, until())) return
    if (layer > 0) {
      for (let a = 2 * i; a < Math.min(layerSize[layer - 1]!, 2 * i + 2); a++) descend(layer - 1, a)
      return
    }
    const first = i << LEAF_BITS
    const end = Math.min(chain.count, first + LEAF)
    fillBoxes(chain, first, end, boxesA)
    for (let e = first; e < end; e++) {
      const at = (e - first) * BOX_STRIDE
      if (e === piece || !boxesMeet(own, 0, boxesA, at, until())) continue
      visit(Math.min(piece, e), Math.max(piece, e), boxesMeet(own, 0, boxesA, at, 0))
    }
  }
}

/** Boxes of one leaf's pieces; a pair of leaves is looked at without a call of another in between. */
const boxesA = new Float64Array(LEAF * BOX_STRIDE)
const boxesB = new Float64Array(LEAF * BOX_STRIDE)

function fillBoxes(chain: MovingChain, first: number, end: number, out: Float64Array): void {
  const { next, x, y, vx, vy, span, ownBox, near } = chain
  for (let e = first; e < end; e++) {
    const at = (e - first) * BOX_STRIDE
    if (ownBox?.(e, out, at)) continue
    const n = next[e]!
    for (let end = 0; end < 2; end++) {
      const t = end * span
      const ax = x[e]! + t * vx[e]!
      const ay = y[e]! + t * vy[e]!
      const bx = x[n]! + t * vx[n]!
      const by = y[n]! + t * vy[n]!
      out[at + 4 * end] = (ax < bx ? ax : bx) - near
      out[at + 4 * end + 1] = (ay < by ? ay : by) - near
      out[at + 4 * end + 2] = (ax < bx ? bx : ax) + near
      out[at + 4 * end + 3] = (ay < by ? by : ay) + near
    }
  }
}
