import { describe, expect, it } from 'vitest'
import { standoffFor } from '../../shared/jet/nozzle.ts'
import { abrasives, cutRefusal, workMaterials } from '../../shared/process/materials.ts'
import {
  aluminiumNotes,
  practiceCodes,
  practiceNotes,
  practiceRanges,
  ROUGH_TO_FINE,
  type PracticeNote,
} from '../../shared/process/practice.ts'
import type { ProcessSpec } from '../../shared/process/spec.ts'
import { degrees, radians } from '../../shared/units/angle.ts'
import { taperFromCoupon } from '../../shared/jet/taper.ts'

/**
 * Common practice, no source: what shops say, beside what the models say. Differences are recorded, not tuned away: a
 * figure here changes only with a model.
 */

/** The jet that the feed rows are told for; nobody says which jet practice's own figures came from. */
const spec: ProcessSpec = {
  material: workMaterials.aluminium,
  abrasive: abrasives.garnet,
  make: { pressure: 345, orifice: 0.33, mixingTube: 1.02, abrasiveRate: 340 },
  quality: 3,
}

const row = ({ code, model, practice, difference }: PracticeNote) => [
  code,
  Number(model.toFixed(2)),
  [practice.from, practice.to],
  Number(difference.toFixed(2)),
]

describe('common practice beside the models', () => {
  it('records model, practice and difference of every figure', () => {
    // A kerf as wide as the tube, rounded, and a coupon of 0.2 mm over 20 mm.
    const taper = taperFromCoupon({ widthTop: 1.1, widthBottom: 0.9, path: 20 })
    const setup = {
      thickness: 102,
      kerf: 1.02,
      taperDegrees: degrees(taper),
      standoff: standoffFor(7.14, radians(45), 0),
      tiltLimitDegrees: 60,
    }
    const notes = [...practiceNotes(spec, setup), ...aluminiumNotes(spec)]
    expect(notes.map(row)).toEqual([
      ['kerf', 1.02, [0.5, 1.3], 0],
      ['taper', 0.29, [-1, 1], 0],
      // The rim of a tilted nozzle needs more than practice's stand-off for upright cuts.
      ['standoff', 3.57, [3.2, 3.2], 0.37],
      ['tilt-limit', 60, [55, 90], 0],
      ['pressure', 345, [210, 690], 0],
      ['water', 2.98, [1.9, 3.8], 0],
      ['thickness', 102, [0, 150], 0],
      // The equation has one ratio for all thicknesses; practice has 3 in thin plate and 6 in thick.
      ['rough-to-fine', 6.37, [3, 6], 0.37],
      // A fifth and more below practice at both ends of quality.
      ['aluminium-102-rough', 83.26, [106.7, 106.7], -23.44],
      ['aluminium-102-fine', 13.08, [18.3, 18.3], -5.22],
    ])
    expect(new Set(notes.map(({ code }) => code))).toEqual(new Set(practiceCodes))
    expect(notes.every(({ source }) => source === 'common practice, no source')).toBe(true)
  })

  it('has twice practice’s ratio of rough to fine in thin plate', () => {
    const thin = practiceRanges['rough-to-fine'].from
    expect([ROUGH_TO_FINE - thin, ROUGH_TO_FINE / thin].map((n) => n.toFixed(2))).toEqual(['3.37', '2.12'])
    // Practice's own two feeds in thick aluminium agree with its ratio of six.
    const { 'aluminium-102-rough': rough, 'aluminium-102-fine': fine } = practiceRanges
    expect((rough.from / fine.from).toFixed(2)).toBe('5.83')
  })

  it('lets garnet cut all that is softer, and refuses what practice says cannot be cut', () => {
    expect(abrasives.garnet.mohs).toEqual([7.5, 8.5])
    const refused = Object.entries(workMaterials).filter(([, material]) =>
      cutRefusal(material, abrasives.garnet),
    )
    expect(refused.map(([code]) => code)).toEqual(['tempered-glass', 'diamond'])
  })

  it('leaves water by the orifice within practice over its pressures, or says by how much not', () => {
    const water = (pressure: number, orifice: number) => {
      const notes = practiceNotes({ ...spec, make: { ...spec.make, pressure, orifice } }, { thickness: 10 })
      const note = notes.find(({ code }) => code === 'water')!
      return [Number(note.model.toFixed(2)), Number(note.difference.toFixed(2))]
    }
    expect(water(210, 0.33)).toEqual([2.33, 0])
    expect(water(414, 0.36)).toEqual([3.89, 0.09])
    expect(water(690, 0.25)).toEqual([2.42, 0])
    expect(water(690, 0.2)).toEqual([1.55, -0.35])
  })
})
