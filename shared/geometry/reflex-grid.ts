/**
 * A grid over the reflex corners of a polygon, so that an ear is held against the few that lie near it. Cells
 * are as many as corners; those that have become convex stay in their cells and are told apart by the caller.
 */
export class ReflexGrid {
  private readonly x: Float64Array
  private readonly y: Float64Array
  private readonly minX: number
  private readonly minY: number
  private readonly perCell: number
  private readonly columns: number
  private readonly rows: number
  /** Corners of cell c are members[first[c]] up to members[first[c + 1]]. */
  private readonly first: Int32Array
  private readonly members: Int32Array

  constructor(x: Float64Array, y: Float64Array, reflex: Uint8Array) {
    this.x = x
    this.y = y
    let [minX, minY, maxX, maxY, count] = [Infinity, Infinity, -Infinity, -Infinity, 0]
    for (let i = 0; i < x.length; i++) {
      minX = Math.min(minX, x[i]!)
      maxX = Math.max(maxX, x[i]!)
      minY = Math.min(minY, y[i]!)
      maxY = Math.max(maxY, y[i]!)
      count += reflex[i]!
    }
    const size = Math.sqrt(((maxX - minX) * (maxY - minY)) / Math.max(1, count))
    this.minX = minX
    this.minY = minY
    this.perCell = size > 0 ? 1 / size : 0
    this.columns = this.perCell > 0 ? Math.floor((maxX - minX) * this.perCell) + 1 : 1
    this.rows = this.perCell > 0 ? Math.floor((maxY - minY) * this.perCell) + 1 : 1
    const cellOf = (i: number) => this.row(y[i]!) * this.columns + this.column(x[i]!)
    this.first = new Int32Array(this.columns * this.rows + 1)
    this.members = new Int32Array(count)
    for (let i = 0; i < x.length; i++) if (reflex[i]) this.first[cellOf(i) + 1]!++
    for (let c = 1; c < this.first.length; c++) this.first[c]! += this.first[c - 1]!
    const fill = this.first.slice()
    for (let i = 0; i < x.length; i++) if (reflex[i]) this.members[fill[cellOf(i)]!++] = i
  }

  /** Whether any corner in the cells that the triangle's box touches passes the test. */
  some(a: number, b: number, c: number, test: (corner: number) => boolean): boolean {
    const { x, y } = this
    const fromColumn = this.column(Math.min(x[a]!, x[b]!, x[c]!))
    const toColumn = this.column(Math.max(x[a]!, x[b]!, x[c]!))
    const fromRow = this.row(Math.min(y[a]!, y[b]!, y[c]!))
    const toRow = this.row(Math.max(y[a]!, y[b]!, y[c]!))
    for (let row = fromRow; row <= toRow; row++) {
      const from = this.first[row * this.columns + fromColumn]!
      const to = this.first[row * this.columns + toColumn + 1]!
      for (let m = from; m < to; m++) if (test(this.members[m]!)) return true
    }
    return false
  }

  private column(x: number): number {
    return Math.floor((x - this.minX) * this.perCell)
  }

  private row(y: number): number {
    return Math.floor((y - this.minY) * this.perCell)
  }
}
