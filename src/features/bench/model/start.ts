import { prepFromStartingValue } from '../../../../shared/prep/start.ts'
import type { StartingValue } from '../../../../shared/prep/starting-values.ts'
import type { JointSpec } from '../../../../shared/setup/schema.ts'
import { squareFacets, type Facets } from './walls.ts'

/** What a row of the starting values gives to an edge: the prep of this plate, and its joint. */
export interface Start {
  readonly facets: Facets
  readonly joint: Pick<JointSpec, 'rootOpening' | 'mate' | 'tolerance'>
}

/** Null where the row does not fit the plate. Fit-up bands go with the joint where all three are known. */
export function startFrom(row: StartingValue, thickness: number): Start | null {
  const start = prepFromStartingValue(row, thickness)
  if (start.kind === 'error') return null
  const { angle = null, rootOpening = null, rootFace = null } = start.asFitUp ?? {}
  return {
    facets: start.facets.length === 0 ? squareFacets(thickness) : start.facets,
    joint: {
      rootOpening: start.rootOpening,
      mate: start.mate.length === 0 ? 'square' : 'same',
      tolerance: angle && rootOpening && rootFace ? { angle, rootOpening, rootFace } : undefined,
    },
  }
}
