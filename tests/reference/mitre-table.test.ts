import { expect, test } from 'vitest'
import { cornersOf } from '../../shared/seams/corners.ts'
import { DEGREE, facets, plate, regular } from '../support/plates.ts'

/**
 * Source: bench-saw manual 315.21212, table of compound mitres for a box with sloped sides (seen; the table's pitch is
 * 90° − tilt). tan(seam) = √(tan²β + (tan M / cos β)²); the dihedral angle between two sides is 180° − 2B.
 */
// wall tilt, sides, mitre M, blade tilt B, as printed to 0.01°
const table = [
  [60, 4, 40.89, 20.7], [60, 6, 26.57, 14.48], [60, 8, 19.73, 11.03],
  [50, 4, 37.45, 27.03], [50, 6, 23.86, 18.75], [50, 8, 17.6, 14.24],
  [45, 4, 35.26, 30.0], [45, 6, 22.21, 20.7], [45, 8, 16.32, 15.7],
  [40, 4, 32.73, 32.8], [40, 6, 20.36, 22.52], [40, 8, 14.91, 17.05],
] as const // prettier-ignore

const degrees = (radians: number | null) => (radians === null ? Number.NaN : radians / DEGREE)

/** Angle between two walls' faces from their outward normals (n cos β, sin β). */
function dihedral(tilt: number, interior: number): number {
  const turn = Math.PI - interior * DEGREE
  const [cos, sin] = [Math.cos(tilt * DEGREE), Math.sin(tilt * DEGREE)]
  return 180 - degrees(Math.acos(cos * cos * Math.cos(turn) + sin * sin))
}

test.each(table)('walls of %f° on %i sides', (tilt, sides, mitre, blade) => {
  const thickness = 10
  const body = plate(thickness, [regular(sides, 200)], () => facets([thickness, tilt]))
  for (const corner of cornersOf(body)) {
    expect(corner.kind).toBe('convex')
    expect(degrees(corner.interiorAngle)).toBeCloseTo(180 - 360 / sides, 9)
    // Half of the last printed digit of M moves the seam by up to 0.01°.
    const expected = degrees(
      Math.atan(Math.hypot(Math.tan(tilt * DEGREE), Math.tan(mitre * DEGREE) / Math.cos(tilt * DEGREE))),
    )
    expect(Math.abs(degrees(corner.bands[0]!.seamTilt) - expected)).toBeLessThan(0.01)
    expect(Math.abs(dihedral(tilt, degrees(corner.interiorAngle)) - (180 - 2 * blade))).toBeLessThan(0.0101)
  }
})
