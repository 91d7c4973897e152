import { BOX_STRIDE, boxTree, boxesMeet, type BoxTree } from '../geometry/boxes.ts'
import type { JetPath } from '../passes/types.ts'
import type { JetCone } from './jet-cone.ts'
import { coverMove, hasMove } from './moves.ts'
import { coverWall, type WallBand } from './wall-band.ts'

/** The moves of a path sorted by the edge that they cut or, between walls, cut last. */
export interface MovesByEdge {
  /** Edge g has moves[first[g]] up to moves[first[g + 1]]. */
  readonly first: Int32Array
  readonly moves: Int32Array
  readonly ownerOf: Int32Array
}

/** Moves of a pass before its first edge (the lead in) go with that edge. Stations without a move have owner −1. */
export function movesByEdge(path: JetPath, edges: number): MovesByEdge {
  const ownerOf = new Int32Array(path.count).fill(-1)
  const first = new Int32Array(edges + 1)
  let waiting = 0
  let owner = -1
  for (let i = 0; i < path.count; i++) {
    if (!hasMove(path, i)) {
      owner = -1
      waiting = i + 1
      continue
    }
    if (path.edge[i]! >= 0) owner = path.edge[i]!
    if (owner < 0) continue
    for (; waiting <= i; waiting++) {
      ownerOf[waiting] = owner
      first[owner + 1]!++
    }
  }
  for (let g = 0; g < edges; g++) first[g + 1]! += first[g]!
  const moves = new Int32Array(first[edges]!)
  const at = first.slice()
  for (let i = 0; i < path.count; i++) if (ownerOf[i]! >= 0) moves[at[ownerOf[i]!]!++] = i
  return { first, moves, ownerOf }
}

/**
 * Moving boxes of a band, depth as time: of every wall, of every edge's jets, and of both together. A tree over the
 * last finds the pairs in which either edge's jets may meet the other's wall, in one search.
 */
export interface Ground {
  readonly walls: Float64Array
  readonly jets: Float64Array
  readonly tree: BoxTree
}

export function groundOf(cone: JetCone, path: JetPath, owners: MovesByEdge, band: WallBand): Ground {
  const { count } = band.frame
  const walls = emptyBoxes(count)
  const jets = emptyBoxes(count)
  for (let g = 0; g < count; g++) {
    const at = g * BOX_STRIDE
    coverWall(band, g, 0, walls, at)
    coverWall(band, g, 1, walls, at + 4)
  }
  for (let i = 0; i < path.count; i++) {
    const owner = owners.ownerOf[i]!
    if (owner < 0) continue
    coverMove(cone, path, i, band.top, jets, owner * BOX_STRIDE)
    coverMove(cone, path, i, band.bottom, jets, owner * BOX_STRIDE + 4)
  }
  const both = new Float64Array(walls.length)
  for (let k = 0; k < both.length; k++) {
    both[k] = (k & 2) === 0 ? Math.min(walls[k]!, jets[k]!) : Math.max(walls[k]!, jets[k]!)
  }
  return { walls, jets, tree: boxTree(both) }
}

function emptyBoxes(count: number): Float64Array {
  const boxes = new Float64Array(count * BOX_STRIDE)
  for (let k = 0; k < boxes.length; k++) boxes[k] = (k & 2) === 0 ? Infinity : -Infinity
  return boxes
}

/** Whether the jets of edge g may meet wall f. */
export function mayMeet({ walls, jets }: Ground, g: number, f: number): boolean {
  return (
    jets[g * BOX_STRIDE]! <= jets[g * BOX_STRIDE + 2]! &&
    boxesMeet(jets, g * BOX_STRIDE, walls, f * BOX_STRIDE, 1)
  )
}

const moveBox = new Float64Array(BOX_STRIDE)

/** Whether the jet of one move may meet wall f. */
export function moveMayMeet(
  { walls }: Ground,
  cone: JetCone,
  path: JetPath,
  i: number,
  band: WallBand,
  f: number,
): boolean {
  for (let k = 0; k < BOX_STRIDE; k++) moveBox[k] = (k & 2) === 0 ? Infinity : -Infinity
  coverMove(cone, path, i, band.top, moveBox, 0)
  coverMove(cone, path, i, band.bottom, moveBox, 4)
  return boxesMeet(moveBox, 0, walls, f * BOX_STRIDE, 1)
}
