import { unit } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { degrees, radians } from '../../../shared/units/angle.ts'
import {
  formatAngle,
  formatArea,
  formatLength,
  formatNumber,
  formatVolume,
} from '../../../shared/units/format.ts'
import { inches, millimetres } from '../../../shared/units/length.ts'

describe('numbers as shown', () => {
  it.each([
    [12.5, 'mm', '12.5 mm'],
    [12, 'mm', '12 mm'],
    [100, 'mm', '100 mm'],
    [12.345, 'mm', '12.35 mm'],
    [0.004, 'mm', '0 mm'],
    [-0.004, 'mm', '0 mm'],
    [-3, 'mm', '−3 mm'],
    [38.1, 'in', '1.5 in'],
    [10, 'in', '0.3937 in'],
  ] as const)('%d mm in %s is %s', (mm, unit, expected) => {
    expect(formatLength(mm, unit)).toBe(expected)
  })

  it('shows signs, fixed decimals, and no unit when asked', () => {
    expect(formatAngle(30, { sign: true })).toBe('+30°')
    expect(formatAngle(-30)).toBe('−30°')
    expect(formatAngle(0, { sign: true })).toBe('0°')
    expect(formatAngle(54.7356103, { decimals: 1, fixed: true })).toBe('54.7°')
    expect(formatLength(10, 'mm', { decimals: 3, fixed: true, bare: true })).toBe('10.000')
    expect(formatNumber(Number.NaN)).toBe('–')
  })

  it('shows areas and volumes', () => {
    expect(formatArea(645.16, 'in')).toBe('1 in²')
    expect(formatArea(227.35, 'mm')).toBe('227.35 mm²')
    expect(formatVolume(16387.064, 'in')).toBe('1 in³')
    expect(formatVolume(5000, 'mm')).toBe('5 cm³')
  })
})

describe('conversions against mathjs', () => {
  const convert = (value: number, from: string, to: string) => unit(value, from).toNumber(to)

  it.each([0, 1, 1.5, 0.375, -7.25, 1e-6, 12345.678])('%d', (value) => {
    expect(millimetres(value)).toBeCloseTo(convert(value, 'inch', 'mm'), 9)
    expect(inches(value)).toBeCloseTo(convert(value, 'mm', 'inch'), 12)
    expect(radians(value)).toBeCloseTo(convert(value, 'deg', 'rad'), 12)
    expect(degrees(value)).toBeCloseTo(convert(value, 'rad', 'deg'), 6)
  })
})
