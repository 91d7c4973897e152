import type { Holds } from '../holds.ts'
import type { MostBroken } from '../nearest.ts'
import { between, ruleOf } from '../way-out.ts'

/**
 * The rule most broken among a run of rows, found without looking at all of them: a tree over the rows in
 * order, each node with the range of headings of its normals and its smallest bound, so that whole stretches
 * that cannot break a rule by more are passed over. On plain shapes about log n nodes are looked at.
 */
export interface HoldTree {
  readonly holds: Holds
  readonly bounds: Float64Array
  /** Leaves, a power of two; node 1 is the root, node k has the children 2k and 2k + 1. */
  readonly size: number
  /** Middle of the node's range of headings as a unit vector, cosine and sine of half the range. */
  readonly mx: Float64Array
  readonly my: Float64Array
  readonly cos: Float64Array
  readonly sin: Float64Array
  /** Smallest bound; Infinity in nodes without rows. */
  readonly least: Float64Array
}

export function holdTree(holds: Holds, bounds: Float64Array): HoldTree {
  const { count, ax, ay, bx, by } = holds
  let size = 1
  while (size < count) size *= 2
  const numbers = () => new Float64Array(2 * size)
  const [middle, half, mx, my, cos, sin] = [numbers(), numbers(), numbers(), numbers(), numbers(), numbers()]
  const least = numbers().fill(Infinity)
  for (let i = 0; i < count; i++) {
    half[size + i] = Math.atan2(ax[i]! * by[i]! - ay[i]! * bx[i]!, ax[i]! * bx[i]! + ay[i]! * by[i]!) / 2
    middle[size + i] = Math.atan2(ay[i]!, ax[i]!) + half[size + i]!
    least[size + i] = bounds[i]!
  }
  for (let node = size - 1; node > 0; node--) {
    const [l, r] = [2 * node, 2 * node + 1]
    least[node] = Math.min(least[l]!, least[r]!)
    const apart = shortest(middle[r]! - middle[l]!)
    const low = Math.min(-half[l]!, apart - half[r]!)
    const high = least[r] === Infinity ? half[l]! : Math.max(half[l]!, apart + half[r]!)
    middle[node] = middle[l]! + (least[r] === Infinity ? 0 : (low + high) / 2)
    half[node] = least[r] === Infinity ? half[l]! : Math.min(Math.PI, (high - low) / 2)
  }
  for (let node = 1; node < 2 * size; node++) {
    mx[node] = Math.cos(middle[node]!)
    my[node] = Math.sin(middle[node]!)
    cos[node] = Math.cos(half[node]!)
    sin[node] = Math.sin(half[node]!)
  }
  return { holds, bounds, size, mx, my, cos, sin, least }
}

/** A turn brought into [−π, π]. */
function shortest(turn: number): number {
  return turn - 2 * Math.PI * Math.round(turn / (2 * Math.PI))
}

/** Rounding of a node's cosines; a node is passed over only past it, so that none is by mistake. */
const COSINE_ROUNDING = 1e-14

/** Of the rows `first` up to `first + length`, counted round the loop. */
export function mostBrokenOfRun(tree: HoldTree, first: number, length: number): MostBroken {
  const { holds, bounds, size, mx, my, cos, sin, least } = tree
  const { count, ax, ay, bx, by, round } = holds
  const from = first % count
  const to = Math.min(count, from + length)
  return (x, y, arcs, over) => {
    const far = Math.hypot(x, y)
    let worst = over
    let row = -1
    let end = 0
    const found = (excess: number, i: number, at: number) => {
      if (!(excess > worst)) return
      worst = excess
      row = i
      end = at
    }
    // Largest excess under a node: along (x, y) itself if that is one of its headings, else at the nearer end.
    const most = (node: number) => {
      const along = mx[node]! * x + my[node]! * y
      if (along >= far * cos[node]!) return far - least[node]!
      return along * cos[node]! + Math.abs(mx[node]! * y - my[node]! * x) * sin[node]! - least[node]!
    }
    const look = (node: number, low: number, high: number, a: number, b: number): void => {
      if (b <= low || high <= a) return
      if (!(most(node) + far * COSINE_ROUNDING > worst)) return
      if (node < size) {
        const middle = (low + high) / 2
        // The more promising half first: what it finds lets the other be passed over.
        const leftFirst = most(2 * node) >= most(2 * node + 1)
        if (leftFirst) look(2 * node, low, middle, a, b)
        look(2 * node + 1, middle, high, a, b)
        if (!leftFirst) look(2 * node, low, middle, a, b)
        return
      }
      found(ax[low]! * x + ay[low]! * y - bounds[low]!, low, 0)
      if (round[low] === 0) return
      found(bx[low]! * x + by[low]! * y - bounds[low]!, low, 1)
      if (arcs && between(holds, low, x, y)) found(far - bounds[low]!, low, 2)
    }
    look(1, 0, size, from, to)
    if (from + length > count) look(1, 0, size, 0, from + length - count)
    return row < 0 ? null : ruleOf(holds, bounds, row, end, x, y, worst)
  }
}
