import type { SaveSetup } from '../../../../shared/api/setups.ts'
import type { Cure } from '../../../../shared/findings/schema.ts'
import { withFacets, withTilt } from './walls.ts'

/** The content with every cure applied, in one step. Where two speak of one number, the later one holds. */
export function withCures(content: SaveSetup, cures: readonly Cure[]): SaveSetup {
  return cures.reduce((before, { set, standoff }) => {
    const tilted =
      set === undefined
        ? before
        : withFacets(before, set.edges, (facets) => withTilt(facets, set.facet, set.tilt, set.endTilt))
    return standoff === undefined ? tilted : { ...tilted, jet: { ...tilted.jet, standoff } }
  }, content)
}
