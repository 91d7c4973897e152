import type { SectionDimension, SectionSpec } from './types.ts'

/** The drawing in words, for those who cannot see it: every number that it shows. */
export function describeSection(spec: SectionSpec, dimensions: readonly SectionDimension[]): string {
  const what = spec.joint ? 'Cross-section of both plates.' : 'Cross-section of the plate.'
  const numbers = dimensions.map(({ caption, text, tolerance, facet, kind }) => {
    const where =
      kind === 'angle' && spec.facets.length > 1 ? `Facet ${facet! + 1}, ${caption}` : capital(caption)
    return `${where} ${text}${tolerance ? `, tolerance ${tolerance}` : ''}.`
  })
  return [what, ...numbers].join(' ')
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
