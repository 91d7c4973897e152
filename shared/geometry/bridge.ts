import type { Point } from './types.ts'

/**
 * One ring out of many: each hole is tied to what is already joined by a bridge walked both ways. Holes are
 * taken from the right, so that a ray to +x from a hole's rightmost corner meets only what is joined; the
 * bridge goes to the corner that is seen from there.
 *
 * @returns indices into the rings' points, counted through all rings; both ends of a bridge come twice
 */
export function bridgeHoles(rings: readonly (readonly Point[])[]): number[] {
  const points = rings.flat()
  const starts: number[] = []
  let start = 0
  for (const ring of rings) {
    starts.push(start)
    start += ring.length
  }
  const outer = rings[0] ?? []
  const joined = new JoinedRing(
    points,
    outer.map((_, i) => i),
  )
  const holes = rings
    .slice(1)
    .map((ring, h) => {
      const first = starts[h + 1]!
      let right = first
      for (let i = first; i < first + ring.length; i++) {
        const [p, q] = [points[i]!, points[right]!]
        if (p.x > q.x || (p.x === q.x && p.y < q.y)) right = i
      }
      return { first, size: ring.length, right }
    })
    .filter((hole) => hole.size > 0)
    .sort((a, b) => points[b.right]!.x - points[a.right]!.x || a.right - b.right)
  for (const { first, size, right } of holes) {
    const walk = Array.from({ length: size }, (_, i) => first + ((right - first + i) % size))
    joined.tie(walk)
  }
  return joined.walk()
}

/** A ring as a linked list of visits to points, since bridges visit a point more than once. */
class JoinedRing {
  private readonly points: readonly Point[]
  private readonly point: number[]
  private readonly next: number[]
  private readonly previous: number[]

  constructor(points: readonly Point[], ring: number[]) {
    this.points = points
    this.point = ring
    this.next = ring.map((_, i) => (i + 1) % ring.length)
    this.previous = ring.map((_, i) => (i + ring.length - 1) % ring.length)
  }

  /** Ties in a hole, given from its rightmost corner on. */
  tie(hole: readonly number[]): void {
    const from = this.points[hole[0]!]!
    const visit = this.seenFrom(from)
    const after = this.next[visit]!
    let last = visit
    // Out over the bridge, round the hole to its first corner again, and back.
    for (const point of [...hole, hole[0]!, this.point[visit]!]) {
      const added = this.point.push(point) - 1
      this.next[last] = added
      this.previous[added] = last
      last = added
    }
    this.next[last] = after
    this.previous[after] = last
  }

  walk(): number[] {
    const ring: number[] = []
    if (this.point.length === 0) return ring
    let visit = 0
    do {
      ring.push(this.point[visit]!)
      visit = this.next[visit]!
    } while (visit !== 0)
    return ring
  }

  /** A visit whose point can be reached in a straight line from m, the joined ring lying round it. */
  private seenFrom(m: Point): number {
    let hit = Infinity
    let best = 0
    for (let v = 0; v < this.point.length; v++) {
      const a = this.at(v)
      const b = this.at(this.next[v]!)
      // Material lies to the left, so the wall that the ray meets first runs upward.
      if (!(a.y <= m.y && b.y >= m.y) || a.y === b.y) continue
      const x = a.x + ((m.y - a.y) / (b.y - a.y)) * (b.x - a.x)
      if (x < m.x || x > hit) continue
      if (x === hit && !this.opensTo(v, m)) continue
      hit = x
      best = a.y === m.y ? v : b.y === m.y ? this.next[v]! : a.x > b.x ? v : this.next[v]!
    }
    if (hit === Infinity) return best
    const p = this.at(best)
    if (p.y === m.y) return this.openVisit(best, m)
    // The wall's right end is seen unless corners stand in the triangle m, hit, p: then the one at the least angle is.
    let least = Math.abs(p.y - m.y) / (p.x - m.x)
    let found = best
    for (let v = 0; v < this.point.length; v++) {
      const q = this.at(v)
      if (q.x < m.x || q.x > p.x || (q.x === p.x && q.y === p.y)) continue
      if (!inTriangle(m, { x: hit, y: m.y }, p, q)) continue
      const slope = q.x === m.x ? Infinity : Math.abs(q.y - m.y) / (q.x - m.x)
      if (slope < least || (slope === least && q.x < this.at(found).x)) {
        if (!this.opensTo(v, m)) continue
        least = slope
        found = v
      }
    }
    return this.openVisit(found, m)
  }

  /** Of the visits to one spot, the one between whose edges m lies. */
  private openVisit(visit: number, m: Point): number {
    if (this.opensTo(visit, m)) return visit
    const p = this.at(visit)
    for (let v = 0; v < this.point.length; v++) {
      const q = this.at(v)
      if (q.x === p.x && q.y === p.y && this.opensTo(v, m)) return v
    }
    return visit
  }

  /** Whether m lies on the material's side of the corner at a visit. */
  private opensTo(visit: number, m: Point): boolean {
    const a = this.at(this.previous[visit]!)
    const p = this.at(visit)
    const b = this.at(this.next[visit]!)
    const convex = bend(a, p, b) > 0
    const leftOfIn = bend(a, p, m) >= 0
    const leftOfOut = bend(p, b, m) >= 0
    return convex ? leftOfIn && leftOfOut : leftOfIn || leftOfOut
  }

  private at(visit: number): Point {
    return this.points[this.point[visit]!]!
  }
}

function inTriangle(a: Point, b: Point, c: Point, p: Point): boolean {
  const [u, v, w] = [bend(a, b, p), bend(b, c, p), bend(c, a, p)]
  return (u >= 0 && v >= 0 && w >= 0) || (u <= 0 && v <= 0 && w <= 0)
}

function bend(a: Point, b: Point, c: Point): number {
  return (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)
}
