import type { Holds } from '../holds.ts'
import type { MostBroken } from '../nearest.ts'
import { between, ruleOf } from '../way-out.ts'

/**
 * The rule most broken among a run of rows, found without looking at all of them: a tree over the rows in
 * order, each node with the box of its normals and its smallest bound, so that whole stretches that cannot
 * break a rule by more are passed over. On plain shapes about log n nodes are looked at.
 */
export interface HoldTree {
  readonly holds: Holds
  readonly bounds: Float64Array
  /** Leaves, a power of two. */
  readonly size: number
  readonly minX: Float64Array
  readonly maxX: Float64Array
  readonly minY: Float64Array
  readonly maxY: Float64Array
  readonly least: Float64Array
}

export function holdTree(holds: Holds, bounds: Float64Array): HoldTree {
  const { count, ax, ay, bx, by } = holds
  let size = 1
  while (size < count) size *= 2
  const of = (value: number) => new Float64Array(2 * size).fill(value)
  const [minX, maxX, minY, maxY, least] = [
    of(Infinity),
    of(-Infinity),
    of(Infinity),
    of(-Infinity),
    of(Infinity),
  ]
  for (let i = 0; i < count; i++) {
    // Between its ends a round row's normals stand out of their box by at most 1 − cos(half the range).
    const out = 1 - Math.sqrt(Math.max(0, (1 + Math.min(1, ax[i]! * bx[i]! + ay[i]! * by[i]!)) / 2))
    minX[size + i] = Math.min(ax[i]!, bx[i]!) - out
    maxX[size + i] = Math.max(ax[i]!, bx[i]!) + out
    minY[size + i] = Math.min(ay[i]!, by[i]!) - out
    maxY[size + i] = Math.max(ay[i]!, by[i]!) + out
    least[size + i] = bounds[i]!
  }
  for (let node = size - 1; node > 0; node--) {
    const [l, r] = [2 * node, 2 * node + 1]
    minX[node] = Math.min(minX[l]!, minX[r]!)
    maxX[node] = Math.max(maxX[l]!, maxX[r]!)
    minY[node] = Math.min(minY[l]!, minY[r]!)
    maxY[node] = Math.max(maxY[l]!, maxY[r]!)
    least[node] = Math.min(least[l]!, least[r]!)
  }
  return { holds, bounds, size, minX, maxX, minY, maxY, least }
}

/** Of the rows `first` up to `first + length`, counted round the loop. */
export function mostBrokenOfRun(tree: HoldTree, first: number, length: number): MostBroken {
  const { holds, bounds, size, minX, maxX, minY, maxY, least } = tree
  const { count, ax, ay, bx, by, round } = holds
  const from = first % count
  const to = Math.min(count, from + length)
  return (x, y, arcs, over) => {
    const far = Math.hypot(x, y)
    let most = over
    let row = -1
    let end = 0
    const found = (excess: number, i: number, at: number) => {
      if (!(excess > most)) return
      most = excess
      row = i
      end = at
    }
    const look = (node: number, low: number, high: number, a: number, b: number): void => {
      if (b <= low || high <= a) return
      const reach =
        Math.max(minX[node]! * x, maxX[node]! * x) + Math.max(minY[node]! * y, maxY[node]! * y) - least[node]!
      // At 0, an empty node gives 0·∞: not a number, and passed over as well.
      if (!(reach > most)) return
      if (node < size) {
        const middle = (low + high) / 2
        look(2 * node, low, middle, a, b)
        look(2 * node + 1, middle, high, a, b)
        return
      }
      found(ax[low]! * x + ay[low]! * y - bounds[low]!, low, 0)
      if (round[low] === 0) return
      found(bx[low]! * x + by[low]! * y - bounds[low]!, low, 1)
      if (arcs && between(holds, low, x, y)) found(far - bounds[low]!, low, 2)
    }
    look(1, 0, size, from, to)
    if (from + length > count) look(1, 0, size, 0, from + length - count)
    return row < 0 ? null : ruleOf(holds, bounds, row, end, x, y, most)
  }
}
