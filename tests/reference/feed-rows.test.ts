import { describe, expect, it } from 'vitest'
import { metalPath } from '../../shared/jet/axis.ts'
import { feedFor, type JetMake } from '../../shared/process/feed.ts'
import { workMaterials, type WorkMaterialCode } from '../../shared/process/materials.ts'
import { radians } from '../../shared/units/angle.ts'

/**
 * Feed equation of Zeng and Kim 1992, constants and machinability numbers from memory. The rows were *derived* from it
 * beside this code, rounded to 0.1 mm/min: they hold the code to the equation as remembered, not to a printed table.
 */
const make: JetMake = { pressure: 345, orifice: 0.33, mixingTube: 1.02, abrasiveRate: 340 }
const PATH = 25.4

const feed = (material: WorkMaterialCode, quality: number, path = PATH) =>
  feedFor(workMaterials[material].machinability, make, quality, path) as number

describe('feed at 345 MPa, 0.33 and 1.02 mm, 340 g/min, 25.4 mm', () => {
  it.each<[WorkMaterialCode, readonly [number, number, number]]>([
    ['aluminium', [411.9, 116.4, 64.7]],
    ['mild-steel', [148.3, 41.9, 23.3]],
    ['stainless-304', [137.2, 38.8, 21.6]],
    ['titanium', [202.7, 57.3, 31.9]],
  ])('%s at quality 1, 3 and 5', (material, rows) => {
    const found = [1, 3, 5].map((quality) => feed(material, quality))
    rows.forEach((row, k) => expect(Math.abs(found[k]! - row)).toBeLessThanOrEqual(0.051))
  })

  it('is 6.365 times as fast at quality 1 as at quality 5, in any thickness', () => {
    for (const path of [1, 25.4, 150])
      expect(feed('copper', 1, path) / feed('copper', 5, path)).toBeCloseTo(6.365, 3)
  })

  it('falls with cos^1.15 of the tilt', () => {
    for (const tilt of [15, 30, 45, 60].map(radians)) {
      const share = feed('aluminium', 3, metalPath(PATH, tilt)) / feed('aluminium', 3)
      expect(share).toBeCloseTo(Math.cos(tilt) ** 1.15, 12)
    }
    // By hand: cos 45° to the power 1.15 is 0.7071^1.15.
    expect(feed('aluminium', 3, metalPath(PATH, radians(45)))).toBeCloseTo(116.4 * 0.67129, 1)
  })

  it('has the machinability numbers as remembered', () => {
    const numbers = Object.values(workMaterials).map(({ machinability }) => machinability)
    expect(numbers).toEqual([81.9, 83.1, 87.6, 110, 115, 121, 213, 322, 596, null, null])
  })

  it('agrees with its inch form within 0.2 % before the last power, 0.24 % in feed', () => {
    // 163 with in/min, ksi, in and lb/min, from memory.
    const [ksi, inch, pound] = [6.894757, 25.4, 453.59237]
    const { pressure, orifice, mixingTube, abrasiveRate } = make
    const inches =
      ((213 * (pressure / ksi) ** 1.594 * (orifice / inch) ** 1.374 * (abrasiveRate / pound) ** 0.343) /
        (163 * 3 * (PATH / inch) * (mixingTube / inch) ** 0.618)) **
      1.15
    expect(Math.abs((inches * inch) / feed('aluminium', 3) - 1)).toBeLessThan(0.0024)
  })
})
