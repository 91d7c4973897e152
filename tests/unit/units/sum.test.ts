import { evaluate, type Unit } from 'mathjs'
import { describe, expect, test } from 'vitest'
import { parseAngle, parseLength } from '../../../shared/units/parse.ts'

describe('simple sums, against mathjs', () => {
  test.each([
    ['12.5 + 3', '12.5 mm + 3 mm'],
    ['12,5+3', '12.5 mm + 3 mm'],
    ['100 - 2*6.35', '100 mm - 2 * 6.35 mm'],
    ['2 x 37.5 mm', '2 * 37.5 mm'],
    ['62.5 / 4', '62.5 mm / 4'],
    ['1 1/2 + 3/8 in', '(1.5 + 0.375) * 25.4 mm'],
    ['1-1/2" + 10mm', '1.5 * 25.4 mm + 10 mm'],
    ['10 mm + 1 in - 5', '10 mm + 25.4 mm - 5 mm'],
    ['-5 + 20', '15 mm'],
    ['3 × 4', '12 mm'],
  ])('%s is %s', (text, same) => {
    const read = parseLength(text, 'mm')
    if (read.kind !== 'value') throw new Error(`${text}: ${JSON.stringify(read)}`)
    expect(read.value).toBeCloseTo((evaluate(same) as Unit).toNumber('mm'), 10)
  })

  test('in inches the echo is in inches', () => {
    expect(parseLength('1/2 + 1/4', 'in')).toMatchObject({
      value: expect.closeTo(19.05, 10),
      echo: '0.75 in',
    })
  })

  test('angles', () => {
    expect(parseAngle('90 - 52.5')).toMatchObject({ kind: 'value', value: 37.5 })
    expect(parseAngle('60/2')).toMatchObject({ kind: 'value', value: 30 })
    expect(parseAngle("45° 30' + 1")).toMatchObject({ kind: 'value', value: 46.5 })
  })

  test('what is no sum is still refused with what to do', () => {
    for (const text of ['12 +', '+', '3 mm * 2 mm', '10 / 0.0', 'two + 3', '1,234 + 1']) {
      expect(parseLength(text, 'mm').kind, text).toBe('error')
    }
  })
})
