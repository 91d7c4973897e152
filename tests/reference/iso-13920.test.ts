import { describe, expect, it } from 'vitest'
import { angleTolerance, type AngleToleranceClass } from '../../shared/joint/angle-tolerance.ts'

/** Source: ISO 13920, general tolerances for angles (seen): minutes for a shorter leg ≤ 400, ≤ 1000, > 1000 mm. */
describe('ISO 13920 angle tolerances', () => {
  it.each([
    ['A', [20, 15, 10]],
    ['B', [45, 30, 20]],
    ['C', [60, 45, 30]],
    ['D', [90, 75, 60]],
  ] as const)('class %s', (grade: AngleToleranceClass, minutes) => {
    const found = [100, 400, 401, 1000, 1001].map((leg) => angleTolerance(grade, leg) * 60)
    const [short, middle, long] = minutes
    expect(found).toEqual([short, short, middle, middle, long])
  })
})
