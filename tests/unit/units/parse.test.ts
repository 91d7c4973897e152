import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatAngle, formatLength } from '../../../shared/units/format.ts'
import { parseAngle, parseLength, readLengthField } from '../../../shared/units/parse.ts'
import { spread } from '../../support/spread.ts'

const SEED = 20261201

function value(parsed: ReturnType<typeof parseLength>): number {
  if (parsed.kind !== 'value') throw new Error(`not read: ${JSON.stringify(parsed)}`)
  return parsed.value
}

describe('lengths as people type them', () => {
  it.each([
    ['12,5', 'mm', 12.5],
    ['12.5', 'mm', 12.5],
    [' 12.5 mm ', 'mm', 12.5],
    ['38.1mm', 'in', 38.1],
    ['1 1/2 in', 'mm', 38.1],
    ['1-1/2"', 'mm', 38.1],
    ['1 1/2', 'in', 38.1],
    ['1½"', 'mm', 38.1],
    ['3/8"', 'mm', 9.525],
    ['3/8', 'in', 9.525],
    ['-1-1/2"', 'mm', -38.1],
    ['−3', 'mm', -3],
    ['.5', 'in', 12.7],
    [',5', 'mm', 0.5],
    ['0,125', 'in', 3.175],
    ['12,50', 'mm', 12.5],
    ['1,234.5', 'mm', 1234.5],
    ['1.234,5', 'mm', 1234.5],
    ['1,234,567', 'mm', 1234567],
    ['1.234', 'mm', 1.234],
    ['1234,567', 'mm', 1234.567],
    ['2 cm', 'mm', 20],
    ['0.5 m', 'mm', 500],
    ['1 ft', 'mm', 304.8],
    [`1' 6"`, 'mm', 457.2],
    [`1' 6 1/2"`, 'mm', 469.9],
    ['2″', 'mm', 50.8],
  ] as const)('%s with %s shown is %d mm', (text, unit, expected) => {
    expect(value(parseLength(text, unit))).toBeCloseTo(expected, 10)
  })

  it('asks about a comma that can mean decimals or thousands', () => {
    const asked = parseLength('1,234', 'mm')
    expect(asked).toMatchObject({
      kind: 'ambiguous',
      readings: [
        { value: 1.234, echo: '1.234 mm' },
        { value: 1234, echo: '1234 mm' },
      ],
    })
    expect(parseLength('1,234 in', 'mm')).toMatchObject({ kind: 'ambiguous' })
    expect(parseLength('12,345', 'mm').kind).toBe('ambiguous')
  })

  it.each([
    ['', 'empty'],
    ['   ', 'empty'],
    ['abc', 'wrong-unit'],
    ['12 miles', 'wrong-unit'],
    ['45°', 'wrong-unit'],
    ['1/0', 'division-by-zero'],
    ['1.2.3', 'not-a-number'],
    ['1e3', 'not-a-number'],
    ['1 234', 'not-a-number'],
    ['1,23,4', 'not-a-number'],
    ['--3', 'not-a-number'],
    ['NaN', 'wrong-unit'],
    ['=1+1', 'not-a-number'],
    ['9'.repeat(41), 'too-long'],
  ])('refuses %j as %s and says what to do', (text, code) => {
    const parsed = parseLength(text, 'mm')
    expect(parsed).toMatchObject({ kind: 'error', code })
    if (parsed.kind === 'error') expect(parsed.message).toMatch(/Type|Use/)
  })

  it('echoes what it understood, with the unit typed', () => {
    expect(parseLength('1-1/2"', 'mm')).toMatchObject({ echo: '1.5 in' })
    expect(parseLength('38,1mm', 'in')).toMatchObject({ echo: '38.1 mm' })
  })

  it('gives the stored bits back when the shown text is left as it is', () => {
    fc.assert(
      fc.property(spread(0, 1e5), fc.constantFrom('mm' as const, 'in' as const), (stored, unit) => {
        expect(value(readLengthField(formatLength(stored, unit), stored, unit))).toBe(stored)
        expect(value(readLengthField(formatLength(stored, unit, { bare: true }), stored, unit))).toBe(stored)
      }),
      { seed: SEED },
    )
  })

  it('reads every shown length back within the last digit shown', () => {
    fc.assert(
      fc.property(spread(-1e4, 1e4), (mm) => {
        expect(Math.abs(value(parseLength(formatLength(mm, 'mm'), 'in')) - mm)).toBeLessThan(0.00501)
        expect(Math.abs(value(parseLength(formatLength(mm, 'in'), 'mm')) - mm)).toBeLessThan(
          0.00005 * 25.4 + 1e-9,
        )
      }),
      { seed: SEED },
    )
  })

  it('never throws and never gives a value that is not finite', () => {
    const alphabet = fc.constantFrom(...`0123456789.,/ -+'"°½mincftEe`)
    fc.assert(
      fc.property(fc.string({ unit: alphabet, maxLength: 14 }), (text) => {
        for (const parsed of [parseLength(text, 'mm'), parseAngle(text)]) {
          if (parsed.kind === 'value') expect(Number.isFinite(parsed.value)).toBe(true)
        }
      }),
      { seed: SEED, numRuns: 2_000 },
    )
  })
})

describe('angles as people type them', () => {
  it.each([
    ['45', 45],
    ['45°', 45],
    ['22,5', 22.5],
    ['22 1/2 deg', 22.5],
    ['-30', -30],
    ['−30°', -30],
    ['+30', 30],
    [`45° 30'`, 45.5],
    [`-45°30'36"`, -45.51],
  ])('%s is %d°', (text, expected) => {
    expect(value(parseAngle(text))).toBeCloseTo(expected, 10)
  })

  it('asks and refuses as lengths do', () => {
    expect(parseAngle('1,234').kind).toBe('ambiguous')
    expect(parseAngle('30 mm')).toMatchObject({ kind: 'error', code: 'wrong-unit' })
    expect(parseAngle(`45° 75'`)).toMatchObject({ kind: 'error', code: 'not-a-number' })
    expect(parseAngle('')).toMatchObject({ kind: 'error', code: 'empty' })
  })

  it('reads what is shown, with and without a sign', () => {
    fc.assert(
      fc.property(spread(-89, 89), fc.boolean(), (degrees, sign) => {
        expect(Math.abs(value(parseAngle(formatAngle(degrees, { sign }))) - degrees)).toBeLessThan(0.00501)
      }),
      { seed: SEED },
    )
  })
})
