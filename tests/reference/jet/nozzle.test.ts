import { describe, expect, it } from 'vitest'
import { smallestInteriorAngle } from '../../../shared/seams/limits.ts'
import { standoffFor } from '../../../shared/jet/nozzle.ts'
import { degrees, radians } from '../../../shared/units/angle.ts'

/** Stand-off at which the rim just clears, (D/2)·tan A: derived; outside diameters of common nozzles from memory. */
describe('stand-off needed by the rim', () => {
  it.each([
    [6.35, [1.83, 3.18, 5.5]],
    [7.14, [2.06, 3.57, 6.18]],
    [9.53, [2.75, 4.77, 8.25]],
  ])('nozzle of %d mm at 30, 45 and 60°', (diameter, expected) => {
    const found = [30, 45, 60].map((angle) => standoffFor(diameter, radians(angle), 0))
    // The figures are rounded to 0.01 mm.
    expected.forEach((value, i) => expect(Math.abs((found[i] ?? 0) - value)).toBeLessThanOrEqual(0.0051))
  })
})

/** Derived table: smallest interior angle that a head limit allows for two equal walls, degrees. */
describe('smallest interior angle', () => {
  it.each([
    [45, [114.09, 88.89, 70.53]],
    [37.5, [80.16, 65.0, 52.59]],
    [30, [57.95, 47.69, 38.94]],
  ])('walls of %d° under limits of 50, 55 and 60°', (tilt, expected) => {
    const found = [50, 55, 60].map((limit) => smallestInteriorAngle(radians(limit), radians(tilt)))
    expected.forEach((value, i) =>
      expect(Math.abs(degrees(found[i] ?? 0) - value)).toBeLessThanOrEqual(0.0051),
    )
  })
})
