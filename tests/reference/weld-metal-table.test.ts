import { describe, expect, it } from 'vitest'
import { jointSection } from '../../shared/joint/section.ts'
import { weldMetalPerMetre } from '../../shared/joint/weld-metal.ts'

/**
 * Source: published table of weld metal (document 408837431, seen), kg/m at 7833 kg/m³ for 12.70 mm plate. Known misprints
 * are left out: t 7.94 gap 9.525, t 11.11 at 22.5°, t 14.29 at 45°, t 19.05 gap 9.525.
 */
describe('weld metal against the published table', () => {
  const DENSITY = 7833
  const T = 12.7
  /** One unit of the table's last digit: some of its figures are cut off, not rounded. */
  const ROUNDING = 0.001

  it.each([
    [1.588, 0.158],
    [3.175, 0.315],
    [6.35, 0.632],
  ])('gap of %d mm', (gap, published) => {
    const section = jointSection({ facets: [], thickness: T, mate: 'square', rootOpening: gap })
    expect(Math.abs(weldMetalPerMetre(section.area, DENSITY) - published)).toBeLessThanOrEqual(ROUNDING)
  })

  it.each([
    [5, 0.055],
    [10, 0.112],
    [15, 0.17],
    [22.5, 0.262],
    [30, 0.365],
    [45, 0.632],
  ])('triangle of %d°', (tilt, published) => {
    const section = jointSection({
      facets: [{ depth: T, tilt }],
      thickness: T,
      mate: 'square',
      rootOpening: 0,
    })
    expect(Math.abs(weldMetalPerMetre(section.area, DENSITY) - published)).toBeLessThanOrEqual(ROUNDING)
  })
})
