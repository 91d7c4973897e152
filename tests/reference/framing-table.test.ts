import { expect, test } from 'vitest'
import { seamTiltOf } from '../../shared/seams/corners.ts'
import { DEGREE } from '../support/plates.ts'

/**
 * Source: roof framing. A hip is the seam of two roofs. Runs of a hip: Griffith, *Carpentry*, §20 and §38 (seen). Lengths
 * of a hip per 12 of common run, as framing squares carry them: from memory.
 */
const seam = (tilt: number, interior: number) =>
  seamTiltOf(tilt * DEGREE, tilt * DEGREE, Math.PI - interior * DEGREE) ?? Number.NaN

test('run of a hip per 12 of common run: 16.97 at a square corner, 13 in an octagon', () => {
  const hipRun = (interior: number) => 12 * Math.tan(seam(45, interior))
  expect(Math.abs(hipRun(90) - 16.97)).toBeLessThan(0.005)
  expect(Math.abs(hipRun(135) - 13)).toBeLessThan(0.05) // the book rounds 12.99 to 13
})

test.each([
  [4, 17.44], [6, 18.0], [8, 18.76], [12, 20.78],
])('hip length per 12 run for a rise of %i is %f (from memory)', (rise, length) => {
  const tilt = Math.atan(12 / rise) / DEGREE
  expect(Math.abs(rise / Math.cos(seam(tilt, 90)) - length)).toBeLessThan(0.006)
}) // prettier-ignore
