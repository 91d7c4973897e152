import { describe, expect, test } from 'vitest'
import { areaByDepth } from '../../../shared/contours/area.ts'
import { contourArea } from '../../../shared/contours/check.ts'
import { contourAt } from '../../../shared/contours/contour.ts'
import { pointAt } from '../../../shared/geometry/segment.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'
import { offsetAt } from '../../../shared/walls/datum.ts'
import type { Datum, Wall } from '../../../shared/walls/types.ts'
import { reversedWall } from '../../../shared/walls/wall.ts'
import { DEGREE, circle, plate, rectangle, reversed, seeded, star } from '../../support/plates.ts'

const tan = (degrees: number) => Math.tan(degrees * DEGREE)
const blend = (depth: number, from: number, to: number): Wall => ({
  facets: [{ depth, tilt: from * DEGREE, endTilt: to * DEGREE }],
})
const square = (depth: number): Wall => ({ facets: [{ depth, tilt: 0 }] })

describe('lines', () => {
  test('one wall of a rectangle: its ends move by their own tilts, its neighbours keep their planes', () => {
    const body = plate(12, [rectangle(0, 0, 80, 50)], (_, e) => (e === 1 ? blend(12, 30, -10) : square(12)))
    const [bottom, right, top] = contourAt(body, 7).loops[0]!
    expect([right!.from.x, right!.from.y]).toEqual([80 + 7 * tan(30), 0])
    expect([right!.to.x, right!.to.y]).toEqual([80 + 7 * tan(-10), 50])
    expect([bottom!.from.y, bottom!.to.y, top!.from.y, top!.to.y]).toEqual([0, 0, 50, 50])
  })

  test('both corners stand off the drawn line by the reach at their end, whatever the corners are', () => {
    const random = seeded(5)
    const tilt = () => 40 * (random() - 0.5)
    for (const datum of ['top', 'bottom', 'root'] as const) {
      const drawn = star(random, 7, 60, 100)
      const walls = drawn.map((): Wall => ({
        facets: [
          { depth: 2, tilt: tilt() * DEGREE, endTilt: tilt() * DEGREE },
          { depth: 6, tilt: tilt() * DEGREE },
        ],
      }))
      const body = plate(6, [drawn], (_, e) => walls[e]!, datum)
      for (const depth of [0, 1, 4, 6]) {
        contourAt(body, depth).loops[0]!.forEach(({ from, to }, e) => {
          const line = body.loops[0]![e]!
          const [dx, dy] = [line.to.x - line.from.x, line.to.y - line.from.y]
          const off = (x: number, y: number) =>
            ((x - line.from.x) * dy - (y - line.from.y) * dx) / Math.hypot(dx, dy)
          expect(off(from.x, from.y)).toBeCloseTo(offsetAt(body, 0, e, depth, 'start'), 9)
          expect(off(to.x, to.y)).toBeCloseTo(offsetAt(body, 0, e, depth, 'end'), 9)
        })
      }
    }
  })

  test('the datum lies on the drawing at both ends', () => {
    const wall: Wall = {
      facets: [
        { depth: 6, tilt: 30 * DEGREE, endTilt: 5 * DEGREE },
        { depth: 9, tilt: 0 },
        { depth: 14, tilt: -20 * DEGREE, endTilt: -40 * DEGREE },
      ],
    }
    const places: [Datum, number][] = [
      ['top', 0],
      ['bottom', 14],
      ['root', 7.5],
    ]
    for (const [datum, depth] of places) {
      const body = plate(14, [rectangle(0, 0, 60, 40)], () => wall, datum)
      for (const end of ['start', 'end'] as const) expect(offsetAt(body, 0, 2, depth, end)).toBeCloseTo(0, 12)
    }
  })
})

describe('arcs', () => {
  const body = plate(10, [circle(4, -3, 50)], (_, e) => (e === 0 ? blend(10, 10, 40) : blend(10, 40, 10)))

  test.each([0.1, 1e-3, 1e-5])('within %f mm of the spiral, ends shared', (tolerance) => {
    const segments = contourAt(body, 8, tolerance).loops[0]!
    const [from, to] = [50 + 8 * tan(10), 50 + 8 * tan(40)]
    let worst = 0
    for (const [i, segment] of segments.entries()) {
      expect(segment.to).toEqual(segments[(i + 1) % segments.length]!.from)
      for (let s = 0; s <= 20; s++) {
        const { x, y } = pointAt(segment, s / 20)
        // The first half runs round from heading −180° to 0°, the second on to 180°.
        const heading = Math.atan2(y + 3, x - 4)
        const share =
          segment.edge === 0 ? (heading === Math.PI ? 0 : 1 + heading / Math.PI) : Math.abs(heading) / Math.PI
        const radius = segment.edge === 0 ? from + share * (to - from) : to + share * (from - to)
        worst = Math.max(worst, Math.abs(Math.hypot(x - 4, y + 3) - radius))
      }
    }
    expect(worst).toBeLessThan(1.01 * tolerance)
    expect(worst).toBeGreaterThan(tolerance / 100)
  })

  test('the area is the sector integral, and the contour’s own comes to it with its tolerance', () => {
    const [a, b] = [50 + 8 * tan(10), 50 + 8 * tan(40)]
    const exact = (Math.PI * (a * a + a * b + b * b)) / 3
    expect(areaByDepth(body)(8) / exact).toBeCloseTo(1, 14)
    expect(contourArea(contourAt(body, 8, 1e-6)) / exact).toBeCloseTo(1, 7)
  })
})

test('turned, mirrored and travelled the other way the contour is the same', () => {
  const random = seeded(77)
  const tilt = () => 30 * (random() - 0.5)
  const drawn = star(random, 6, 60, 100).map((v, i): Vertex => (i % 2 === 0 ? { ...v, bulge: 0.2 } : v))
  const walls = drawn.map(() => blend(8, tilt(), tilt()))
  const area = (vertices: readonly Vertex[], wallOf: (e: number) => Wall) =>
    areaByDepth(plate(8, [vertices], (_, e) => wallOf(e)))(5)
  const own = area(drawn, (e) => walls[e]!)
  const [cos, sin] = [Math.cos(1), Math.sin(1)]
  const turned = drawn.map((v) => ({ ...v, x: cos * v.x - sin * v.y + 20, y: sin * v.x + cos * v.y - 7 }))
  expect(area(turned, (e) => walls[e]!) / own).toBeCloseTo(1, 12)
  // Mirrored, the loop runs clockwise; reversed, it is the outline of a part again, each wall from its other end.
  const mirrored = reversed(
    drawn.map(({ x, y, bulge }) => (bulge === undefined ? { x: -x, y } : { x: -x, y, bulge: -bulge })),
  )
  const n = drawn.length
  expect(area(mirrored, (e) => reversedWall(walls[n - 1 - e]!)) / own).toBeCloseTo(1, 12)
})
