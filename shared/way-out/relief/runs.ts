import { nearest, TOUCH } from '../nearest.ts'
import { holdTree, mostBrokenOfRun, type HoldTree } from './hold-tree.ts'
import type { Holds } from '../holds.ts'

/** Which runs of rows one block may touch: every part of a run that is allowed is allowed as well. */

export interface Trees {
  readonly up: HoldTree
  readonly down: HoldTree
}

export function treesOf(holds: Holds): Trees {
  return { up: holdTree(holds, holds.up), down: holdTree(holds, holds.down) }
}

/**
 * Longest allowed run from every row, in rows, going round at most once: 0 where the row alone is too much.
 * `flattest`: the flattest slope that the moat leaves room for. Two pointers, since a run that starts later
 * ends no earlier; a row that the last way out clears anyway is added without a search.
 */
export function longestRuns({ up, down }: Trees, flattest: number): Int32Array {
  const upward = runsOf(up, flattest)
  return runsOf(down, flattest).map((length, i) => Math.max(length, upward[i]!))
}

function runsOf(tree: HoldTree, flattest: number): Int32Array {
  const { count } = tree.holds
  const lengths = new Int32Array(count)
  let end = 0
  for (let i = 0; i < count; i++) {
    end = Math.max(end, i)
    let way: { readonly x: number; readonly y: number } | null = null
    while (end < i + count) {
      if (!way || mostBrokenOfRun(tree, end, 1)(way.x, way.y, true, TOUCH)) {
        const next = nearest(mostBrokenOfRun(tree, i, end + 1 - i), flattest)
        if (!next.out) break
        way = next
      }
      end++
    }
    lengths[i] = end - i
  }
  return lengths
}

/** How flat a block must be able to slide for each row alone to be allowed; the largest over all rows. */
export function neededSlope({ ax, ay, bx, by, up, down, count }: Holds): number {
  let needed = 0
  for (let i = 0; i < count; i++) {
    const halfCos = Math.sqrt((1 + Math.min(1, ax[i]! * bx[i]! + ay[i]! * by[i]!)) / 2)
    needed = Math.max(needed, Math.min(-up[i]!, -down[i]!) / halfCos)
  }
  return needed
}

/**
 * Fewest runs that go round the whole loop, and the rows from which so many are enough. Going on from every
 * row at once by doubling: after m runs from row i, the furthest reach is known for all i. O(n log n).
 */
export function fewestRuns(lengths: Int32Array): {
  readonly runs: number
  readonly starts: readonly number[]
} {
  const n = lengths.length
  const on = (a: Int32Array, b: Int32Array) =>
    a.map((length, i) => (length >= n ? n : Math.min(n, length + b[(i + length) % n]!)))
  const round = (a: Int32Array) => a.some((length) => length >= n)
  const doubled = [lengths.map((length) => Math.min(n, length))]
  while (!round(doubled.at(-1)!)) {
    const last = doubled.at(-1)!
    doubled.push(on(last, last))
  }
  // The most runs that do not go round from anywhere, bit by bit; one more does.
  let short: Int32Array = new Int32Array(n)
  let runs = 0
  for (let bit = doubled.length - 1; bit >= 0; bit--) {
    const further = on(short, doubled[bit]!)
    if (round(further)) continue
    short = further
    runs += 2 ** bit
  }
  const all = on(short, doubled[0]!)
  const starts: number[] = []
  for (let i = 0; i < n; i++) if (all[i]! >= n) starts.push(i)
  return { runs: runs + 1, starts }
}

/**
 * No division of the loop has fewer runs than this, wherever its lines stand. Lines at corners are as good as
 * lines within a straight edge (the edge would count on both sides); within an arc's row a line may do better
 * than at the row's ends, so rows of arcs at the end of a run are left out altogether. A single run needs the
 * whole loop to be allowed.
 */
export function fewestAtLeast(lengths: Int32Array, round: Uint8Array): number {
  const n = lengths.length
  if (lengths.some((length) => length >= n)) return 1
  const free = lengths.map((length, i) => Math.min(n, length + round[(i + length) % n]!))
  return Math.max(2, fewestRuns(free).runs)
}
