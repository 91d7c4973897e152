import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { anglesThreeWays } from '../../../shared/joint/angles.ts'
import { grooveOpensTo, jointForm } from '../../../shared/joint/form.ts'
import { judge } from '../../../shared/joint/judge.ts'
import { jointSection, rootFaceOf, sectionOf } from '../../../shared/joint/section.ts'
import { STEEL_DENSITY, weldMetalPerMetre } from '../../../shared/joint/weld-metal.ts'
import { spread } from '../../support/spread.ts'

const SEED = 20261201
const bevelWithFace = [
  { depth: 17, tilt: 30 },
  { depth: 20, tilt: 0 },
]

describe('section of both plates', () => {
  it('stands the root at 0 and at the gap, and opens the groove upward', () => {
    const section = jointSection({ facets: bevelWithFace, thickness: 20, mate: 'same', rootOpening: 2 })
    const back = 17 * Math.tan(Math.PI / 6)
    expect(section.left[0]).toEqual({ x: expect.closeTo(-back, 9), depth: 0 })
    expect(section.left.slice(1)).toEqual([
      { x: 0, depth: 17 },
      { x: 0, depth: 20 },
    ])
    expect(section.right.map(({ x }) => x)).toEqual([expect.closeTo(2 + back, 9), 2, 2])
    expect(section).toMatchObject({
      rootFace: { length: 3, fromDepth: 17, toDepth: 20 },
      grooveAngleTop: 60,
      grooveAngleBottom: 0,
      widthTop: expect.closeTo(2 + 2 * back, 9),
      widthBottom: 2,
    })
  })

  it('takes the other plate square when it is', () => {
    const section = jointSection({ facets: bevelWithFace, thickness: 20, mate: 'square', rootOpening: 0 })
    expect(section.grooveAngleTop).toBe(30)
    expect(section.right).toEqual([
      { x: 0, depth: 0 },
      { x: 0, depth: 20 },
    ])
  })

  it('opens both ways for a double bevel', () => {
    const facets = [
      { depth: 8, tilt: 30 },
      { depth: 12, tilt: 0 },
      { depth: 20, tilt: -25 },
    ]
    const section = jointSection({ facets, thickness: 20, mate: 'same', rootOpening: 1 })
    expect(section).toMatchObject({ grooveAngleTop: 60, grooveAngleBottom: 50 })
    expect(section.rootFace).toEqual({ length: 4, fromDepth: 8, toDepth: 12 })
  })

  it('leaves a root edge without a root face, at the outermost line', () => {
    expect(rootFaceOf([{ depth: 20, tilt: 30 }], 20)).toEqual({ length: 0, fromDepth: 20, toDepth: 20 })
    expect(rootFaceOf([{ depth: 20, tilt: -30 }], 20)).toEqual({ length: 0, fromDepth: 0, toDepth: 0 })
    expect(rootFaceOf([], 20)).toEqual({ length: 20, fromDepth: 0, toDepth: 20 })
  })

  /** The same area by strips: a second, cruder way that shares no formula with the first. */
  it('has the area that thin strips add up to', () => {
    const facetList = fc
      .tuple(
        fc.array(spread(0.05, 0.95), { maxLength: 2 }),
        fc.array(spread(-60, 60), { minLength: 3, maxLength: 3 }),
        spread(3, 60),
      )
      .map(([cuts, tilts, thickness]) => {
        const ends = [...new Set(cuts)].sort((a, b) => a - b).map((cut) => cut * thickness)
        const falling = [...tilts].sort((a, b) => b - a)
        return {
          thickness,
          facets: [...ends, thickness].map((depth, i) => ({ depth, tilt: falling[i] ?? 0 })),
        }
      })
    fc.assert(
      fc.property(
        facetList,
        fc.constantFrom('same' as const, 'square' as const),
        ({ thickness, facets }, mate) => {
          const section = jointSection({ facets, thickness, mate, rootOpening: 1 })
          const at = (line: readonly { x: number; depth: number }[], depth: number) => {
            const i = line.findIndex((point) => point.depth >= depth)
            const [a, b] = [line[Math.max(0, i - 1)], line[i]]
            if (!a || !b) throw new Error('depth within the plate')
            return a.depth === b.depth ? b.x : a.x + ((depth - a.depth) / (b.depth - a.depth)) * (b.x - a.x)
          }
          const strips = 4_000
          let area = 0
          let least = Infinity
          for (let i = 0; i < strips; i++) {
            const depth = ((i + 0.5) / strips) * thickness
            const width = at(section.right, depth) - at(section.left, depth)
            least = Math.min(least, width)
            area += (width * thickness) / strips
          }
          expect(section.area / area).toBeCloseTo(1, 5)
          expect(least).toBeGreaterThanOrEqual(1 - 1e-9)
          expect(Math.max(...section.left.map(({ x }) => x))).toBeCloseTo(0, 12)
        },
      ),
      { seed: SEED, numRuns: 50 },
    )
  })
})

describe('one wall', () => {
  it('is drawn square when no facets are given', () => {
    expect(sectionOf([], 12)).toEqual([
      { x: 0, depth: 0 },
      { x: 0, depth: 12 },
    ])
  })
})

describe('names of the trade', () => {
  const top = { depth: 10, tilt: 30 }
  const face = (depth: number) => ({ depth, tilt: 0 })
  const under = { depth: 20, tilt: -30 }
  it.each([
    [[], 'same', 'square butt', 'neither'],
    [[face(20)], 'square', 'square butt', 'neither'],
    [[{ depth: 20, tilt: 30 }], 'square', 'single bevel', 'top'],
    [[{ depth: 20, tilt: 30 }], 'same', 'single V', 'top'],
    [[top, face(20)], 'same', 'single V with root face', 'top'],
    [[face(3), under], 'square', 'single bevel with root face', 'bottom'],
    [[top, under], 'square', 'double bevel', 'both'],
    [[top, face(12), under], 'same', 'double V with root face', 'both'],
    [
      [
        { depth: 5, tilt: 45 },
        { depth: 20, tilt: 20 },
      ],
      'same',
      'compound V',
      'top',
    ],
  ] as const)('%j opposite %s is a %s', (facets, mate, name, opens) => {
    expect(jointForm(facets, mate)).toBe(name)
    expect(grooveOpensTo(facets)).toBe(opens)
  })
})

describe('angles three ways', () => {
  it('keeps bevel angle, face angle and groove angle apart', () => {
    expect(anglesThreeWays(30, 30)).toEqual({ fromVertical: 30, fromPlateFace: 60, grooveAngle: 60 })
    expect(anglesThreeWays(-25, 0)).toEqual({ fromVertical: 25, fromPlateFace: 65, grooveAngle: 25 })
  })
})

describe('judging a measurement', () => {
  const band = { plus: 0.1, minus: 0.5 }
  it.each([
    [3.1, 'in', 0],
    [2.5, 'in', 0],
    [3, 'in', 0],
    [3.15, 'over', 0.05],
    [2.4, 'under', 0.1],
  ] as const)('%d against 3 +0.1 −0.5 is %s', (measured, verdict, by) => {
    expect(judge(measured, 3, band)).toMatchObject({ verdict, by: expect.closeTo(by, 9) })
  })
})

describe('weld metal', () => {
  it('takes plain steel unless told otherwise', () => {
    expect(STEEL_DENSITY).toBe(7850)
    expect(weldMetalPerMetre(100)).toBeCloseTo(0.785, 12)
  })
})
