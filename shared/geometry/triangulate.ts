import { bridgeHoles } from './bridge.ts'
import { ReflexGrid } from './reflex-grid.ts'
import type { Point } from './types.ts'

/**
 * Triangles over a polygon with holes: the outer ring counter-clockwise first, holes clockwise. Ears are cut
 * off one after another, holes having been tied to the outer ring by bridges. No point is added or left out,
 * so every edge of a ring is an edge of exactly one triangle, counter-clockwise; three points in line or two
 * on one spot may give triangles without area. Rings that touch or cross get a best effort: as many
 * triangles, not all of them right (see `checkTriangulation`).
 *
 * @returns three indices per triangle into the rings' points, counted through all rings
 */
export function triangulate(rings: readonly (readonly Point[])[]): Uint32Array {
  const points = rings.flat()
  const ring = bridgeHoles(rings)
  return clipEars(points, ring)
}

/** How strictly an ear is judged; each pass is tried only where the ones before it found no ear at all. */
const PASSES = ['clear', 'touching', 'flat', 'any'] as const
type Pass = (typeof PASSES)[number]

function clipEars(points: readonly Point[], ring: readonly number[]): Uint32Array {
  const n = ring.length
  const x = Float64Array.from(ring, (i) => points[i]!.x)
  const y = Float64Array.from(ring, (i) => points[i]!.y)
  const next = Int32Array.from(ring, (_, i) => (i + 1) % n)
  const previous = Int32Array.from(ring, (_, i) => (i + n - 1) % n)
  const triangles = new Uint32Array(3 * Math.max(0, n - 2))

  const bend = (a: number, b: number, c: number) =>
    (x[b]! - x[a]!) * (y[c]! - y[a]!) - (y[b]! - y[a]!) * (x[c]! - x[a]!)
  const reflex = Uint8Array.from(ring, (_, i) => (bend(previous[i]!, i, next[i]!) > 0 ? 0 : 1))
  const grid = new ReflexGrid(x, y, reflex)

  /** No other reflex corner within the triangle; its rim counts as within on the first pass. */
  const isClear = (a: number, b: number, c: number, rim: boolean) =>
    !grid.some(a, b, c, (p) => {
      if (p === a || p === b || p === c || reflex[p] === 0) return false
      if ((x[p] === x[a] && y[p] === y[a]) || (x[p] === x[c] && y[p] === y[c])) return false
      const [ab, bc, ca] = [bend(a, b, p), bend(b, c, p), bend(c, a, p)]
      return rim ? ab >= 0 && bc >= 0 && ca >= 0 : ab > 0 && bc > 0 && ca > 0
    })
  const isEar = (b: number, pass: Pass) => {
    const [a, c] = [previous[b]!, next[b]!]
    const area = bend(a, b, c)
    switch (pass) {
      case 'clear':
        return area > 0 && isClear(a, b, c, true)
      case 'touching':
        return area > 0 && isClear(a, b, c, false)
      case 'flat':
        return area === 0
      case 'any':
        return true
    }
  }

  let left = n
  let cut = 0
  let b = 0
  let pass = 0
  let sinceCut = 0
  while (left > 2) {
    const a = previous[b]!
    const c = next[b]!
    if (left === 3 || isEar(b, PASSES[pass]!)) {
      triangles.set([ring[a]!, ring[b]!, ring[c]!], cut)
      cut += 3
      left--
      next[a] = c
      previous[c] = a
      reflex[b] = 0
      for (const end of [a, c]) if (bend(previous[end]!, end, next[end]!) > 0) reflex[end] = 0
      pass = 0
      sinceCut = 0
      // Going on beyond the neighbour spreads the cuts, instead of a fan of slivers about one corner.
      b = next[c]!
    } else {
      b = c
      if (++sinceCut > left) {
        sinceCut = 0
        pass++
      }
    }
  }
  return triangles
}

/**
 * What a triangulation is checked by: twice the area it covers against the rings' own, how far the worst
 * triangle is turned over (twice its area, 0 when none is), and whether each ring edge is used exactly once.
 */
export function checkTriangulation(rings: readonly (readonly Point[])[], triangles: Uint32Array) {
  const points = rings.flat()
  const twice = (a: Point, b: Point, c: Point) => (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)
  let covered = 0
  let turnedOver = 0
  const edges = new Map<string, number>()
  for (let t = 0; t < triangles.length; t += 3) {
    const [i, j, k] = [triangles[t]!, triangles[t + 1]!, triangles[t + 2]!]
    const area = twice(points[i]!, points[j]!, points[k]!)
    covered += area
    turnedOver = Math.max(turnedOver, -area)
    for (const [from, to] of [
      [i, j],
      [j, k],
      [k, i],
    ] as const) {
      edges.set(`${from}-${to}`, (edges.get(`${from}-${to}`) ?? 0) + 1)
    }
  }
  let wanted = 0
  let start = 0
  let boundaryKept = true
  for (const ring of rings) {
    for (let i = 0; i < ring.length; i++) {
      const j = (i + 1) % ring.length
      wanted += twice(points[0]!, ring[i]!, ring[j]!)
      const forward = edges.get(`${start + i}-${start + j}`) ?? 0
      const back = edges.get(`${start + j}-${start + i}`) ?? 0
      if (forward - back !== 1) boundaryKept = false
    }
    start += ring.length
  }
  return { covered: covered / 2, wanted: wanted / 2, turnedOver: turnedOver / 2, boundaryKept }
}
