import { describe, expect, it } from 'vitest'
import { jointProblems } from '../../../shared/joint/check.ts'
import { jointForm } from '../../../shared/joint/form.ts'
import { jointSection, type Mate } from '../../../shared/joint/section.ts'
import { judgeJoint, jointRanges } from '../../../shared/joint/tolerance.ts'
import { capArea, weldMetal } from '../../../shared/joint/weld-metal.ts'
import { startingValues } from '../../../shared/prep/starting-values.ts'
import { DEGREE, seeded } from '../../support/plates.ts'

const bevel = (tilt: number, rootFace: number) => [
  { depth: 20 - rootFace, tilt },
  { depth: 20, tilt: 0 },
]

describe('a mate with its own prep', () => {
  it('adds both bevels to the groove angle and both hollows to the area', () => {
    const section = jointSection({
      facets: bevel(40, 2),
      thickness: 20,
      mate: bevel(10, 5),
      rootOpening: 3,
    })
    expect(section).toMatchObject({ grooveAngleTop: 50, grooveAngleBottom: 0, narrowest: 3, widthBottom: 3 })
    const hollow = (depth: number, tilt: number) => (depth * depth * Math.tan(tilt * DEGREE)) / 2
    expect(section.area).toBeCloseTo(3 * 20 + hollow(18, 40) + hollow(15, 10), 9)
    expect(section.widthTop).toBeCloseTo(3 + 18 * Math.tan(40 * DEGREE) + 15 * Math.tan(10 * DEGREE), 9)
  })

  it('tells the least width where the outermost lines lie at two depths', () => {
    // A slanted joint: both walls run alongside each other.
    const section = jointSection({
      facets: [{ depth: 20, tilt: 30 }],
      thickness: 20,
      mate: [{ depth: 20, tilt: -30 }],
      rootOpening: 0,
    })
    expect(section.narrowest).toBeCloseTo(20 * Math.tan(30 * DEGREE), 9)
    expect(section.grooveAngleTop).toBe(0)
  })

  it.each<[number, number, Mate, string]>([
    [30, 2, bevel(20, 4), 'single V with root face'],
    [0, 0, bevel(20, 4), 'single bevel with root face'],
    [30, 0, [{ depth: 20, tilt: 0 }], 'single bevel with root face'],
    [30, 2, [{ depth: 20, tilt: -20 }], 'single bevel with root face opposite single bevel'],
  ])('%d° with %d mm opposite %j is a %s', (tilt, rootFace, mate, name) => {
    expect(jointForm(bevel(tilt, rootFace), mate)).toBe(name)
  })

  it('has a sound section for random plates', () => {
    const random = seeded(9)
    const wall = () => [6, 11, 20].map((depth, i) => ({ depth, tilt: 40 - 30 * i + 25 * (random() - 0.5) }))
    for (let n = 0; n < 200; n++) {
      const mate = n % 3 === 0 ? 'same' : n % 3 === 1 ? 'square' : wall()
      const section = jointSection({ facets: wall(), thickness: 20, mate, rootOpening: 4 * random() })
      expect(jointProblems(section)).toEqual([])
      expect(jointProblems({ ...section, area: section.area * 1.001 })).toEqual(['area'])
    }
  })
})

describe('weld metal with caps and efficiency', () => {
  const section = jointSection({ facets: bevel(30, 2), thickness: 20, mate: 'same', rootOpening: 2 })

  it('is the bare groove when nothing is set', () => {
    expect(weldMetal(section)).toMatchObject({
      capArea: 0,
      deposited: section.area * 7850e-6,
      filler: section.area * 7850e-6,
    })
  })

  it('adds a cap over each face and divides by the efficiency', () => {
    const made = weldMetal(section, {
      capTop: 2,
      capBottom: 1,
      capOverlap: 1.5,
      efficiency: 0.9,
      density: 8000,
    })
    const caps = capArea(section.widthTop + 3, 2) + capArea(5, 1)
    expect(made).toMatchObject({
      capArea: expect.closeTo(caps, 9),
      deposited: expect.closeTo((section.area + caps) * 8e-3, 9),
      filler: expect.closeTo(((section.area + caps) * 8e-3) / 0.9, 9),
    })
  })

  it.each([
    [{ efficiency: 0 }, 'efficiency'],
    [{ efficiency: 1.1 }, 'efficiency'],
    [{ density: 0 }, 'density'],
    [{ capBottom: 2 }, 'cap'],
    [{ capTop: -1 }, 'cap'],
    [{ capTop: Number.NaN }, 'cap'],
  ])('refuses %j', (fill, code) => {
    expect(weldMetal(section, fill)).toMatchObject({ kind: 'error', code })
  })

  it('has the area of a circular segment', () => {
    expect(capArea(10, 5)).toBeCloseTo((Math.PI * 25) / 2, 9)
    // By strips, which share no formula with it.
    for (const [width, height] of [
      [12, 2],
      [12, 0.013],
      [12, 0.011],
    ] as const) {
      const radius = (width * width) / (8 * height) + height / 2
      let area = 0
      const strips = 20_000
      for (let i = 0; i < strips; i++) {
        const x = ((i + 0.5) / strips - 0.5) * width
        area += ((radius * radius - x * x) ** 0.5 - (radius - height)) * (width / strips)
      }
      expect(capArea(width, height) / area).toBeCloseTo(1, 5)
    }
  })
})

describe('bands as detailed and as fit up', () => {
  const row = startingValues.find(({ detail }) => detail === 'B-U4b')!
  const nominal = { angle: 45, rootOpening: 2, rootFace: 1 }

  it('says the ranges of both', () => {
    expect(jointRanges(nominal, row.asDetailed!)).toEqual({
      angle: { from: 45, to: 55 },
      rootOpening: { from: 2, to: 3.5875 },
      rootFace: { from: 1, to: 2.5875 },
    })
    expect(jointRanges(nominal, row.asFitUp!)).toEqual({
      angle: { from: 40, to: 55 },
      rootOpening: { from: 0, to: 3.5875 },
      rootFace: null,
    })
  })

  it('judges a measured joint figure by figure', () => {
    const judged = judgeJoint({ angle: 39, rootOpening: 3.6, rootFace: 9 }, nominal, row.asFitUp!)
    expect(judged).toMatchObject({
      angle: { verdict: 'under', by: 1 },
      rootOpening: { verdict: 'over', by: expect.closeTo(0.0125, 9) },
      rootFace: null,
    })
  })
})
