import { describe, expect, it } from 'vitest'
import { startingValues, startingValuesFor } from '../../shared/prep/starting-values.ts'

/**
 * Source: ISO 9692-1 (2013), all ranges from memory; the scope (gaps are those after tacking) seen. α is the whole groove
 * angle, β one side.
 */
describe('ISO 9692-1 starting values', () => {
  const OPEN = null
  it.each([
    ['1.3', 'single-v', [3, 10], [40, 60], [0, 4], [0, 2]],
    ['1.5', 'single-v', [5, 40], [60, 60], [1, 4], [2, 4]],
    ['1.9', 'single-bevel', [3, 10], [35, 60], [2, 4], [1, 2]],
    ['2.2', 'single-v', [3, 40], [40, 60], [0, 3], [0, 2]],
    ['2.4', 'double-v', [10, OPEN], [40, 60], [1, 4], [2, 6]],
    ['2.5', 'double-v', [10, OPEN], [40, 60], [1, 3], [0, 2]],
    ['2.8', 'single-bevel', [3, 30], [35, 60], [1, 4], [0, 2]],
    ['2.9', 'double-bevel', [10, OPEN], [35, 60], [1, 4], [0, 2]],
  ] as const)('%s %s', (detail, prep, thickness, angle, gap, rootFace) => {
    const range = ([from, to]: readonly [number, number | null]) => ({ from, to })
    const row = startingValues.find((own) => own.standard === 'ISO 9692-1' && own.detail === detail)
    expect(row).toMatchObject({
      prep,
      known: 'memory',
      angleOf: prep.endsWith('-v') ? 'groove' : 'bevel',
      thickness: range(thickness),
      angle: range(angle),
      rootOpening: range(gap),
      rootFace: range(rootFace),
      asDetailed: null,
      asFitUp: null,
    })
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
