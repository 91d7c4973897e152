import { prepFacets } from '../../../../shared/prep/preps.ts'
import type { JointSpec } from '../../../../shared/setup/schema.ts'
import type { Range, StartingValue } from '../../../../shared/joint/starting-values.ts'
import { squareFacets, type Facets } from './walls.ts'

/** What a row of the starting values gives to an edge: the prep of this plate, and its joint. */
export interface Start {
  readonly facets: Facets
  readonly joint: Pick<JointSpec, 'rootOpening' | 'mate' | 'tolerance'>
}

/** Null where the row does not fit the plate. */
export function startFrom(row: StartingValue, thickness: number): Start | null {
  const vee = / V\b/.test(row.form)
  const angle = middle(row.angle)
  const own = row.angleOf === 'groove' && vee ? angle / 2 : angle
  const rootFace = middle(row.rootFace)
  const prep = row.form.startsWith('double')
    ? prepFacets(
        {
          form: 'double-bevel',
          topAngle: own,
          bottomAngle: own,
          topDepth: (thickness - rootFace) / 2,
          rootFace,
        },
        thickness,
      )
    : prepFacets({ form: 'single-bevel', angle: own, rootFace, opensTo: 'top' }, thickness)
  if (prep.kind === 'error') return null
  const bands = row.asFitUp
  const tolerance =
    bands === null || bands.rootFace === null
      ? undefined
      : { angle: bands.angle, rootOpening: bands.rootOpening, rootFace: bands.rootFace }
  return {
    facets: prep.facets.length === 0 ? squareFacets(thickness) : prep.facets,
    joint: { rootOpening: middle(row.rootOpening), mate: vee ? 'same' : 'square', tolerance },
  }
}

/** The middle of a range; the least where it has no end. */
function middle({ from, to }: Range): number {
  return to === null ? from : (from + to) / 2
}
