import type { Bounds } from '../geometry/types.ts'

const NODE_SIZE = 16

interface Node {
  readonly box: Bounds
  /** Either boxes by number, or nodes. */
  readonly items: readonly number[]
  readonly children: readonly Node[]
}

/** Boxes packed into a tree by slices of x and then y (sort-tile-recursive), to find those that meet a box. */
export class BoxTree {
  readonly #boxes: readonly Bounds[]
  readonly #root: Node | null

  constructor(boxes: readonly Bounds[]) {
    this.#boxes = boxes
    let level = tile(
      boxes.map((box, item) => ({ box, item })),
      (entry) => entry.box,
    ).map((group): Node => ({
      box: around(group.map((e) => e.box)),
      items: group.map((e) => e.item),
      children: [],
    }))
    while (level.length > 1) {
      level = tile(level, (node) => node.box).map((group): Node => ({
        box: around(group.map((node) => node.box)),
        items: [],
        children: group,
      }))
    }
    this.#root = level[0] ?? null
  }

  /** Calls `visit` for every box that meets the given one, borders included. */
  visit(box: Bounds, visit: (item: number) => void): void {
    const stack: Node[] = this.#root ? [this.#root] : []
    for (let node = stack.pop(); node; node = stack.pop()) {
      if (!meet(node.box, box)) continue
      stack.push(...node.children)
      for (const item of node.items) {
        const candidate = this.#boxes[item]
        if (candidate && meet(candidate, box)) visit(item)
      }
    }
  }
}

function tile<T>(entries: readonly T[], boxOf: (entry: T) => Bounds): T[][] {
  const middleX = (entry: T) => boxOf(entry).minX + boxOf(entry).maxX
  const middleY = (entry: T) => boxOf(entry).minY + boxOf(entry).maxY
  const groups = Math.ceil(entries.length / NODE_SIZE)
  const perSlice = Math.ceil(Math.sqrt(groups)) * NODE_SIZE
  const byX = [...entries].sort((a, b) => middleX(a) - middleX(b))
  return chunks(byX, perSlice).flatMap((slice) =>
    chunks(
      slice.sort((a, b) => middleY(a) - middleY(b)),
      NODE_SIZE,
    ),
  )
}

function chunks<T>(entries: readonly T[], size: number): T[][] {
  return Array.from({ length: Math.ceil(entries.length / Math.max(1, size)) }, (_, i) =>
    entries.slice(i * size, (i + 1) * size),
  )
}

function around(boxes: readonly Bounds[]): Bounds {
  return boxes.reduce((a, b) => ({
    minX: Math.min(a.minX, b.minX),
    minY: Math.min(a.minY, b.minY),
    maxX: Math.max(a.maxX, b.maxX),
    maxY: Math.max(a.maxY, b.maxY),
  }))
}

function meet(a: Bounds, b: Bounds): boolean {
  return a.minX <= b.maxX && b.minX <= a.maxX && a.minY <= b.maxY && b.minY <= a.maxY
}
