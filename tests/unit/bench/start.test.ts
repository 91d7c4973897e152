import { describe, expect, it } from 'vitest'
import { startingValues, startingValuesFor } from '../../../shared/prep/starting-values.ts'
import { startFrom } from '../../../src/features/bench/model/start.ts'

const row = (detail: string) => startingValues.find((each) => each.detail === detail)!

describe('starting from a joint form', () => {
  it('gives each plate half of a V’s groove angle, and the twin as its mate', () => {
    const start = startFrom(row('1.5'), 20)!
    expect(start.facets).toEqual([
      { depth: 17, tilt: 30 },
      { depth: 20, tilt: 0 },
    ])
    expect(start.joint).toMatchObject({ mate: 'same', rootOpening: 2.5 })
  })

  it('gives the whole groove angle of a bevel to the one plate that has it', () => {
    const start = startFrom(row('TC-U4a'), 20)!
    expect(start.facets).toEqual([{ depth: 20, tilt: 45 }])
    expect(start.joint).toMatchObject({ mate: 'square', rootOpening: 6.35 })
  })

  it('splits a double form about the middle and opens it to both faces', () => {
    const start = startFrom(row('2.4'), 24)!
    expect(start.facets).toEqual([
      { depth: 10, tilt: 25 },
      { depth: 14, tilt: 0 },
      { depth: 24, tilt: -25 },
    ])
  })

  it('brings tolerances only where all three bands are known', () => {
    expect(startFrom(row('TC-U5a'), 20)!.joint.tolerance?.angle).toEqual({ plus: 10, minus: 5 })
    expect(startFrom(row('B-U2'), 20)!.joint.tolerance).toBeUndefined()
  })

  it('ends every wall at the plate’s thickness', () => {
    for (const thickness of [6, 12, 25, 60]) {
      for (const each of startingValuesFor(thickness)) {
        const start = startFrom(each, thickness)
        if (start !== null) expect(start.facets.at(-1)!.depth).toBe(thickness)
      }
    }
  })

  it('leaves out what does not fit a thin plate', () => {
    expect(startFrom(row('2.4'), 3)).toBeNull()
  })
})
