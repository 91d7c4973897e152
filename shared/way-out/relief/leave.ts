import type { Point } from '../../geometry/types.ts'
import { FLATTEST, nearest, type MostBroken, type Rule } from '../nearest.ts'
import type { Direction } from '../types.ts'
import { directionOf } from '../way-out.ts'
import { mostBrokenOfRun } from './hold-tree.ts'
import type { Trees } from './runs.ts'

/** A block: its rows, and the unit normals of its two cut faces, out of the block. */
export interface Block {
  readonly first: number
  readonly length: number
  readonly startFace: Point
  readonly endFace: Point
}

export interface Leaving {
  readonly direction: Direction
  readonly order: number
}

/**
 * Lets the blocks leave one after another: any that can goes, until none is left or none can. A block gone
 * only makes room, so this finds an order wherever there is one. null for blocks that are stuck.
 */
export function leaveInTurn(
  trees: Trees,
  blocks: readonly Block[],
  flattest: number,
  faceRoom: number,
): readonly (Leaving | null)[] {
  const n = blocks.length
  const left: (Leaving | null)[] = blocks.map(() => null)
  let order = 0
  // Only its neighbours gain by a block's leaving, so only they are asked again.
  const asked = blocks.map((_, b) => b)
  for (let k = 0; k < asked.length; k++) {
    const b = asked[k]!
    if (left[b]) continue
    const [before, after] = [(b + n - 1) % n, (b + 1) % n]
    const faces: Point[] = []
    if (n > 1 && !left[before]) faces.push(blocks[b]!.startFace)
    if (n > 1 && !left[after]) faces.push(blocks[b]!.endFace)
    const direction = wayOfBlock(trees, blocks[b]!, faces, flattest, faceRoom)
    if (!direction) continue
    left[b] = { direction, order: order++ }
    asked.push(before, after)
  }
  return left
}

/** The steepest way that clears the block's rows and the given faces; up where both are equal. */
export function wayOfBlock(
  trees: Trees,
  { first, length }: Pick<Block, 'first' | 'length'>,
  faces: readonly Point[],
  flattest: number,
  faceRoom: number,
): Direction | null {
  const limit = Math.min(flattest, FLATTEST)
  const up = nearest(withFaces(mostBrokenOfRun(trees.up, first, length), faces, faceRoom), limit)
  const down = nearest(withFaces(mostBrokenOfRun(trees.down, first, length), faces, faceRoom), limit)
  const slope = (way: typeof up) => (way.out ? Math.hypot(way.x, way.y) : Infinity)
  if (up.out && slope(up) <= slope(down)) return directionOf(up.x, up.y, 1)
  return down.out ? directionOf(down.x, down.y, -1) : null
}

/** The rows' rules and those of vertical faces, n·(x, y) ≤ room. Faces are told as rows −1, −2. */
function withFaces(rows: MostBroken, faces: readonly Point[], room: number): MostBroken {
  return (x, y, arcs, over) => {
    let worst: Rule | null = rows(x, y, arcs, over)
    for (const [f, n] of faces.entries()) {
      const excess = n.x * x + n.y * y - room
      if (excess > (worst?.excess ?? over)) worst = { row: -1 - f, nx: n.x, ny: n.y, bound: room, excess }
    }
    return worst
  }
}
