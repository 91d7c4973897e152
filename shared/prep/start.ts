import type { FacetSpec } from '../walls/schema.ts'
import { prepFacets, type Prep, type PrepErrorCode } from './preps.ts'
import { holdsThickness, type JointBands, type Range, type StartingValue } from './starting-values.ts'

/** What a row of the starting values gives to an edge: its prep, and how the joint should fit. mm and degrees. */
export interface Start {
  readonly kind: 'start'
  readonly prep: Prep
  /** This plate and the one opposite; none is square. */
  readonly facets: readonly FacetSpec[]
  readonly mate: readonly FacetSpec[]
  readonly rootOpening: number
  readonly rootFace: number
  /** Total of both plates. */
  readonly grooveAngle: number
  readonly asDetailed: JointBands | null
  readonly asFitUp: JointBands | null
  readonly row: StartingValue
}

export interface NoStart {
  readonly kind: 'error'
  readonly code: 'thickness-outside-row' | PrepErrorCode
  readonly message: string
}

/**
 * The middle of every range of a row (the least where a range has no end), as a prep that opens to the top or, for
 * double forms, to both faces with equal depths of bevel. Refuses a plate outside the row's thicknesses and one too
 * thin for the row's root face.
 */
export function prepFromStartingValue(row: StartingValue, thickness: number): Start | NoStart {
  if (!holdsThickness(row, thickness)) {
    return {
      kind: 'error',
      code: 'thickness-outside-row',
      message: `${row.standard} ${row.detail} is for plate of ${rangeWords(row.thickness)} mm, not ${thickness} mm. Choose another detail.`,
    }
  }
  const prep = prepOf(row, thickness)
  const made = prepFacets(prep, thickness)
  if (made.kind === 'error') return made
  return {
    kind: 'start',
    prep,
    facets: made.facets,
    mate: made.mate,
    rootOpening: middle(row.rootOpening),
    rootFace: middle(row.rootFace),
    grooveAngle: grooveAngleOf(row),
    asDetailed: row.asDetailed,
    asFitUp: row.asFitUp,
    row,
  }
}

function prepOf(row: StartingValue, thickness: number): Prep {
  const rootFace = middle(row.rootFace)
  const angle = grooveAngleOf(row)
  const topDepth = (thickness - rootFace) / 2
  switch (row.prep) {
    case 'single-bevel':
      return { form: 'single-bevel', angle, rootFace, opensTo: 'top' }
    case 'single-v':
      return { form: 'single-v', grooveAngle: angle, rootFace, opensTo: 'top' }
    case 'double-bevel':
      return { form: 'double-bevel', topAngle: angle, bottomAngle: angle, topDepth, rootFace }
    case 'double-v':
      return { form: 'double-v', topGrooveAngle: angle, bottomGrooveAngle: angle, topDepth, rootFace }
  }
}

/** A bevel stands opposite a square edge, so its own angle is the whole groove's; a V has two sides. */
function grooveAngleOf({ prep, angle, angleOf }: StartingValue): number {
  const vee = prep === 'single-v' || prep === 'double-v'
  return middle(angle) * (vee && angleOf === 'bevel' ? 2 : 1)
}

function middle({ from, to }: Range): number {
  return to === null ? from : (from + to) / 2
}

function rangeWords(range: Range | null): string {
  if (range === null) return 'any'
  return range.to === null ? `${range.from} and more` : `${range.from} to ${range.to}`
}
