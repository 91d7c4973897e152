import type { Point } from '../geometry/types.ts'

/** Cells are this many reaches wide: most questions then look into one cell only. */
const CELL_REACHES = 4

/** Odd factors that spread cells over one number. Cells that meet in it cost time, never truth. */
const SPREAD_X = 73_856_093
const SPREAD_Y = 19_349_663

/** Numbered points in square cells, to find those within a fixed reach of a place. */
export class PointGrid {
  readonly #reach: number
  readonly #size: number
  readonly #cells = new Map<number, { readonly id: number; readonly at: Point }[]>()

  /** `reach` (mm, inclusive) may be 0: only equal points are then near. */
  constructor(reach: number) {
    this.#reach = reach
    this.#size = reach > 0 ? reach * CELL_REACHES : 1
  }

  add(id: number, at: Point): void {
    const key = keyOf(Math.floor(at.x / this.#size), Math.floor(at.y / this.#size))
    const cell = this.#cells.get(key)
    if (cell) cell.push({ id, at })
    else this.#cells.set(key, [{ id, at }])
  }

  nearest(at: Point): number | null {
    let best: number | null = null
    let least = Infinity
    this.#visit(at, (id, gap) => {
      if (gap >= least) return
      best = id
      least = gap
    })
    return best
  }

  within(at: Point): number[] {
    const found: number[] = []
    this.#visit(at, (id) => found.push(id))
    return found
  }

  #visit(at: Point, visit: (id: number, gap: number) => void): void {
    const [lowX, highX] = this.#span(at.x)
    const [lowY, highY] = this.#span(at.y)
    for (let column = lowX; column <= highX; column++) {
      for (let row = lowY; row <= highY; row++) {
        const cell = this.#cells.get(keyOf(column, row))
        if (!cell) continue
        for (const { id, at: other } of cell) {
          const gap = Math.hypot(other.x - at.x, other.y - at.y)
          if (gap <= this.#reach && isIn(other, column, row, this.#size)) visit(id, gap)
        }
      }
    }
  }

  #span(value: number): [number, number] {
    return [Math.floor((value - this.#reach) / this.#size), Math.floor((value + this.#reach) / this.#size)]
  }
}

function keyOf(column: number, row: number): number {
  return column * SPREAD_X + row * SPREAD_Y
}

/** Keeps a point from being met twice where two cells share one number. */
function isIn(at: Point, column: number, row: number, size: number): boolean {
  return Math.floor(at.x / size) === column && Math.floor(at.y / size) === row
}
