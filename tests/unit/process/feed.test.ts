import { describe, expect, it } from 'vitest'
import { feedFor, qualityOfFeed, waterFlow } from '../../../shared/process/feed.ts'
import { abrasives, cutRefusal, materialNotes, workMaterials } from '../../../shared/process/materials.ts'

const make = { pressure: 345, orifice: 0.33, mixingTube: 1.02, abrasiveRate: 340 }

describe('materials', () => {
  it('refuses what no jet cuts, with the reason', () => {
    const refusals = Object.entries(workMaterials).flatMap(([code, material]) => {
      const refusal = cutRefusal(material, abrasives.garnet)
      return refusal ? [[code, refusal.code]] : []
    })
    expect(refusals).toEqual([
      ['tempered-glass', 'shatters'],
      ['diamond', 'harder-than-abrasive'],
    ])
    const shops = { name: 'Sapphire', machinability: null, mohs: 8.5, density: 3980, metal: false }
    expect(cutRefusal(shops, abrasives.garnet)?.code).toBe('harder-than-abrasive')
    expect(cutRefusal({ ...shops, mohs: 8.4 }, abrasives.garnet)).toBeNull()
    expect(materialNotes({ ...shops, mohs: 8.4 }, abrasives.garnet, 10)).toEqual([
      { code: 'nearly-as-hard-as-abrasive', limit: 7.5 },
    ])
  })

  it('notes thickness past practice without refusing it', () => {
    const codes = (material: keyof typeof workMaterials, t: number) =>
      materialNotes(workMaterials[material], abrasives.garnet, t)
    expect(codes('mild-steel', 150)).toEqual([])
    expect(codes('mild-steel', 151)).toEqual([{ code: 'thicker-than-practice', limit: 150 }])
    expect(codes('granite', 450)).toEqual([])
    expect(codes('granite', 451)).toEqual([{ code: 'thicker-than-practice', limit: 450 }])
  })
})

describe('feed', () => {
  it('is undone by the quality of a feed', () => {
    for (const q of [1, 2.5, 5]) {
      const feed = feedFor(115, make, q, 40) as number
      expect(qualityOfFeed(115, make, feed, 40)).toBeCloseTo(q, 12)
    }
  })

  it('refuses figures out of range, each with its code', () => {
    const code = (answer: ReturnType<typeof feedFor>) => (typeof answer === 'number' ? answer : answer.code)
    expect(code(feedFor(null, make, 3, 10))).toBe('machinability-unknown')
    expect(code(feedFor(213, { ...make, pressure: 209 }, 3, 10))).toBe('pressure-out-of-range')
    expect(code(feedFor(213, { ...make, pressure: NaN }, 3, 10))).toBe('pressure-out-of-range')
    expect(code(feedFor(213, { ...make, orifice: 1.02 }, 3, 10))).toBe('orifice-out-of-range')
    expect(code(feedFor(213, { ...make, abrasiveRate: 0 }, 3, 10))).toBe('abrasive-rate-out-of-range')
    expect(code(feedFor(213, make, 0.99, 10))).toBe('quality-out-of-range')
    expect(code(feedFor(213, make, 5.01, 10))).toBe('quality-out-of-range')
    expect(code(feedFor(213, make, 3, 0))).toBe('path-out-of-range')
  })
})

it('tells the water of an orifice: 0.7·(π/4)·0.33²·√(2·345·10⁶/1000) by hand', () => {
  // 0.08553 mm² at 830.66 m/s is 4.2628 l/min without contraction.
  expect(waterFlow(345, 0.33, 1)).toBeCloseTo(4.2628, 3)
  expect(waterFlow(345, 0.33)).toBeCloseTo(2.984, 3)
})
