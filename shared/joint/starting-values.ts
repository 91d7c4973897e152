import type { Band } from './judge.ts'

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

export interface FitUpBands {
  readonly angle: Band
  readonly rootOpening: Band
  /** Null: not limited. */
  readonly rootFace: Band | null
}

export interface StartingValue {
  /** Number or designation of the detail. */
  readonly detail: string
  readonly standard: 'ISO 9692-1' | 'AWS D1.1'
  readonly form: string
  readonly thickness: Range | null
  /** `groove`: total of both plates; `bevel`: one side. They differ by a factor of two. */
  readonly angleOf: 'groove' | 'bevel'
  readonly angle: Range
  readonly rootOpening: Range
  readonly rootFace: Range
  readonly asFitUp: FitUpBands | null
  /** `seen`: read in a copy of the source; `memory`: remembered and not read again. */
  readonly known: 'seen' | 'memory'
  readonly source: string
}

const ISO = 'ISO 9692-1:2013, from memory'
const isoRow = (
  detail: string,
  form: string,
  thickness: Range,
  angleOf: 'groove' | 'bevel',
  angle: Range,
  rootOpening: Range,
  rootFace: Range,
): StartingValue => ({
  detail,
  standard: 'ISO 9692-1',
  form,
  thickness,
  angleOf,
  angle,
  rootOpening,
  rootFace,
  asFitUp: null,
  known: 'memory',
  source: ISO,
})
const range = (from: number, to: number | null): Range => ({ from, to })

const inch = (value: number): number => value * 25.4
/** α +10 −5, R +1/16 −1/8 in, f not limited. */
const GENERAL_FIT_UP: FitUpBands = {
  angle: { plus: 10, minus: 5 },
  rootOpening: { plus: inch(1 / 16), minus: inch(1 / 8) },
  rootFace: null,
}
const BACKING_FIT_UP: FitUpBands = {
  angle: { plus: 10, minus: 5 },
  rootOpening: { plus: inch(1 / 4), minus: inch(1 / 16) },
  rootFace: null,
}
const SPACER_FIT_UP: FitUpBands = {
  angle: { plus: 10, minus: 5 },
  rootOpening: { plus: inch(1 / 4), minus: 0 },
  rootFace: { plus: inch(1 / 16), minus: inch(1 / 16) },
}

const awsRow = (
  detail: string,
  form: string,
  values: {
    angle: number
    rootOpening: Range
    rootFace: Range
    fitUp: FitUpBands | null
    known: 'seen' | 'memory'
    source: string
  },
): StartingValue => ({
  detail,
  standard: 'AWS D1.1',
  form,
  thickness: null,
  angleOf: 'groove',
  angle: range(values.angle, values.angle),
  rootOpening: values.rootOpening,
  rootFace: values.rootFace,
  asFitUp: values.fitUp,
  known: values.known,
  source: values.source,
})
const metric = (fitUp: { rootPlus: number; rootMinus: number; face: Band | null }): FitUpBands => ({
  angle: { plus: 10, minus: 5 },
  rootOpening: { plus: fitUp.rootPlus, minus: fitUp.rootMinus },
  rootFace: fitUp.face,
})
const P87 = 'AWS D1.1:2020, p. 87'
const EIGHTH = range(0, inch(1 / 8))
const NONE = range(0, 0)

export const startingValues: readonly StartingValue[] = [
  isoRow('1.3', 'single V', range(3, 10), 'groove', range(40, 60), range(0, 4), range(0, 2)),
  isoRow('1.5', 'single V with root face', range(5, 40), 'groove', range(60, 60), range(1, 4), range(2, 4)),
  isoRow('1.9', 'single bevel', range(3, 10), 'bevel', range(35, 60), range(2, 4), range(1, 2)),
  isoRow(
    '2.2',
    'single V, both sides welded',
    range(3, 40),
    'groove',
    range(40, 60),
    range(0, 3),
    range(0, 2),
  ),
  isoRow(
    '2.4',
    'double V with root face',
    range(10, null),
    'groove',
    range(40, 60),
    range(1, 4),
    range(2, 6),
  ),
  isoRow('2.5', 'double V', range(10, null), 'groove', range(40, 60), range(1, 3), range(0, 2)),
  isoRow(
    '2.8',
    'single bevel, both sides welded',
    range(3, 30),
    'bevel',
    range(35, 60),
    range(1, 4),
    range(0, 2),
  ),
  isoRow('2.9', 'double bevel', range(10, null), 'bevel', range(35, 60), range(1, 4), range(0, 2)),

  awsRow('B-U4b', 'single bevel', {
    angle: 45,
    rootOpening: EIGHTH,
    rootFace: EIGHTH,
    fitUp: GENERAL_FIT_UP,
    known: 'seen',
    source: P87,
  }),
  ...[
    { opening: 1 / 4, angle: 45 },
    { opening: 3 / 8, angle: 30 },
  ].flatMap(({ opening, angle }) => [
    awsRow('TC-U4a', 'single bevel with backing', {
      angle,
      rootOpening: range(inch(opening), inch(opening)),
      rootFace: NONE,
      fitUp: BACKING_FIT_UP,
      known: 'seen',
      source: P87,
    }),
    awsRow('TC-U5a', 'double bevel with spacer', {
      angle,
      rootOpening: range(inch(opening), inch(opening)),
      rootFace: EIGHTH,
      fitUp: SPACER_FIT_UP,
      known: 'seen',
      source: 'AWS D1.1:2020, p. 88',
    }),
  ]),
  ...[
    { opening: 6, angle: 45 },
    { opening: 10, angle: 30 },
    { opening: 12, angle: 20 },
  ].map(({ opening, angle }) =>
    awsRow('C-U2a', 'single V with backing', {
      angle,
      rootOpening: range(opening, opening),
      rootFace: NONE,
      fitUp: metric({ rootPlus: 6, rootMinus: 2, face: null }),
      known: 'seen',
      source: 'AWS D1.1, metric form',
    }),
  ),
  awsRow('BTC-P4', 'single bevel, partial penetration', {
    angle: 45,
    rootOpening: NONE,
    rootFace: range(3, null),
    fitUp: metric({ rootPlus: 3, rootMinus: 2, face: { plus: 2, minus: 2 } }),
    known: 'seen',
    source: 'AWS D1.1:2020, p. 114, metric form',
  }),
  awsRow('B-U2', 'single V', {
    angle: 60,
    rootOpening: EIGHTH,
    rootFace: EIGHTH,
    fitUp: GENERAL_FIT_UP,
    known: 'memory',
    source: 'AWS D1.1, from memory',
  }),
  awsRow('B-U3b', 'double V', {
    angle: 60,
    rootOpening: EIGHTH,
    rootFace: EIGHTH,
    fitUp: GENERAL_FIT_UP,
    known: 'memory',
    source: 'AWS D1.1, from memory',
  }),
]

/** Rows whose thickness range holds this plate (rows without a range always do). */
export function startingValuesFor(thickness: number): readonly StartingValue[] {
  return startingValues.filter(
    ({ thickness: range }) =>
      range === null || (thickness >= range.from && (range.to === null || thickness <= range.to)),
  )
}
