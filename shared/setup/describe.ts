import type { FacetSpec } from '../walls/schema.ts'
import { formatAngle, formatLength } from '../units/format.ts'
import type { DisplayUnit } from '../units/length.ts'

/** One line for a wall, from the top face down: `square`, `+30°`, `+30° with 3 mm root face`. */
export function describeWall(facets: readonly FacetSpec[], unit: DisplayUnit = 'mm'): string {
  const tilted = facets.filter(({ tilt }) => tilt !== 0)
  const [first, second] = tilted
  if (!first) return 'square'
  const root = rootFaceText(facets, unit)
  if (!second) return `${angle(first)}${root}`
  const runs = tilted.map((facet) => {
    const above = facets[facets.indexOf(facet) - 1]?.depth ?? 0
    return `${angle(facet)} over ${formatLength(facet.depth - above, unit)}`
  })
  return `${runs.join(', ')}${root}`
}

function angle({ tilt }: FacetSpec): string {
  return formatAngle(tilt, { sign: true })
}

function rootFaceText(facets: readonly FacetSpec[], unit: DisplayUnit): string {
  const index = facets.findIndex(({ tilt }) => tilt === 0)
  const face = facets[index]
  if (!face) return ''
  const length = formatLength(face.depth - (facets[index - 1]?.depth ?? 0), unit)
  return ` with ${length} root face${index === 0 ? ' at the top' : ''}`
}
