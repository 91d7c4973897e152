import { expect, test } from 'vitest'
import { standoffFor } from '../../shared/jet/nozzle.ts'
import { radians } from '../../shared/units/angle.ts'

/**
 * Source: outside diameters of common nozzles, from memory; the stand-off at which the rim just clears, (D/2)·tan A, by
 * our own algebra.
 */
test.each([
  [6.35, [1.83, 3.18, 5.5]],
  [7.14, [2.06, 3.57, 6.18]],
  [9.53, [2.75, 4.77, 8.25]],
])('nozzle of %d mm at 30, 45 and 60°', (diameter, expected) => {
  const found = [30, 45, 60].map((angle) => standoffFor(diameter, radians(angle), 0))
  // The figures are rounded to 0.01 mm.
  expected.forEach((value, i) => expect(Math.abs((found[i] ?? 0) - value)).toBeLessThanOrEqual(0.0051))
})
