import { prepFacets, type Prep } from '../../../../shared/prep/preps.ts'
import { heightsOf, squareFacets, type Facets } from './walls.ts'

/** The forms that the edge card offers, told by the face that the groove opens to; `own` is any other chain. */
export const cardForms = ['square', 'top', 'bottom', 'double'] as const
export type CardForm = (typeof cardForms)[number] | 'own'

export const formWords: Record<CardForm, string> = {
  square: 'square',
  top: 'open to the top',
  bottom: 'open to the bottom',
  double: 'double bevel',
  own: 'own chain of facets',
}

/** Where to begin when an edge had no bevel: the bevel of a 60° single V, the commonest one (common practice). */
const FIRST_ANGLE = 30

export interface ReadForm {
  readonly form: CardForm
  /** Bevel angles as sizes, degrees; 0 where there is none. */
  readonly top: number
  readonly bottom: number
  /** mm */
  readonly rootFace: number
}

export function readForm(facets: Facets): ReadForm {
  const heights = heightsOf(facets)
  const first = facets[0]!.tilt
  const last = facets.at(-1)!.tilt
  const uprights = facets.flatMap(({ tilt }, i) => (tilt === 0 ? [i] : []))
  const rootFace = uprights.length === 1 ? heights[uprights[0]!]! : 0
  const bevels = facets.length - uprights.length
  const top = Math.max(0, first)
  const bottom = Math.max(0, -last)
  const rest = { top, bottom, rootFace }
  if (bevels === 0) return { form: 'square', top: 0, bottom: 0, rootFace: 0 }
  if (uprights.length <= 1) {
    const double = bevels === 2 && first > 0 && last < 0
    if (double) return { form: 'double', ...rest }
    if (bevels === 1 && first > 0) return { form: 'top', ...rest }
    if (bevels === 1 && last < 0) return { form: 'bottom', ...rest }
  }
  return { form: 'own', ...rest }
}

/** The facets of a form, keeping the angles and the root face that the edge had where they fit. */
export function inForm(facets: Facets, form: Exclude<CardForm, 'own'>, thickness: number): Facets {
  const { top, bottom, rootFace } = readForm(facets)
  const angle = top || bottom || FIRST_ANGLE
  const kept = rootFace < thickness ? rootFace : 0
  switch (form) {
    case 'square':
      return squareFacets(thickness)
    case 'top':
    case 'bottom':
      return made({ form: 'single-bevel', angle, rootFace: kept, opensTo: form }, thickness) ?? facets
    case 'double':
      return (
        made(
          {
            form: 'double-bevel',
            topAngle: top || angle,
            bottomAngle: bottom || angle,
            topDepth: (thickness - kept) / 2,
            rootFace: kept,
          },
          thickness,
        ) ?? facets
      )
  }
}

/** The same form with another root face; bevels of a double one keep their proportion. Null where it does not fit. */
export function withRootFace(facets: Facets, rootFace: number): Facets | null {
  const thickness = facets.at(-1)!.depth
  const { form, top, bottom, rootFace: before } = readForm(facets)
  if (form === 'top' || form === 'bottom') {
    const angle = form === 'top' ? top : bottom
    return made({ form: 'single-bevel', angle, rootFace, opensTo: form }, thickness)
  }
  if (form !== 'double') return null
  const topDepth = (facets[0]!.depth * (thickness - rootFace)) / (thickness - before)
  return made({ form: 'double-bevel', topAngle: top, bottomAngle: bottom, topDepth, rootFace }, thickness)
}

function made(prep: Prep, thickness: number): Facets | null {
  const answer = prepFacets(prep, thickness)
  return answer.kind === 'facets' ? answer.facets : null
}
