import { waterFlow, FEED_POWER, FINEST, PRESSURE_RANGE, ROUGHEST, feedFor, type FeedRefusal } from './feed.ts'
import { THICKEST_METAL, THICKEST_OTHER, workMaterials } from './materials.ts'
import type { ProcessSpec } from './spec.ts'

/**
 * What shops say, every figure of it *common practice, no source*, held against what the models here say. Where they
 * differ both are shown, with the difference; no constant is tuned to hide one.
 */

export const practiceCodes = [
  'kerf',
  'taper',
  'standoff',
  'tilt-limit',
  'pressure',
  'water',
  'thickness',
  'rough-to-fine',
  'aluminium-102-rough',
  'aluminium-102-fine',
] as const
export type PracticeCode = (typeof practiceCodes)[number]

export interface PracticeRange {
  readonly from: number
  readonly to: number
}

/** mm, degrees, MPa, l/min, mm/min; ratios bare. */
export const practiceRanges = {
  /** Abrasive jets; the usual is 1.0 to 1.3, fine ones go down to about 0.5. */
  kerf: { from: 0.5, to: 1.3 },
  /** Either way: under a degree on most cuts. */
  taper: { from: -1, to: 1 },
  standoff: { from: 3.2, to: 3.2 },
  'tilt-limit': { from: 55, to: 90 },
  pressure: PRESSURE_RANGE,
  water: { from: 1.9, to: 3.8 },
  thickness: { from: 0, to: THICKEST_METAL },
  /** Feed of quality 1 over that of quality 5: up to 3 in thin plate, up to 6 in thick. */
  'rough-to-fine': { from: 3, to: 6 },
  /** Feeds in 102 mm of aluminium; the jet that made them is not known. */
  'aluminium-102-rough': { from: 106.7, to: 106.7 },
  'aluminium-102-fine': { from: 18.3, to: 18.3 },
} as const satisfies Record<PracticeCode, PracticeRange>

/** Said of machines, with nothing here to hold against it: how exactly they place, and how exactly again, mm. */
export const MACHINE_ACCURACY = 0.13
export const MACHINE_REPEATABILITY = 0.025

/** The kerf of a jet of water alone, mm: as wide as its orifice, more or less. */
export const WATER_ONLY_KERF = { from: 0.08, to: 0.33 } as const

export interface PracticeNote {
  readonly code: PracticeCode
  readonly model: number
  readonly practice: PracticeRange
  /** Model less the nearer end of practice; 0 within. */
  readonly difference: number
  readonly source: 'common practice, no source'
}

export function practiceNote(
  code: PracticeCode,
  model: number,
  practice: PracticeRange = practiceRanges[code],
): PracticeNote {
  const { from, to } = practice
  const difference = model < from ? model - from : model > to ? model - to : 0
  return { code, model, practice, difference, source: 'common practice, no source' }
}

/** What there is to hold against practice; what is left out is passed over. mm and degrees. */
export interface PracticeSetup {
  readonly thickness: number
  readonly kerf?: number | undefined
  readonly taperDegrees?: number | undefined
  readonly standoff?: number | undefined
  readonly tiltLimitDegrees?: number | undefined
}

/** Every figure of a set-up beside practice's, also where they agree; a refused feed leaves its rows out. */
export function practiceNotes(spec: ProcessSpec, setup: PracticeSetup): PracticeNote[] {
  const { pressure, orifice } = spec.make
  const notes: PracticeNote[] = []
  const add = (code: PracticeCode, model: number | undefined | FeedRefusal, practice?: PracticeRange) => {
    if (typeof model === 'number') notes.push(practiceNote(code, model, practice))
  }
  add('kerf', setup.kerf)
  add('taper', setup.taperDegrees)
  add('standoff', setup.standoff)
  add('tilt-limit', setup.tiltLimitDegrees)
  add('pressure', pressure)
  add('water', spec.water ?? waterFlow(pressure, orifice))
  add('thickness', setup.thickness, {
    from: 0,
    to: spec.material.metal ? THICKEST_METAL : THICKEST_OTHER,
  })
  add('rough-to-fine', ROUGH_TO_FINE)
  return notes
}

/** The feed equation's own ratio, the same in every thickness. */
export const ROUGH_TO_FINE = (FINEST / ROUGHEST) ** FEED_POWER

/** Thickness at which practice tells feeds of aluminium, mm (4 in). */
export const ALUMINIUM_TOLD_AT = 102

/** Practice's two feeds in aluminium beside the equation's for a jet; empty where it refuses. */
export function aluminiumNotes({ make, abrasive }: Pick<ProcessSpec, 'make' | 'abrasive'>): PracticeNote[] {
  const { machinability } = workMaterials.aluminium
  const at = (quality: number) => feedFor(machinability, make, quality, ALUMINIUM_TOLD_AT, abrasive.factor)
  const [rough, fine] = [at(ROUGHEST), at(FINEST)]
  if (typeof rough !== 'number' || typeof fine !== 'number') return []
  return [practiceNote('aluminium-102-rough', rough), practiceNote('aluminium-102-fine', fine)]
}
