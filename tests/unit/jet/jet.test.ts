import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { largestCornerTilt, seamTiltOf } from '../../../shared/seams/corners.ts'
import { axisOffset, metalPath, wholeTilt } from '../../../shared/jet/axis.ts'
import { bottomEdgeErrors } from '../../../shared/accuracy/error-budget.ts'
import { rimClearance, standoffFor } from '../../../shared/jet/nozzle.ts'
import { smallestInteriorAngle, tiltsAllowedBeside } from '../../../shared/seams/limits.ts'
import { jetTilt, taperFromCoupon, wallTilt } from '../../../shared/jet/taper.ts'
import { degrees, radians } from '../../../shared/units/angle.ts'
import { spread } from '../../support/spread.ts'

const SEED = 20261201
const tilt = spread(radians(-70), radians(70))
const taper = spread(radians(-5), radians(5))
const interior = spread(radians(20), radians(175))

describe('taper', () => {
  it('is half the narrowing over the path, per side', () => {
    // 1.1 mm at the top, 0.9 at the bottom, 20 mm plate: atan(0.1/20).
    expect(degrees(taperFromCoupon({ widthTop: 1.1, widthBottom: 0.9, path: 20 }))).toBeCloseTo(0.286477, 6)
    expect(taperFromCoupon({ widthTop: 0.9, widthBottom: 1.1, path: 20 })).toBeLessThan(0)
  })

  it('taken out, leaves the wall asked for', () => {
    fc.assert(
      fc.property(tilt, taper, (wall, lean) => {
        expect(wallTilt(jetTilt(wall, lean), lean)).toBeCloseTo(wall, 12)
      }),
      { seed: SEED },
    )
  })

  /** Built from the picture itself: an axis leaning by β − τ whose near side, r·cos τ off it, leans τ back to the wall. */
  it('puts the near side of the jet on the wall', () => {
    fc.assert(
      fc.property(tilt, taper, spread(0.2, 3), (wall, lean, kerf) => {
        const axis = axisOffset(kerf, wall, lean)
        // The jet's edge starts r off the axis, square to it, where the axis meets the top face, and turns by τ.
        const alpha = jetTilt(wall, lean)
        const edge = { x: axis - (kerf / 2) * Math.cos(alpha), depth: (kerf / 2) * Math.sin(alpha) }
        expect(edge.x).toBeCloseTo(edge.depth * Math.tan(wall), 9)
      }),
      { seed: SEED },
    )
  })
})

describe('whole tilt and path', () => {
  it('adds side tilt and lead as the slopes they are', () => {
    fc.assert(
      fc.property(tilt, tilt, (side, lead) => {
        const whole = wholeTilt(side, lead)
        expect(Math.tan(whole) ** 2).toBeCloseTo(Math.tan(side) ** 2 + Math.tan(lead) ** 2, 9)
        expect(whole).toBeGreaterThanOrEqual(Math.abs(side) - 1e-12)
      }),
      { seed: SEED },
    )
  })

  it('goes twice as far through the metal at 60°', () => {
    expect(metalPath(10, radians(60))).toBeCloseTo(20, 12)
  })
})

describe('nozzle', () => {
  it('has exactly the clearance that its stand-off was worked out for', () => {
    const size = spread(0.1, 12)
    fc.assert(
      fc.property(size, tilt, spread(0, 5), (diameter, lean, clearance) => {
        const standoff = standoffFor(diameter, lean, clearance)
        expect(rimClearance({ diameter, standoff }, lean)).toBeCloseTo(clearance, 9)
        expect(rimClearance({ diameter, standoff }, -lean)).toBeCloseTo(clearance, 9)
      }),
      { seed: SEED },
    )
  })
})

describe('tilts allowed at a corner', () => {
  it('puts the seam on the limit at both ends, and within it between', () => {
    const limit = radians(55)
    fc.assert(
      fc.property(spread(radians(-54), radians(54)), interior, (other, angle) => {
        const range = tiltsAllowedBeside(limit, other, angle)
        if (!range) throw new Error('the other wall is within the limit')
        const seam = (own: number) => seamTiltOf(own, other, Math.PI - angle) ?? Number.NaN
        expect(seam(range.lowest)).toBeCloseTo(limit, 8)
        expect(seam(range.highest)).toBeCloseTo(limit, 8)
        expect(seam((range.lowest + range.highest) / 2)).toBeLessThan(limit)
      }),
      { seed: SEED },
    )
  })

  it('is empty when the other wall passes the limit by itself', () => {
    expect(tiltsAllowedBeside(radians(50), radians(51), radians(90))).toBeNull()
  })

  it('agrees with the rule for equal walls', () => {
    fc.assert(
      fc.property(spread(0.1, 1.3), interior, (limit, angle) => {
        const equal = largestCornerTilt(limit, angle)
        const smallest = smallestInteriorAngle(limit, equal)
        expect(smallest).toBeCloseTo(angle, 6)
      }),
      { seed: SEED },
    )
    expect(smallestInteriorAngle(radians(40), radians(41))).toBeNull()
  })
})

describe('error budget', () => {
  it('is the change of the bottom edge, term by term', () => {
    const [t, beta] = [20, radians(40)]
    const small = { thickness: 0.01, height: 0.02, tilt: 1e-4 }
    const budget = bottomEdgeErrors(t, beta, small)
    expect(budget.fromThickness).toBeCloseTo((t + 0.01) * Math.tan(beta) - t * Math.tan(beta), 9)
    expect(budget.fromHeight).toBeCloseTo(0.02 * Math.tan(beta), 9)
    expect(budget.fromTilt).toBeCloseTo(t * Math.tan(beta + 1e-4) - t * Math.tan(beta), 6)
    expect(budget.together ** 2).toBeCloseTo(
      budget.fromThickness ** 2 + budget.fromHeight ** 2 + budget.fromTilt ** 2,
      12,
    )
  })
})
