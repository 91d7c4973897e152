import Coordinate from 'jsts/org/locationtech/jts/geom/Coordinate.js'
import GeometryFactory from 'jsts/org/locationtech/jts/geom/GeometryFactory.js'
import BufferOp from 'jsts/org/locationtech/jts/operation/buffer/BufferOp.js'
import BufferParameters from 'jsts/org/locationtech/jts/operation/buffer/BufferParameters.js'
import { expect, test } from 'vitest'
import { contourArea } from '../../shared/contours/check.ts'
import { contourAt } from '../../shared/contours/contour.ts'
import { soundRange } from '../../shared/events/range.ts'
import type { Point } from '../../shared/geometry/types.ts'
import { DEGREE, facets, plate, reversed, seeded, star } from '../support/plates.ts'

/** Source: jsts 2.12 (buffer with mitred joins). Equal tilts are one uniform offset: areas before the first event. */
function bufferedArea(loops: Point[][], distance: number): number {
  const factory = new GeometryFactory()
  const ring = (points: Point[]) =>
    factory.createLinearRing([...points, points[0]!].map(({ x, y }) => new Coordinate(x, y)))
  const polygon = factory.createPolygon(ring(loops[0]!), loops.slice(1).map(ring))
  const mitred = new BufferParameters(8, BufferParameters.CAP_FLAT, BufferParameters.JOIN_MITRE, 1000)
  return BufferOp.bufferOp(polygon, distance, mitred).getArea()
}

test.each(Array.from({ length: 24 }, (_, i) => [i + 1]))('plate %i', (seed) => {
  const random = seeded(seed)
  const loops = [star(random, 4 + (seed % 9), 60, 100), reversed(star(random, 3 + (seed % 4), 15, 30))]
  const tilt = (seed % 2 === 0 ? 1 : -1) * (10 + 40 * random())
  const thickness = 40
  const body = plate(thickness, loops, () => facets([thickness, tilt]))
  const { to } = soundRange(body)
  expect(to).toBeGreaterThan(0)
  for (const share of [0.1, 0.5, 0.95]) {
    const expected = bufferedArea(loops, share * to * Math.tan(tilt * DEGREE))
    expect(Math.abs(contourArea(contourAt(body, share * to)) / expected - 1)).toBeLessThan(1e-9)
  }
})
