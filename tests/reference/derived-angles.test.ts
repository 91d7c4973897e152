import { expect, test } from 'vitest'
import { cornersOf, largestCornerTilt, seamTiltOf } from '../../shared/seams/corners.ts'
import { smallestInteriorAngle } from '../../shared/seams/limits.ts'
import { degrees, radians } from '../../shared/units/angle.ts'
import { DEGREE, facets, plate, rectangle } from '../support/plates.ts'

/**
 * Source: our own algebra, worked by hand to the digits shown; no outside figure stands behind these rows. Seams of two
 * walls, and what a head limit allows at a corner.
 */
const seam = (tilt1: number, tilt2: number, interior: number) =>
  degrees(seamTiltOf(tilt1 * DEGREE, tilt2 * DEGREE, Math.PI - interior * DEGREE) ?? Number.NaN)

test.each([
  [30, 30, 90, 39.2315], [22.5, 22.5, 90, 30.3612], [37.5, 37.5, 90, 47.3388], [30, 30, 60, 49.1066],
  [45, 45, 60, 63.4349], [45, 30, 90, 49.1066], [30, 0, 90, 30], [30, 30, 120, 33.6901],
])('walls of %f° and %f° at %f° meet in a seam of %f°', (a, b, interior, expected) => {
  expect(Math.abs(seam(a, b, interior) - expected)).toBeLessThan(5.1e-5)
}) // prettier-ignore

test.each([
  [45, 50, 114.09], [45, 55, 88.89], [45, 60, 70.53],
  [37.5, 50, 80.16], [37.5, 55, 65.0], [37.5, 60, 52.59],
  [30, 50, 57.95], [30, 55, 47.69], [30, 60, 38.94],
])('%f° walls under a limit of %f° need an interior angle of %f°', (tilt, limit, interior) => {
  expect(Math.abs(degrees(largestCornerTilt(limit * DEGREE, interior * DEGREE)) - tilt)).toBeLessThan(0.01)
  // The rows are rounded to 0.01°.
  const found = degrees(smallestInteriorAngle(radians(limit), radians(tilt)) ?? 0)
  expect(Math.abs(found - interior)).toBeLessThanOrEqual(0.0051)
}) // prettier-ignore

test('two 45° walls at a square corner need 54.74°; two 55° walls 63.66°', () => {
  const body = (tilt: number) => plate(10, [rectangle(0, 0, 100, 60)], () => facets([10, tilt]))
  expect(degrees(cornersOf(body(45))[0]!.bands[0]!.seamTilt!)).toBeCloseTo(54.7356, 4)
  expect(degrees(cornersOf(body(55))[2]!.bands[0]!.seamTilt!)).toBeCloseTo(63.66, 2)
})
