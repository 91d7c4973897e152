import { radians } from '../units/angle.ts'
import { reachability } from '../walls/reachability.ts'
import type { FacetSpec } from '../walls/schema.ts'
import { prepFacets, preparedPlates, type Prep } from './preps.ts'

export type PrepProblem =
  'facets-not-rising' | 'ends-elsewhere' | 'tilt-out-of-range' | 'unreachable' | 'root-face' | 'groove-angle'

/** Rounding of a handful of additions, as a share of the thickness. */
const ROUNDING = 1e-12

/** What is wrong with the facets that a prep yields, worked out from what the form promises; none for a refusal. */
export function prepProblems(prep: Prep, thickness: number): PrepProblem[] {
  const made = prepFacets(prep, thickness)
  if (made.kind === 'error') return []
  const problems = new Set([...wallProblems(made.facets, thickness), ...wallProblems(made.mate, thickness)])
  if ('rootFace' in prep && made.facets.length > 0) {
    const upright = made.facets.reduce(
      (sum, { depth, tilt }, i) => (tilt === 0 ? sum + depth - (made.facets[i - 1]?.depth ?? 0) : sum),
      0,
    )
    if (!(Math.abs(upright - prep.rootFace) <= ROUNDING * thickness)) problems.add('root-face')
  }
  const whole = grooveAngles(prep)
  if (whole) {
    const top = Math.max(0, made.facets[0]?.tilt ?? 0) + Math.max(0, made.mate[0]?.tilt ?? 0)
    const bottom = Math.max(0, -(made.facets.at(-1)?.tilt ?? 0)) + Math.max(0, -(made.mate.at(-1)?.tilt ?? 0))
    const wrong = Math.hypot(top - whole.top, bottom - whole.bottom)
    if (!(wrong <= ROUNDING * 180)) problems.add('groove-angle')
  }
  return [...problems]
}

function wallProblems(facets: readonly FacetSpec[], thickness: number): PrepProblem[] {
  const problems: PrepProblem[] = []
  if (facets.length === 0) return problems
  if (facets.some(({ depth }, i) => !(depth > (facets[i - 1]?.depth ?? 0))))
    problems.push('facets-not-rising')
  if (facets.at(-1)?.depth !== thickness) problems.push('ends-elsewhere')
  if (facets.some(({ tilt }) => !(Math.abs(tilt) < 90))) problems.push('tilt-out-of-range')
  const told = facets.map(({ depth, tilt }) => ({ depth, tilt: radians(tilt) }))
  if (reachability(told).kind === 'blocked') problems.push('unreachable')
  return problems
}

/** Included angle of both plates at each face, as the form says it; null for the forms without one. */
function grooveAngles(prep: Prep): { readonly top: number; readonly bottom: number } | null {
  const sides = preparedPlates(prep) === 'both' ? 2 : 1
  const facing = (angle: number, opensTo: 'top' | 'bottom') =>
    opensTo === 'top' ? { top: angle, bottom: 0 } : { top: 0, bottom: angle }
  switch (prep.form) {
    case 'square':
      return { top: 0, bottom: 0 }
    case 'tilt':
      return null
    case 'single-bevel':
      return facing(sides * prep.angle, prep.opensTo)
    case 'single-v':
      return facing(prep.grooveAngle, prep.opensTo)
    case 'double-bevel':
      return { top: sides * prep.topAngle, bottom: sides * prep.bottomAngle }
    case 'double-v':
      return { top: prep.topGrooveAngle, bottom: prep.bottomGrooveAngle }
  }
}
