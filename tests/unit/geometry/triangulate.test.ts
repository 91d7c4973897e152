import earcut from 'earcut'
import { expect, test } from 'vitest'
import { checkTriangulation, triangulate } from '../../../shared/geometry/triangulate.ts'
import type { Point } from '../../../shared/geometry/types.ts'
import { rectangle, regular, reversed, seeded, star } from '../../support/plates.ts'

/** Area of the triangles of earcut 3, an independent triangulator. */
function earcutArea(rings: Point[][]): number {
  const points = rings.flat()
  const flat = points.flatMap(({ x, y }) => [x, y])
  const holes = rings
    .slice(1)
    .map((_, h) => rings.slice(0, h + 1).reduce((sum, ring) => sum + ring.length, 0))
  const out = earcut(flat, holes)
  let area = 0
  for (let t = 0; t < out.length; t += 3) {
    const [a, b, c] = [points[out[t]!]!, points[out[t + 1]!]!, points[out[t + 2]!]!]
    area += Math.abs((b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)) / 2
  }
  return area
}

function expectSound(rings: Point[][]): void {
  const triangles = triangulate(rings)
  const count = rings.flat().length
  expect(triangles).toHaveLength(3 * (count + 2 * (rings.length - 1) - 2))
  const { covered, wanted, turnedOver, boundaryKept } = checkTriangulation(rings, triangles)
  expect(Math.abs(covered / wanted - 1)).toBeLessThan(1e-12)
  expect(turnedOver).toBeLessThan(1e-12 * wanted)
  expect(boundaryKept).toBe(true)
  expect(Math.abs(earcutArea(rings) / covered - 1)).toBeLessThan(1e-9)
}

test.each(Array.from({ length: 40 }, (_, i) => [i]))(
  'star %i with holes: area equals earcut’s, rims kept, none turned over',
  (seed) => {
    const random = seeded(seed)
    const rings: Point[][] = [star(random, 5 + 8 * seed, 60, 100)]
    for (let h = 0; h < seed % 5; h++) {
      const [cx, cy] = [30 * Math.cos(h * 1.3), 30 * Math.sin(h * 1.3)]
      rings.push(reversed(star(random, 3 + (seed % 6), 4, 9)).map(({ x, y }) => ({ x: x + cx, y: y + cy })))
    }
    expectSound(rings)
  },
)

test('points in line, holes in a grid with equal heights, and one in the middle', () => {
  expectSound([rectangle(0, 0, 10, 10).flatMap((p, i, all) => [p, { x: (p.x + all[(i + 1) % 4]!.x) / 2, y: (p.y + all[(i + 1) % 4]!.y) / 2 }])]) // prettier-ignore
  const grid = Array.from({ length: 36 }, (_, i) =>
    reversed(rectangle(2 + 10 * (i % 6), 2 + 10 * Math.floor(i / 6), 5, 5)),
  )
  expectSound([rectangle(0, 0, 60, 60), ...grid])
  expectSound([regular(64, 50), reversed(regular(64, 20))])
})

test('the checker sees a missing and a turned triangle', () => {
  const ring = regular(6, 10)
  const good = triangulate([ring])
  expect(checkTriangulation([ring], good.slice(3)).boundaryKept).toBe(false)
  const turned = Uint32Array.of(good[1]!, good[0]!, good[2]!, ...good.slice(3))
  expect(checkTriangulation([ring], turned).turnedOver).toBeGreaterThan(1)
})
