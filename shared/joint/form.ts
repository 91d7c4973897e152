import type { FacetSpec } from '../walls/schema.ts'
import type { Mate } from './section.ts'

/** The trade's name for a joint's preparation. */
export function jointForm(facets: readonly FacetSpec[], mate: Mate): string {
  if (mate === 'same') return formName(facets, 'V')
  if (mate === 'square' || isSquare(mate)) return formName(facets, 'bevel')
  if (isSquare(facets)) return formName(mate, 'bevel')
  const [own, other] = [formName(facets, 'V'), formName(mate, 'V')]
  // Alike in form though not in angle: a V of unequal sides. Otherwise each plate has its own name.
  if (own === other && grooveOpensTo(facets) === grooveOpensTo(mate)) return own
  return `${formName(facets, 'bevel')} opposite ${formName(mate, 'bevel')}`
}

function isSquare(facets: readonly FacetSpec[]): boolean {
  return facets.every(({ tilt }) => tilt === 0)
}

function formName(facets: readonly FacetSpec[], letter: 'V' | 'bevel'): string {
  const tilted = facets.filter(({ tilt }) => tilt !== 0)
  const [first, second, third] = tilted
  if (!first) return 'square butt'
  const rootFace = tilted.length < facets.length ? ' with root face' : ''
  if (!second) return `single ${letter}${rootFace}`
  if (third) return 'compound bevel'
  if (first.tilt > 0 && second.tilt < 0) return `double ${letter}${rootFace}`
  return `compound ${letter}${rootFace}`
}

/** Which face the groove opens to. */
export function grooveOpensTo(facets: readonly FacetSpec[]): 'top' | 'bottom' | 'both' | 'neither' {
  const top = (facets[0]?.tilt ?? 0) > 0
  const bottom = (facets.at(-1)?.tilt ?? 0) < 0
  return top && bottom ? 'both' : top ? 'top' : bottom ? 'bottom' : 'neither'
}
