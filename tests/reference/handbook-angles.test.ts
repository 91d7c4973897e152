import { expect, test } from 'vitest'
import { contourAt } from '../../shared/contours/contour.ts'
import { cornersOf } from '../../shared/seams/corners.ts'
import { DEGREE, facets, plate, rectangle } from '../support/plates.ts'

/**
 * Source: Machinery's Handbook, 31st ed., compound angles, pp. 121–122 (figures seen). Two faces at a square corner: C is
 * the angle of the line where they meet, R its heading in plan. The first example tells all angles from the base, the
 * second from the vertical; that reading is ours, and the figures agree with no other.
 */
const MINUTE = 1 / 60

/** A corner of a rectangle whose walls lean by two tilts, degrees: its seam from vertical, and its heading in plan. */
function squareCorner(tilt1: number, tilt2: number) {
  const thickness = 10
  const body = plate(thickness, [rectangle(0, 0, 200, 100)], (_, edge) =>
    facets([thickness, edge === 0 ? tilt1 : edge === 1 ? tilt2 : 0]),
  )
  const corner = cornersOf(body).find(({ vertex }) => vertex === 1)!
  // The corner between the lower and the right side moves down by the first wall's reach, right by the second's.
  const bottom = contourAt(body, thickness).loops[0]![1]!.from
  const heading = Math.atan2(bottom.x - 200, -bottom.y) / DEGREE
  return { seam: corner.bands[0]!.seamTilt! / DEGREE, heading }
}

test('A = 27°, B = 36° from the base: cot C = 2.3971, C = 22°38.6′, R = 35°2.5′', () => {
  const { seam, heading } = squareCorner(90 - 27, 90 - 36)
  expect(Math.abs(Math.tan(seam * DEGREE) - 2.3971)).toBeLessThan(5e-5)
  expect(Math.abs(90 - seam - (22 + 38.6 * MINUTE))).toBeLessThan(0.05 * MINUTE)
  expect(Math.abs(heading - (35 + 2.5 * MINUTE))).toBeLessThan(0.05 * MINUTE)
  // In our terms: walls of 63° and 54°.
  expect(Math.abs(seam - 67.356)).toBeLessThan(5e-4)
})

test('A = 47°14′, B = 38°10′ from the vertical: R = 36°0.9′, C = 53°12′', () => {
  const { seam, heading } = squareCorner(47 + 14 * MINUTE, 38 + 10 * MINUTE)
  expect(Math.abs(seam - (53 + 12 * MINUTE))).toBeLessThan(0.5 * MINUTE)
  // Worked in the book with five-figure tables: 0.1′ is their last digit.
  expect(Math.abs(heading - (36 + 0.9 * MINUTE))).toBeLessThan(0.1 * MINUTE)
})
