import type { Band } from '../units/band.ts'

/**
 * Starting values for joint preparations, to choose a prep from. They are quoted from the named editions as
 * well as we know them and are no substitute for the standard; every screen and sheet that shows one shows
 * `CHECK_EDITION` beside it. mm and degrees.
 */

export const CHECK_EDITION =
  'Starting value only. Check it against the edition in force, the drawing and the welding procedure.'

export interface Range {
  readonly from: number
  readonly to: number | null
}

/** Bands about the joint's own figures. Null: the row limits it not, or does not say. */
export interface JointBands {
  readonly angle: Band | null
  readonly rootOpening: Band | null
  readonly rootFace: Band | null
}

/** The form of prep that a row asks for; `prepFromStartingValue` turns it into one. */
export type RowForm = 'single-bevel' | 'double-bevel' | 'single-v' | 'double-v'

export interface StartingValue {
  /** Number or designation of the detail. */
  readonly detail: string
  readonly standard: 'ISO 9692-1' | 'AWS D1.1'
  readonly prep: RowForm
  /** As people read it. */
  readonly form: string
  readonly thickness: Range | null
  /** `groove`: total of both plates; `bevel`: one side. They differ by a factor of two. */
  readonly angleOf: 'groove' | 'bevel'
  readonly angle: Range
  readonly rootOpening: Range
  readonly rootFace: Range
  /** What the detail drawing may choose away from the row; null where the source gives none. */
  readonly asDetailed: JointBands | null
  /** What the fitted joint may be away from the detail; null where the source gives none. */
  readonly asFitUp: JointBands | null
  /** `seen`: read in a copy of the source; `memory`: remembered and not read again. */
  readonly known: 'seen' | 'memory'
  readonly source: string
}

const range = (from: number, to: number | null): Range => ({ from, to })
const exactly = (value: number): Range => range(value, value)
const inch = (value: number): number => value * 25.4
const band = (plus: number, minus: number): Band => ({ plus, minus })
const bands = (angle: Band, rootOpening: Band, rootFace: Band | null): JointBands => ({
  angle,
  rootOpening,
  rootFace,
})

type IsoFigures = Pick<StartingValue, 'thickness' | 'angle' | 'rootOpening' | 'rootFace'>

/** A V's angle α is that of the groove, a bevel's β that of one side. Gaps are those after tacking. */
function iso(detail: string, prep: RowForm, form: string, figures: IsoFigures): StartingValue {
  return {
    detail,
    standard: 'ISO 9692-1',
    prep,
    form,
    angleOf: prep.endsWith('v') ? 'groove' : 'bevel',
    ...figures,
    asDetailed: null,
    asFitUp: null,
    known: 'memory',
    source: 'ISO 9692-1:2013, from memory',
  }
}

type AwsFigures = Omit<StartingValue, 'detail' | 'standard' | 'prep' | 'form' | 'thickness' | 'angleOf'>

/** AWS tells every angle as that of the groove; a bevel opposite a square edge has all of it. */
function aws(detail: string, prep: RowForm, form: string, figures: AwsFigures): StartingValue {
  return { detail, standard: 'AWS D1.1', prep, form, thickness: null, angleOf: 'groove', ...figures }
}

/** Every AWS row: α +10 −0 as detailed, +10 −5 as fit up. */
const ANGLE_DETAILED = band(10, 0)
const ANGLE_FIT_UP = band(10, 5)
const SIXTEENTH = inch(1 / 16)
const EIGHTH = inch(1 / 8)
const QUARTER = inch(1 / 4)

/** R, f +1/16 −0; fit up R +1/16 −1/8, f not limited. */
const GENERAL = {
  asDetailed: bands(ANGLE_DETAILED, band(SIXTEENTH, 0), band(SIXTEENTH, 0)),
  asFitUp: bands(ANGLE_FIT_UP, band(SIXTEENTH, EIGHTH), null),
}
/** R +1/16 −0; fit up R +1/4 −1/16; no root face. */
const BACKING = {
  asDetailed: bands(ANGLE_DETAILED, band(SIXTEENTH, 0), null),
  asFitUp: bands(ANGLE_FIT_UP, band(QUARTER, SIXTEENTH), null),
}
/** R ±0, f +1/16 −0; fit up R +1/4 −0, f ±1/16. */
const SPACER = {
  asDetailed: bands(ANGLE_DETAILED, band(0, 0), band(SIXTEENTH, 0)),
  asFitUp: bands(ANGLE_FIT_UP, band(QUARTER, 0), band(SIXTEENTH, SIXTEENTH)),
}
/** mm: R +2 −0; fit up R +6 −2. */
const BACKING_METRIC = {
  asDetailed: bands(ANGLE_DETAILED, band(2, 0), null),
  asFitUp: bands(ANGLE_FIT_UP, band(6, 2), null),
}
/** mm: R +2 −0; fit up R +3 −2, f ±2. */
const PARTIAL_METRIC = {
  asDetailed: bands(ANGLE_DETAILED, band(2, 0), null),
  asFitUp: bands(ANGLE_FIT_UP, band(3, 2), band(2, 2)),
}

