import { describe, expect, it } from 'vitest'
import { describeSection } from '../../../src/section/describe.ts'
import { dimensionsOf } from '../../../src/section/dimensions.ts'
import { bandText } from '../../../src/section/tolerances.ts'
import { hardPreps } from './preps.ts'

const texts = (...args: Parameters<typeof dimensionsOf>) =>
  Object.fromEntries(dimensionsOf(...args).map(({ id, text }) => [id, text]))

describe('dimensions of one plate', () => {
  it('says a bevel with a root face as a drawing does', () => {
    // Bottom offset: 19 mm × tan 30° = 10.97 mm (tan 30° = 0.57735, any table).
    expect(texts(hardPreps['bevel with root face']!)).toEqual({
      'angle-0': '30°',
      'facet-depth-0': '19 mm',
      'facet-depth-1': '6 mm',
      thickness: '25 mm',
      'bottom-offset': '10.97 mm',
    })
  })

  it('writes inches when asked, and only the writing changes', () => {
    const inch = dimensionsOf(hardPreps['bevel with root face']!, { unit: 'in' })
    expect(inch.find(({ id }) => id === 'facet-depth-1')).toMatchObject({ text: '0.2362 in', value: 6 })
  })

  it('names root faces and signs what undercuts', () => {
    const found = dimensionsOf(hardPreps['root face at the top']!)
    expect(found.filter(({ kind }) => kind === 'facet-depth').map(({ caption }) => caption)).toEqual([
      'root face',
      'depth of bevel',
    ])
    // 15 mm × tan 35° = 10.50 mm, inward.
    expect(found.find(({ id }) => id === 'bottom-offset')!.text).toBe('−10.5 mm')
  })

  it('lists the angle of a square facet beside others only when asked', () => {
    const spec = hardPreps['bevel with root face']!
    expect(texts(spec)).not.toHaveProperty('angle-1')
    expect(texts(spec, { squareAngles: true })).toMatchObject({ 'angle-1': '0°' })
  })
})

describe('dimensions of a joint', () => {
  it('gives the groove angle of both plates', () => {
    const spec = hardPreps['bevel with root face']!
    const same = texts({ ...spec, joint: { mate: 'same', rootOpening: 2 } })
    expect(same).toMatchObject({ 'included-angle-top': '60°', 'root-opening': '2 mm' })
    expect(texts({ ...spec, joint: { mate: 'square', rootOpening: 2 } })).toMatchObject({
      'included-angle-top': '30°',
    })
  })

  it('gives both grooves of a double bevel', () => {
    const spec = hardPreps['double bevel, tiny root face']!
    expect(texts({ ...spec, joint: { mate: 'same', rootOpening: 0 } })).toMatchObject({
      'included-angle-top': '90°',
      'included-angle-bottom': '90°',
      'facet-depth-1': '0.2 mm',
    })
  })

  it('puts every number into the text alternative', () => {
    const spec = { ...hardPreps['bevel with root face']!, joint: { mate: 'same', rootOpening: 2 } as const }
    const dimensions = dimensionsOf(spec, { tolerances: { rootOpening: '+1.6 −3.2 mm' } })
    const words = describeSection(spec, dimensions)
    for (const { text } of dimensions) expect(words).toContain(text)
    expect(words).toContain('Root opening 2 mm, tolerance +1.6 −3.2 mm.')
  })
})

describe('tolerance texts', () => {
  const format = (value: number, bare: boolean) => `${value}${bare ? '' : ' mm'}`
  it('joins equal sides and separates unlike ones', () => {
    expect(bandText({ plus: 1.6, minus: 1.6 }, format)).toBe('±1.6 mm')
    expect(bandText({ plus: 1.6, minus: 3.2 }, format)).toBe('+1.6 −3.2 mm')
  })
})
