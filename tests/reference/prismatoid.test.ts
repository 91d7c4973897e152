import { describe, expect, test } from 'vitest'
import { contourArea } from '../../shared/contours/check.ts'
import { contourAt } from '../../shared/contours/contour.ts'
import { soundRange } from '../../shared/events/range.ts'
import { checkMesh } from '../../shared/solid/check.ts'
import { meshOf } from '../../shared/solid/mesh.ts'
import { volumeOf } from '../../shared/solid/volume.ts'
import {
  circle,
  DEGREE,
  facets,
  plate,
  rectangle,
  regular,
  reversed,
  seeded,
  star,
} from '../support/plates.ts'

/**
 * Source: handbook formulas, from memory. Prismatoid: V = h/6·(A₁ + 4A_m + A₂), exact where every wall has one facet.
 * Frustum of a pyramid or a cone: V = h/3·(A₁ + A₂ + √(A₁A₂)). Wedge-topped box (both pairs of sides unlike): the
 * prismatoid of three rectangles.
 */
const RELATIVE = 1e-13

describe('frusta in closed form', () => {
  const frustum = (a: number, b: number, h: number) => (h / 3) * (a + b + Math.sqrt(a * b))

  test.each([
    [3, 25], [4, -20], [5, 40], [6, -35], [8, 55], [12, 10],
  ])('pyramid of %i sides, walls of %f°', (sides, tilt) => {
    const [radius, thickness] = [100, 12]
    const body = plate(thickness, [regular(sides, radius)], () => facets([thickness, tilt]))
    // From the apothem, which the walls move by the reach.
    const apothem = radius * Math.cos(Math.PI / sides)
    const area = (a: number) => sides * a * a * Math.tan(Math.PI / sides)
    const expected = frustum(area(apothem), area(apothem + thickness * Math.tan(tilt * DEGREE)), thickness)
    expect(Math.abs(volumeOf(body)! / expected - 1)).toBeLessThan(RELATIVE)
  }) // prettier-ignore

  test.each([[30], [-30], [60]])('ring of cones at %f°', (tilt) => {
    const thickness = 10
    const body = plate(thickness, [circle(0, 0, 90), circle(0, 0, 40, true)], (loop) =>
      facets([thickness, loop === 0 ? tilt : -tilt / 2]),
    )
    const disc = (r: number, w: number) => frustum(Math.PI * r * r, Math.PI * (r + w) ** 2, thickness)
    const out = thickness * Math.tan(tilt * DEGREE)
    // A hole's wall that moves inward, away from its waste, makes the hole wider.
    const hole = thickness * Math.tan((tilt / 2) * DEGREE)
    expect(Math.abs(volumeOf(body)! / (disc(90, out) - disc(40, hole)) - 1)).toBeLessThan(RELATIVE)
  })

  test('box whose sides lean unlike: three rectangles', () => {
    const [a, b, h] = [120, 80, 15]
    const tilts = [20, -10, 35, 5]
    const [south, east, north, west] = tilts.map((tilt) => Math.tan(tilt * DEGREE))
    const body = plate(h, [rectangle(0, 0, a, b)], (_, edge) => facets([h, tilts[edge]!]))
    const at = (d: number) => (a + d * (east! + west!)) * (b + d * (south! + north!))
    const expected = (h / 6) * (at(0) + 4 * at(h / 2) + at(h))
    expect(Math.abs(volumeOf(body)! / expected - 1)).toBeLessThan(RELATIVE)
  })
})

test.each(Array.from({ length: 30 }, (_, i) => [i + 1]))(
  'random plate %i: the prismatoid of its contours is the volume of its mesh',
  (seed) => {
    const random = seeded(seed)
    const loops = [star(random, 4 + (seed % 9), 60, 100), reversed(star(random, 3 + (seed % 4), 10, 25))]
    const walls = loops.map((loop) => loop.map(() => 70 * (random() - 0.5)))
    const at = (thickness: number) => plate(thickness, loops, (l, e) => facets([thickness, walls[l]![e]!]))
    // As thick as it can be without a wall vanishing, or 30 mm.
    const deep = at(30)
    const { to } = soundRange(deep)
    const h = to < 30 ? 0.95 * to : 30
    const body = at(h)
    const area = (depth: number) => contourArea(contourAt(body, depth))
    const prismatoid = (h / 6) * (area(0) + 4 * area(h / 2) + area(h))
    const mesh = checkMesh(meshOf(body, 0.1)!)
    expect(Math.abs(mesh.volume / prismatoid - 1)).toBeLessThan(1e-12)
    expect(Math.abs(volumeOf(body)! / prismatoid - 1)).toBeLessThan(RELATIVE)
  },
)
