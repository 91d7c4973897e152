import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { prepProblems } from '../../../shared/prep/check.ts'
import { prepFacets, type Prep } from '../../../shared/prep/preps.ts'
import { prepFromStartingValue } from '../../../shared/prep/start.ts'
import { startingValues, startingValuesFor } from '../../../shared/prep/starting-values.ts'
import { spread } from '../../support/spread.ts'

const SEED = 20261201

describe('forms for one plate or both', () => {
  it.each<[Prep, { own: object[]; mate: object[] }]>([
    [{ form: 'square' }, { own: [], mate: [] }],
    [
      { form: 'single-bevel', angle: 45, rootFace: 0, opensTo: 'top' },
      { own: [{ depth: 20, tilt: 45 }], mate: [] },
    ],
    [
      { form: 'single-bevel', angle: 30, rootFace: 2, opensTo: 'bottom', plates: 'both' },
      {
        own: [
          { depth: 2, tilt: 0 },
          { depth: 20, tilt: -30 },
        ],
        mate: [
          { depth: 2, tilt: 0 },
          { depth: 20, tilt: -30 },
        ],
      },
    ],
    [
      { form: 'single-v', grooveAngle: 60, rootFace: 0, opensTo: 'top' },
      { own: [{ depth: 20, tilt: 30 }], mate: [{ depth: 20, tilt: 30 }] },
    ],
    // The groove keeps its angle: one plate alone takes all of it.
    [
      { form: 'single-v', grooveAngle: 60, rootFace: 0, opensTo: 'top', plates: 'one' },
      { own: [{ depth: 20, tilt: 60 }], mate: [] },
    ],
    [
      {
        form: 'double-v',
        topGrooveAngle: 60,
        bottomGrooveAngle: 40,
        topDepth: 9,
        rootFace: 2,
        plates: 'one',
      },
      {
        own: [
          { depth: 9, tilt: 60 },
          { depth: 11, tilt: 0 },
          { depth: 20, tilt: -40 },
        ],
        mate: [],
      },
    ],
  ])('%j', (prep, { own, mate }) => {
    expect(prepFacets(prep, 20)).toEqual({ kind: 'facets', facets: own, mate })
  })

  it('refuses a groove angle that one plate cannot take alone', () => {
    const prep: Prep = { form: 'single-v', grooveAngle: 100, rootFace: 0, opensTo: 'top' }
    expect(prepFacets(prep, 20).kind).toBe('facets')
    expect(prepFacets({ ...prep, plates: 'one' }, 20)).toMatchObject({ code: 'angle-out-of-range' })
  })

  it('yields what every form promises, for random figures', () => {
    const plates = fc.constantFrom('one' as const, 'both' as const)
    const opensTo = fc.constantFrom('top' as const, 'bottom' as const)
    const angle = spread(-5, 100)
    const length = spread(0, 30)
    const prep: fc.Arbitrary<Prep> = fc.oneof(
      fc.record({ form: fc.constant('tilt' as const), tilt: spread(-95, 95), plates }),
      fc.record({ form: fc.constant('single-bevel' as const), angle, rootFace: length, opensTo, plates }),
      fc.record({
        form: fc.constant('single-v' as const),
        grooveAngle: angle,
        rootFace: length,
        opensTo,
        plates,
      }),
      fc.record({
        form: fc.constant('double-bevel' as const),
        topAngle: angle,
        bottomAngle: angle,
        topDepth: length,
        rootFace: length,
        plates,
      }),
      fc.record({
        form: fc.constant('double-v' as const),
        topGrooveAngle: angle,
        bottomGrooveAngle: angle,
        topDepth: length,
        rootFace: length,
        plates,
      }),
    )
    let made = 0
    fc.assert(
      fc.property(prep, spread(1, 40), (own, thickness) => {
        if (prepFacets(own, thickness).kind === 'facets') made++
        expect(prepProblems(own, thickness)).toEqual([])
      }),
      { seed: SEED, numRuns: 400 },
    )
    expect(made).toBeGreaterThan(100)
  })
})

describe('a prep from a row of the starting values', () => {
  const row = (detail: string) => startingValues.find((own) => own.detail === detail)!

  it('gives prep, both plates, root opening and both bands in one call', () => {
    expect(prepFromStartingValue(row('B-U2'), 20)).toMatchObject({
      kind: 'start',
      prep: { form: 'single-v', grooveAngle: 60, rootFace: 1.5875, opensTo: 'top' },
      facets: [{ tilt: 30 }, { depth: 20, tilt: 0 }],
      mate: [{ tilt: 30 }, { depth: 20, tilt: 0 }],
      rootOpening: 1.5875,
      grooveAngle: 60,
      asDetailed: { angle: { plus: 10, minus: 0 }, rootOpening: { plus: 1.5875, minus: 0 } },
      asFitUp: { angle: { plus: 10, minus: 5 }, rootFace: null },
      row: { known: 'memory' },
    })
  })

  it('gives a bevel opposite a square edge the whole groove angle', () => {
    expect(prepFromStartingValue(row('TC-U5a'), 20)).toMatchObject({
      prep: { form: 'double-bevel', topAngle: 45, bottomAngle: 45 },
      mate: [],
    })
  })

  it('refuses as values', () => {
    expect(prepFromStartingValue(row('1.3'), 20)).toEqual({
      kind: 'error',
      code: 'thickness-outside-row',
      message: 'ISO 9692-1 1.3 is for plate of 3 to 10 mm, not 20 mm. Choose another detail.',
    })
    expect(prepFromStartingValue(row('BTC-P4'), 3)).toMatchObject({ code: 'root-face-too-deep' })
  })

  it('makes a sound prep of every row at every thickness that it holds', () => {
    for (const thickness of [3.5, 6, 12, 25, 60]) {
      for (const own of startingValuesFor(thickness)) {
        const start = prepFromStartingValue(own, thickness)
        if (start.kind === 'start') expect(prepProblems(start.prep, thickness)).toEqual([])
        else expect(start.code).toBe('root-face-too-deep')
      }
    }
  })
})
