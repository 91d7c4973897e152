import { describe, expect, it } from 'vitest'
import { sidesOf, taperFor, type CouponRow, type TaperFound } from '../../../shared/process/coupons.ts'
import { DEGREE, seeded } from '../../support/plates.ts'

const POWER = 1.15
const coupon = (name: string, path: number, feed: number, bottom: number, partSide?: number): CouponRow => ({
  name,
  material: 'mild-steel',
  path,
  feed,
  widthTop: 1.1,
  widthBottom: bottom,
  partSide,
})
const found = (coupons: readonly CouponRow[], path: number, feed: number): TaperFound => {
  const answer = taperFor(coupons, 'mild-steel', path, feed)
  if (answer.kind === 'refused') throw new Error(answer.code)
  return answer
}

const shop = [
  coupon('10 slow', 10, 60, 1.05),
  coupon('10 fast', 10, 200, 0.8),
  coupon('20 slow', 20, 60 / 2 ** POWER, 1.08),
  coupon('20 fast', 20, 200 / 2 ** POWER, 0.7),
]

describe('taper from coupons', () => {
  it('is the coupon’s own where one was cut alike', () => {
    for (const one of shop) {
      const taper = found(shop, one.path, one.feed)
      expect(taper.kind).toBe('measured')
      expect(taper.nearest).toBe(one.name)
      expect(taper.partSide).toBeCloseTo(Math.atan((1.1 - one.widthBottom) / (2 * one.path)), 15)
    }
  })

  it('runs straight between them, over feed and over path', () => {
    const taper = (one: CouponRow) => sidesOf(one).partSide
    const halfway = found(shop, 10, 130)
    expect(halfway.kind).toBe('interpolated')
    expect(halfway.partSide).toBeCloseTo((taper(shop[0]!) + taper(shop[1]!)) / 2, 12)
    // At 15 mm, the feed of the fast coupons' quality.
    const between = found(shop, 15, 200 / 1.5 ** POWER)
    expect(between.kind).toBe('interpolated')
    expect(between.partSide).toBeCloseTo((taper(shop[1]!) + taper(shop[3]!)) / 2, 12)
    expect(between.from).toEqual(['10 fast', '20 fast'])
  })

  it('says that it extrapolates, holds the nearest figure and names the coupon', () => {
    for (const [path, feed, nearest] of [
      [10, 300, '10 fast'],
      [10, 30, '10 slow'],
      [40, 200 / 4 ** POWER, '20 fast'],
      [5, 60 * 2 ** POWER, '10 slow'],
    ] as const) {
      const taper = found(shop, path, feed)
      expect([taper.kind, taper.nearest]).toEqual(['extrapolated', nearest])
      expect(taper.partSide).toBeCloseTo(sidesOf(shop.find(({ name }) => name === nearest)!).partSide, 12)
    }
  })

  it('joins single coupons of one quality, told within the step of a feed dial', () => {
    const singles = [coupon('10', 10, 101, 0.9), coupon('30', 30, 100 / 3 ** POWER, 0.7)]
    expect(found(singles, 20, 100 / 2 ** POWER).kind).toBe('interpolated')
    expect(found(singles, 20, 110 / 2 ** POWER).kind).toBe('extrapolated')
  })

  it('rises with feed where the coupons do', () => {
    const random = seeded(8)
    for (let round = 0; round < 50; round++) {
      const rows = [8, 12, 25].flatMap((path) => {
        let [feed, bottom] = [20 / path, 1.1 - 0.02 * random()]
        return [1, 2, 3, 4].map((k) => {
          feed *= 1.2 + random()
          bottom -= 0.05 * random()
          return coupon(`${path}/${k}`, path, feed, bottom)
        })
      })
      const path = 7 + 20 * random()
      let before = -Infinity
      for (let feed = 0.5; feed < 40; feed *= 1.3) {
        const { partSide } = found(rows, path, feed)
        expect(partSide).toBeGreaterThanOrEqual(before - 1e-15)
        before = partSide
      }
    }
  })

  it('keeps part side and waste side apart', () => {
    const leaning = [coupon('a', 20, 50, 0.7, 0.2 * DEGREE), coupon('b', 20, 100, 0.5, 0.4 * DEGREE)]
    const taper = found(leaning, 20, 75)
    expect(taper.partSide).toBeCloseTo(0.3 * DEGREE, 12)
    expect(taper.difference).toBeCloseTo(taper.partSide - taper.wasteSide, 15)
    const { partSide, wasteSide } = sidesOf(leaning[0]!)
    expect(20 * (Math.tan(partSide) + Math.tan(wasteSide))).toBeCloseTo(1.1 - 0.7, 14)
  })

  it('refuses without coupons of the material, and unsound ones by name', () => {
    expect(taperFor(shop, 'copper', 10, 100)).toMatchObject({ code: 'no-coupon-of-material' })
    const bad = [...shop, coupon('bad', 10, 0, 1)]
    expect(taperFor(bad, 'mild-steel', 10, 100)).toMatchObject({ code: 'coupon-unsound', coupon: 'bad' })
    expect(taperFor(shop, 'mild-steel', NaN, 100)).toMatchObject({ code: 'query-out-of-range' })
  })
})
