import type { Point } from '../geometry/types.ts'
import { distance } from '../geometry/vector.ts'

/** Numbered points in square cells as wide as the distance asked for, so that nine cells hold every neighbour. */
export class PointGrid {
  readonly #reach: number
  readonly #cells = new Map<string, { id: number; at: Point }[]>()

  /** `reach` (mm, inclusive) may be 0: only equal points are then near. */
  constructor(reach: number) {
    this.#reach = reach
  }

  add(id: number, at: Point): void {
    const key = this.#key(this.#cell(at.x), this.#cell(at.y))
    const cell = this.#cells.get(key)
    if (cell) cell.push({ id, at })
    else this.#cells.set(key, [{ id, at }])
  }

  nearest(at: Point): number | null {
    let best: { id: number; gap: number } | null = null
    for (const { id, gap } of this.#near(at)) if (best === null || gap < best.gap) best = { id, gap }
    return best?.id ?? null
  }

  within(at: Point): number[] {
    return this.#near(at).map(({ id }) => id)
  }

  #near(at: Point): { id: number; gap: number }[] {
    const found: { id: number; gap: number }[] = []
    const [column, row] = [this.#cell(at.x), this.#cell(at.y)]
    for (let i = column - 1; i <= column + 1; i++) {
      for (let j = row - 1; j <= row + 1; j++) {
        for (const entry of this.#cells.get(this.#key(i, j)) ?? []) {
          const gap = distance(entry.at, at)
          if (gap <= this.#reach) found.push({ id: entry.id, gap })
        }
      }
    }
    return found
  }

  #cell(value: number): number {
    return this.#reach > 0 ? Math.floor(value / this.#reach) : value
  }

  #key(column: number, row: number): string {
    return `${column},${row}`
  }
}
