/**
 * How a step at a smooth corner is cured: the longer of the two walls blends, so that at the corner it stands as its
 * neighbour does; its other end keeps its tilt. Along the longer edge the head has the most way to turn on.
 */

/** A wall at a corner; tilts in any one unit, lengths in another. */
export interface WallAtCorner {
  readonly facets: readonly {
    readonly depth: number
    readonly tilt: number
    readonly endTilt?: number | undefined
  }[]
  readonly length: number
}

export interface BlendCure {
  /** The wall that is to blend: the one that ends at the corner, or the one that starts there. */
  readonly change: 'before' | 'after'
  /** Index of its facet, from the top. */
  readonly facet: number
  /** The facet's tilts at the edge's start and at its end. */
  readonly tilt: number
  readonly endTilt: number
}

/** Null when the walls do not have the same facet ends, or when more than one facet differs, or none. */
export function blendCure(before: WallAtCorner, after: WallAtCorner): BlendCure | null {
  if (before.facets.length !== after.facets.length) return null
  if (before.facets.some(({ depth }, i) => depth !== after.facets[i]?.depth)) return null
  const unlike = before.facets.flatMap((own, i) =>
    (own.endTilt ?? own.tilt) === after.facets[i]?.tilt ? [] : [i],
  )
  const [facet] = unlike
  if (facet === undefined || unlike.length > 1) return null
  const [one, two] = [before.facets[facet]!, after.facets[facet]!]
  return before.length >= after.length
    ? { change: 'before', facet, tilt: one.tilt, endTilt: two.tilt }
    : { change: 'after', facet, tilt: one.endTilt ?? one.tilt, endTilt: two.endTilt ?? two.tilt }
}
