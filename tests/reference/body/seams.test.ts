import { describe, expect, test } from 'vitest'
import { cornersOf, largestCornerTilt, seamTiltOf } from '../../../shared/seams/corners.ts'
import { DEGREE, facets, plate, rectangle, regular } from '../../support/plates.ts'

const degrees = (radians: number | null) => (radians === null ? NaN : radians / DEGREE)
const seam = (tilt1: number, tilt2: number, interior: number) =>
  degrees(seamTiltOf(tilt1 * DEGREE, tilt2 * DEGREE, Math.PI - interior * DEGREE))

/** Angle between two walls' faces from their outward normals (n cos β, sin β). */
function dihedral(tilt: number, interior: number): number {
  const turn = Math.PI - interior * DEGREE
  const [cos, sin] = [Math.cos(tilt * DEGREE), Math.sin(tilt * DEGREE)]
  return 180 - degrees(Math.acos(cos * cos * Math.cos(turn) + sin * sin))
}

describe('published mitre table of a sloped-side box (bench-saw manual 315.21212, compound mitres, seen)', () => {
  // wall tilt, sides, mitre, blade tilt, as printed to 0.01°
  const table = [
    [60, 4, 40.89, 20.7], [60, 6, 26.57, 14.48], [60, 8, 19.73, 11.03],
    [50, 4, 37.45, 27.03], [50, 6, 23.86, 18.75], [50, 8, 17.6, 14.24],
    [45, 4, 35.26, 30.0], [45, 6, 22.21, 20.7], [45, 8, 16.32, 15.7],
    [40, 4, 32.73, 32.8], [40, 6, 20.36, 22.52], [40, 8, 14.91, 17.05],
  ] as const // prettier-ignore

  test.each(table)('walls of %f° on %i sides', (tilt, sides, mitre, blade) => {
    const thickness = 10
    const body = plate(thickness, [regular(sides, 200)], () => facets([thickness, tilt]))
    for (const corner of cornersOf(body)) {
      expect(corner.kind).toBe('convex')
      expect(degrees(corner.interiorAngle)).toBeCloseTo(180 - 360 / sides, 9)
      // tan(seam) = √(tan²β + (tan M / cos β)²); half of the last printed digit of M moves it by up to 0.01°
      const expected = degrees(
        Math.atan(Math.hypot(Math.tan(tilt * DEGREE), Math.tan(mitre * DEGREE) / Math.cos(tilt * DEGREE))),
      )
      expect(Math.abs(degrees(corner.bands[0]!.seamTilt) - expected)).toBeLessThan(0.01)
      expect(Math.abs(dihedral(tilt, 180 - 360 / sides) - (180 - 2 * blade))).toBeLessThan(0.0101)
    }
  })
})

test("Machinery's Handbook, 31st ed., pp. 121–122 (seen): A = 27°, B = 36° give walls of 63° and 54°, R = 35°2.5′", () => {
  expect(Math.abs(seam(63, 54, 90) - 67.356)).toBeLessThan(5e-4)
  // The printed C = 22°38.6′ is the seam's angle from the base: cot C = √(cot²A + cot²B) = 2.3971.
  expect(Math.abs(Math.tan(seam(63, 54, 90) * DEGREE) - 2.3971)).toBeLessThan(5e-5)
  expect(Math.abs(90 - seam(63, 54, 90) - (22 + 38.6 / 60))).toBeLessThan(0.05 / 60)
})

test('roof framing: run of a hip per 12 of common run (Griffith, Carpentry, §20 and §38, seen)', () => {
  const hipRun = (interior: number) => 12 * Math.tan(seam(45, 45, interior) * DEGREE)
  expect(Math.abs(hipRun(90) - 16.97)).toBeLessThan(0.005)
  expect(Math.abs(hipRun(135) - 13)).toBeLessThan(0.05) // the book rounds 12.99 to 13
})

test.each([
  [4, 17.44], [6, 18.0], [8, 18.76], [12, 20.78],
])('hip length per 12 run for a rise of %i is %f (from memory)', (rise, length) => {
  const tilt = degrees(Math.atan(12 / rise))
  const lean = seam(tilt, tilt, 90) * DEGREE
  expect(Math.abs(rise / Math.cos(lean) - length)).toBeLessThan(0.006)
}) // prettier-ignore

test.each([
  [30, 30, 90, 39.2315], [22.5, 22.5, 90, 30.3612], [37.5, 37.5, 90, 47.3388], [30, 30, 60, 49.1066],
  [45, 45, 60, 63.4349], [45, 30, 90, 49.1066], [30, 0, 90, 30], [30, 30, 120, 33.6901],
])('derived: walls of %f° and %f° at %f° meet in a seam of %f°', (a, b, interior, expected) => {
  expect(Math.abs(seam(a, b, interior) - expected)).toBeLessThan(5.1e-5)
}) // prettier-ignore

test.each([
  [45, 50, 114.09], [45, 55, 88.89], [45, 60, 70.53],
  [37.5, 50, 80.16], [37.5, 55, 65.0], [37.5, 60, 52.59],
  [30, 50, 57.95], [30, 55, 47.69], [30, 60, 38.94],
])('derived: %f° walls under a limit of %f° need an interior angle of %f°', (tilt, limit, interior) => {
  expect(Math.abs(degrees(largestCornerTilt(limit * DEGREE, interior * DEGREE)) - tilt)).toBeLessThan(0.01)
}) // prettier-ignore

test('two 45° walls at a square corner need 54.74°; two 55° walls 63.66°', () => {
  const body = (tilt: number) => plate(10, [rectangle(0, 0, 100, 60)], () => facets([10, tilt]))
  expect(degrees(cornersOf(body(45))[0]!.bands[0]!.seamTilt)).toBeCloseTo(54.7356, 4)
  expect(degrees(cornersOf(body(55))[2]!.bands[0]!.seamTilt)).toBeCloseTo(63.66, 2)
})
