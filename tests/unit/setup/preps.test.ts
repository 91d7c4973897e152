import { describe, expect, it } from 'vitest'
import { describeWall } from '../../../shared/setup/describe.ts'
import { applyPrep, applyTilt, prepFacets, wallsForThickness, type Prep } from '../../../shared/prep/preps.ts'

function facetsOf(prep: Prep, thickness = 20) {
  const made = prepFacets(prep, thickness)
  if (made.kind !== 'facets') throw new Error(made.message)
  return made.facets
}

describe('preps as facets', () => {
  it.each<[Prep, { depth: number; tilt: number }[], string]>([
    [{ form: 'square' }, [], 'square'],
    [{ form: 'tilt', tilt: 30 }, [{ depth: 20, tilt: 30 }], '+30°'],
    [{ form: 'tilt', tilt: -12.5 }, [{ depth: 20, tilt: -12.5 }], '−12.5°'],
    [{ form: 'tilt', tilt: 0 }, [], 'square'],
    [
      { form: 'single-bevel', angle: 30, rootFace: 3, opensTo: 'top' },
      [
        { depth: 17, tilt: 30 },
        { depth: 20, tilt: 0 },
      ],
      '+30° with 3 mm root face',
    ],
    [
      { form: 'single-bevel', angle: 45, rootFace: 4, opensTo: 'bottom' },
      [
        { depth: 4, tilt: 0 },
        { depth: 20, tilt: -45 },
      ],
      '−45° with 4 mm root face at the top',
    ],
    [
      { form: 'single-v', grooveAngle: 60, rootFace: 2, opensTo: 'top' },
      [
        { depth: 18, tilt: 30 },
        { depth: 20, tilt: 0 },
      ],
      '+30° with 2 mm root face',
    ],
    [
      { form: 'double-bevel', topAngle: 45, bottomAngle: 30, topDepth: 10, rootFace: 2 },
      [
        { depth: 10, tilt: 45 },
        { depth: 12, tilt: 0 },
        { depth: 20, tilt: -30 },
      ],
      '+45° over 10 mm, −30° over 8 mm with 2 mm root face',
    ],
    [
      { form: 'double-v', topGrooveAngle: 60, bottomGrooveAngle: 50, topDepth: 11, rootFace: 0 },
      [
        { depth: 11, tilt: 30 },
        { depth: 20, tilt: -25 },
      ],
      '+30° over 11 mm, −25° over 9 mm',
    ],
  ])('%j', (prep, expected, words) => {
    expect(facetsOf(prep)).toEqual(expected)
    expect(describeWall(expected)).toBe(words)
  })

  it.each<[Prep, string]>([
    [{ form: 'tilt', tilt: 90 }, 'angle-out-of-range'],
    [{ form: 'tilt', tilt: Number.NaN }, 'angle-out-of-range'],
    [{ form: 'single-bevel', angle: 0, rootFace: 0, opensTo: 'top' }, 'angle-out-of-range'],
    [{ form: 'single-bevel', angle: 30, rootFace: 20, opensTo: 'top' }, 'root-face-too-deep'],
    [{ form: 'single-bevel', angle: 30, rootFace: -1, opensTo: 'top' }, 'root-face-too-deep'],
    [{ form: 'single-v', grooveAngle: 180, rootFace: 0, opensTo: 'top' }, 'angle-out-of-range'],
    [
      { form: 'double-bevel', topAngle: 45, bottomAngle: 45, topDepth: 10, rootFace: 10 },
      'root-face-too-deep',
    ],
    [{ form: 'double-bevel', topAngle: 45, bottomAngle: -5, topDepth: 5, rootFace: 2 }, 'angle-out-of-range'],
  ])('refuses %j as %s', (prep, code) => {
    expect(prepFacets(prep, 20)).toMatchObject({ kind: 'error', code })
  })

  it('says lengths in the unit shown', () => {
    expect(
      describeWall(facetsOf({ form: 'single-bevel', angle: 30, rootFace: 3.175, opensTo: 'top' }), 'in'),
    ).toBe('+30° with 0.125 in root face')
  })
})

describe('one prep on many edges', () => {
  const wall = (loop: number, edge: number, tilt: number) => ({ loop, edge, facets: [{ depth: 20, tilt }] })
  const walls = [wall(0, 1, 10), wall(0, 3, 20), wall(1, 0, 30)]

  it('replaces, adds and keeps, in order of loop and edge, and leaves the old list alone', () => {
    const before = structuredClone(walls)
    const edges = [
      { loop: 1, edge: 1 },
      { loop: 0, edge: 3 },
      { loop: 0, edge: 0 },
    ]
    expect(applyPrep(walls, edges, [{ depth: 20, tilt: 45 }])).toEqual([
      wall(0, 0, 45),
      wall(0, 1, 10),
      wall(0, 3, 45),
      wall(1, 0, 30),
      wall(1, 1, 45),
    ])
    expect(walls).toEqual(before)
  })

  it('makes edges square by leaving them out', () => {
    expect(applyPrep(walls, [{ loop: 0, edge: 3 }], [])).toEqual([wall(0, 1, 10), wall(1, 0, 30)])
  })

  it('sets one facet, of named and of square edges', () => {
    const set = {
      edges: [
        { loop: 0, edge: 1 },
        { loop: 0, edge: 2 },
      ],
      facet: 0,
      tilt: 5,
    }
    expect(applyTilt(walls, set, 20)).toEqual([wall(0, 1, 5), wall(0, 2, 5), wall(0, 3, 20), wall(1, 0, 30)])
  })

  it('follows the plate thickness with the last facet, unless an earlier one would not fit', () => {
    const faced = [
      {
        loop: 0,
        edge: 0,
        facets: facetsOf({ form: 'single-bevel', angle: 30, rootFace: 3, opensTo: 'top' }),
      },
    ]
    const specs = faced.map((own) => ({ ...own, facets: [...own.facets] }))
    expect(wallsForThickness(specs, 25)?.[0]?.facets).toEqual([
      { depth: 17, tilt: 30 },
      { depth: 25, tilt: 0 },
    ])
    expect(wallsForThickness(specs, 17)).toBeNull()
  })
})
