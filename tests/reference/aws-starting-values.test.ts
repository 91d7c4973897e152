import { describe, expect, it } from 'vitest'
import { prepFromStartingValue } from '../../shared/prep/start.ts'
import { startingValues } from '../../shared/prep/starting-values.ts'

function detail(name: string, angle?: number) {
  const row = startingValues.find(
    (own) => own.detail === name && (angle === undefined || own.angle.from === angle),
  )
  if (!row) throw new Error(`no row ${name}`)
  return row
}

/**
 * Source: AWS D1.1:2020 pp. 87, 88 and 114 (seen) and its metric form, written there in sixteenths of an inch or in mm. The
 * rows B-U2 and B-U3b are from memory, and say so.
 */
describe('AWS D1.1 starting values', () => {
  it('B-U4b: 45°, R and f 0–1/8; as fit up +1/16 −1/8, f free, α +10 −5', () => {
    const row = detail('B-U4b')
    expect(row).toMatchObject({ known: 'seen', angle: { from: 45 }, rootOpening: { from: 0, to: 3.175 } })
    expect(row.asFitUp).toEqual({
      angle: { plus: 10, minus: 5 },
      rootOpening: { plus: 1.5875, minus: 3.175 },
      rootFace: null,
    })
    expect(row.asDetailed).toEqual({
      angle: { plus: 10, minus: 0 },
      rootOpening: { plus: 1.5875, minus: 0 },
      rootFace: { plus: 1.5875, minus: 0 },
    })
  })

  it('TC-U4a: 1/4 at 45°, 3/8 at 30°; R +1/4 −1/16', () => {
    expect(detail('TC-U4a', 45).rootOpening).toEqual({ from: 6.35, to: 6.35 })
    expect(detail('TC-U4a', 30).rootOpening).toEqual({ from: 9.524999999999999, to: 9.524999999999999 })
    expect(detail('TC-U4a', 45).asFitUp?.rootOpening).toEqual({ plus: 6.35, minus: 1.5875 })
  })

  it('TC-U5a: R ±0, f +1/16 −0 as detailed; R +1/4 −0, f ±1/16 as fit up', () => {
    expect(detail('TC-U5a', 45).asDetailed).toMatchObject({
      rootOpening: { plus: 0, minus: 0 },
      rootFace: { plus: 1.5875, minus: 0 },
    })
    expect(detail('TC-U5a', 45).asFitUp).toMatchObject({
      rootOpening: { plus: 6.35, minus: 0 },
      rootFace: { plus: 1.5875, minus: 1.5875 },
    })
  })

  it('C-U2a in mm: 6, 10 and 12 at 45, 30 and 20°; R +6 −2', () => {
    expect([45, 30, 20].map((angle) => detail('C-U2a', angle).rootOpening.from)).toEqual([6, 10, 12])
    expect(detail('C-U2a', 20).asDetailed?.rootOpening).toEqual({ plus: 2, minus: 0 })
    expect(detail('C-U2a', 20).asFitUp?.rootOpening).toEqual({ plus: 6, minus: 2 })
  })

  it('BTC-P4 in mm: f at least 3; R +3 −2, f ±2', () => {
    expect(detail('BTC-P4')).toMatchObject({
      rootFace: { from: 3, to: null },
      asDetailed: { rootOpening: { plus: 2, minus: 0 } },
      asFitUp: { rootOpening: { plus: 3, minus: 2 }, rootFace: { plus: 2, minus: 2 } },
    })
  })

  it('every row allows +10 −0 of its angle as detailed, +10 −5 as fit up', () => {
    for (const row of startingValues.filter(({ standard }) => standard === 'AWS D1.1')) {
      expect(row.asDetailed?.angle).toEqual({ plus: 10, minus: 0 })
      expect(row.asFitUp?.angle).toEqual({ plus: 10, minus: 5 })
    }
  })

  it('B-U2 and B-U3b: 60°, the rest as B-U4b (from memory)', () => {
    const { rootOpening, rootFace, asDetailed, asFitUp } = detail('B-U4b')
    for (const name of ['B-U2', 'B-U3b']) {
      const own = { known: 'memory', angle: { from: 60, to: 60 }, rootOpening, rootFace, asDetailed, asFitUp }
      expect(detail(name)).toMatchObject(own)
    }
  })

  it('gives each plate what the detail draws', () => {
    const tilts = (name: string, angle: number) => {
      const start = prepFromStartingValue(detail(name, angle), 25)
      if (start.kind === 'error') throw new Error(start.message)
      return [start.facets[0]?.tilt, start.mate[0]?.tilt ?? 0]
    }
    expect(tilts('B-U4b', 45)).toEqual([45, 0])
    expect(tilts('TC-U5a', 30)).toEqual([30, 0])
    expect(tilts('C-U2a', 20)).toEqual([10, 10])
    expect(tilts('B-U3b', 60)).toEqual([30, 30])
  })
})

describe('how well the rows are known', () => {
  it('says memory wherever the source was not read again', () => {
    const memory = startingValues.filter(({ known }) => known === 'memory').map(({ detail: own }) => own)
    expect(memory).toEqual(['1.3', '1.5', '1.9', '2.2', '2.4', '2.5', '2.8', '2.9', 'B-U2', 'B-U3b'])
    for (const row of startingValues) expect(row.source.includes('from memory')).toBe(row.known === 'memory')
  })
})