const P87 = { known: 'seen', source: 'AWS D1.1:2020, p. 87' } as const
const P88 = { known: 'seen', source: 'AWS D1.1:2020, p. 88' } as const
const P114 = { known: 'seen', source: 'AWS D1.1:2020, p. 114, metric form' } as const
const METRIC = { known: 'seen', source: 'AWS D1.1, metric form' } as const
const MEMORY = { known: 'memory', source: 'AWS D1.1, from memory' } as const

/** `R, f 0–1/8`: the openings and root faces of the open-root rows. */
const OPEN_ROOT = { rootOpening: range(0, EIGHTH), rootFace: range(0, EIGHTH) }
/** Inches and degrees: a wider gap with a smaller angle. */
const WIDE_ROOTS = [
  [QUARTER, 45],
  [inch(3 / 8), 30],
] as const
const WIDE_ROOTS_METRIC = [
  [6, 45],
  [10, 30],
  [12, 20],
] as const

export const startingValues: readonly StartingValue[] = [
  iso('1.3', 'single-v', 'single V', {
    thickness: range(3, 10),
    angle: range(40, 60),
    rootOpening: range(0, 4),
    rootFace: range(0, 2),
  }),
  iso('1.5', 'single-v', 'single V with root face', {
    thickness: range(5, 40),
    angle: exactly(60),
    rootOpening: range(1, 4),
    rootFace: range(2, 4),
  }),
  iso('1.9', 'single-bevel', 'single bevel', {
    thickness: range(3, 10),
    angle: range(35, 60),
    rootOpening: range(2, 4),
    rootFace: range(1, 2),
  }),
  iso('2.2', 'single-v', 'single V, both sides welded', {
    thickness: range(3, 40),
    angle: range(40, 60),
    rootOpening: range(0, 3),
    rootFace: range(0, 2),
  }),
  iso('2.4', 'double-v', 'double V with root face', {
    thickness: range(10, null),
    angle: range(40, 60),
    rootOpening: range(1, 4),
    rootFace: range(2, 6),
  }),
  iso('2.5', 'double-v', 'double V', {
    thickness: range(10, null),
    angle: range(40, 60),
    rootOpening: range(1, 3),
    rootFace: range(0, 2),
  }),
  iso('2.8', 'single-bevel', 'single bevel, both sides welded', {
    thickness: range(3, 30),
    angle: range(35, 60),
    rootOpening: range(1, 4),
    rootFace: range(0, 2),
  }),
  iso('2.9', 'double-bevel', 'double bevel', {
    thickness: range(10, null),
    angle: range(35, 60),
    rootOpening: range(1, 4),
    rootFace: range(0, 2),
  }),

  aws('B-U4b', 'single-bevel', 'single bevel', { angle: exactly(45), ...OPEN_ROOT, ...GENERAL, ...P87 }),
  ...WIDE_ROOTS.flatMap(([opening, angle]) => [
    aws('TC-U4a', 'single-bevel', 'single bevel with backing', {
      angle: exactly(angle),
      rootOpening: exactly(opening),
      rootFace: exactly(0),
      ...BACKING,
      ...P87,
    }),
    aws('TC-U5a', 'double-bevel', 'double bevel with spacer', {
      angle: exactly(angle),
      rootOpening: exactly(opening),
      rootFace: range(0, EIGHTH),
      ...SPACER,
      ...P88,
    }),
  ]),
  ...WIDE_ROOTS_METRIC.map(([opening, angle]) =>
    aws('C-U2a', 'single-v', 'single V with backing', {
      angle: exactly(angle),
      rootOpening: exactly(opening),
      rootFace: exactly(0),
      ...BACKING_METRIC,
      ...METRIC,
    }),
  ),
  aws('BTC-P4', 'single-bevel', 'single bevel, partial penetration', {
    angle: exactly(45),
    rootOpening: exactly(0),
    rootFace: range(3, null),
    ...PARTIAL_METRIC,
    ...P114,
  }),
  aws('B-U2', 'single-v', 'single V', { angle: exactly(60), ...OPEN_ROOT, ...GENERAL, ...MEMORY }),
  aws('B-U3b', 'double-v', 'double V', { angle: exactly(60), ...OPEN_ROOT, ...GENERAL, ...MEMORY }),
]

/** Whether the row's thickness range holds this plate, mm; rows without a range hold every plate. */
export function holdsThickness({ thickness: own }: StartingValue, thickness: number): boolean {
  return own === null || (thickness >= own.from && (own.to === null || thickness <= own.to))
}

/** Rows for a plate of this thickness. */
export function startingValuesFor(thickness: number): readonly StartingValue[] {
  return startingValues.filter((row) => holdsThickness(row, thickness))
}
