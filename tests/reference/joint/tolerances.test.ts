import { describe, expect, it } from 'vitest'
import { angleTolerance, type AngleToleranceClass } from '../../../shared/joint/angle-tolerance.ts'
import { startingValues, startingValuesFor } from '../../../shared/prep/starting-values.ts'

/** ISO 13920, general tolerances for angles (seen): minutes for a shorter leg ≤ 400, ≤ 1000, > 1000 mm. */
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

function detail(name: string, angle?: number) {
  const row = startingValues.find(
    (own) => own.detail === name && (angle === undefined || own.angle.from === angle),
  )
  if (!row) throw new Error(`no row ${name}`)
  return row
}

/** AWS D1.1:2020 pp. 87, 88 and 114 (seen), written there in sixteenths of an inch or in mm. */
describe('AWS D1.1 starting values', () => {
  it('B-U4b: 45°, R and f 0–1/8; as fit up +1/16 −1/8, f free, α +10 −5', () => {
    const row = detail('B-U4b')
    expect(row).toMatchObject({ known: 'seen', angle: { from: 45 }, rootOpening: { from: 0, to: 3.175 } })
    expect(row.asFitUp).toEqual({
      angle: { plus: 10, minus: 5 },
      rootOpening: { plus: 1.5875, minus: 3.175 },
      rootFace: null,
    })
  })

  it('TC-U4a: 1/4 at 45°, 3/8 at 30°; R +1/4 −1/16', () => {
    expect(detail('TC-U4a', 45).rootOpening).toEqual({ from: 6.35, to: 6.35 })
    expect(detail('TC-U4a', 30).rootOpening).toEqual({ from: 9.524999999999999, to: 9.524999999999999 })
    expect(detail('TC-U4a', 45).asFitUp?.rootOpening).toEqual({ plus: 6.35, minus: 1.5875 })
  })

  it('TC-U5a: R +1/4 −0, f ±1/16', () => {
    expect(detail('TC-U5a', 45).asFitUp).toMatchObject({
      rootOpening: { plus: 6.35, minus: 0 },
      rootFace: { plus: 1.5875, minus: 1.5875 },
    })
  })

  it('C-U2a in mm: 6, 10 and 12 at 45, 30 and 20°; R +6 −2', () => {
    expect([45, 30, 20].map((angle) => detail('C-U2a', angle).rootOpening.from)).toEqual([6, 10, 12])
    expect(detail('C-U2a', 20).asFitUp?.rootOpening).toEqual({ plus: 6, minus: 2 })
  })

  it('BTC-P4 in mm: f at least 3; R +3 −2, f ±2', () => {
    expect(detail('BTC-P4')).toMatchObject({
      rootFace: { from: 3, to: null },
      asFitUp: { rootOpening: { plus: 3, minus: 2 }, rootFace: { plus: 2, minus: 2 } },
    })
  })
})

describe('how well the rows are known', () => {
  it('says memory wherever the source was not read again', () => {
    const memory = startingValues.filter(({ known }) => known === 'memory').map(({ detail: own }) => own)
    expect(memory).toEqual(['1.3', '1.5', '1.9', '2.2', '2.4', '2.5', '2.8', '2.9', 'B-U2', 'B-U3b'])
    for (const row of startingValues) expect(row.source.includes('from memory')).toBe(row.known === 'memory')
  })

  it('offers the rows whose range holds the plate', () => {
    const iso = (thickness: number) =>
      startingValuesFor(thickness).flatMap(({ standard, detail: own }) =>
        standard === 'ISO 9692-1' ? [own] : [],
      )
    expect(iso(4)).toEqual(['1.3', '1.9', '2.2', '2.8'])
    expect(iso(50)).toEqual(['2.4', '2.5', '2.9'])
  })
})
