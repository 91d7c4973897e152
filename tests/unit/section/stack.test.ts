import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { stackLabels } from '../../../src/section/stack.ts'

const labels = fc.array(
  fc.record({
    centre: fc.double({ min: -50, max: 400, noNaN: true }),
    size: fc.double({ min: 5, max: 40, noNaN: true }),
  }),
  { minLength: 1, maxLength: 6 },
)
const TOUCH = 1e-9

describe('labels along a line', () => {
  it('leaves labels that do not meet where they want to be', () => {
    expect(
      stackLabels(
        [
          { centre: 20, size: 10 },
          { centre: 60, size: 10 },
        ],
        4,
        0,
        100,
      ),
    ).toEqual([20, 60])
  })

  it('shares the move between two that meet', () => {
    // Both want 50: 10 high with a gap of 4, so 7 to either side.
    expect(
      stackLabels(
        [
          { centre: 50, size: 10 },
          { centre: 50, size: 10 },
        ],
        4,
        0,
        100,
      ),
    ).toEqual([43, 57])
  })

  it('keeps them within the line', () => {
    expect(stackLabels([{ centre: -5, size: 10 }], 4, 0, 100)).toEqual([5])
    expect(stackLabels([{ centre: 99, size: 10 }], 4, 0, 100)).toEqual([95])
  })

  it('never lets two touch, whatever they want', () => {
    fc.assert(
      fc.property(labels, (wanted) => {
        const sorted = [...wanted].sort((a, b) => a.centre - b.centre)
        const centres = stackLabels(sorted, 6, 0, 300)
        for (let i = 1; i < centres.length; i += 1) {
          const free = centres[i]! - sorted[i]!.size / 2 - (centres[i - 1]! + sorted[i - 1]!.size / 2)
          expect(free).toBeGreaterThanOrEqual(6 - TOUCH)
        }
        expect(centres[0]! - sorted[0]!.size / 2).toBeGreaterThanOrEqual(-TOUCH)
      }),
      { seed: 7 },
    )
  })

  it('moves labels no further than it must: the sum of squared moves is the least', () => {
    fc.assert(
      fc.property(labels, fc.double({ min: -3, max: 3, noNaN: true }), (wanted, nudge) => {
        const sorted = [...wanted].sort((a, b) => a.centre - b.centre)
        const cost = (centres: readonly number[]) =>
          centres.reduce((sum, centre, i) => sum + (centre - sorted[i]!.centre) ** 2, 0)
        const best = stackLabels(sorted, 6, -1e4, 1e4)
        // Any other arrangement that keeps the gaps, e.g. all moved together, costs at least as much.
        expect(cost(best.map((centre) => centre + nudge))).toBeGreaterThanOrEqual(cost(best) - 1e-6)
      }),
      { seed: 8 },
    )
  })
})
