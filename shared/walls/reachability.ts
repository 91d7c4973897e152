/**
 * Which facets of a wall a straight jet can cut. The jet goes through the whole plate, so a facet can be cut only
 * where its line, prolonged to both faces, stays out of the part. Reach is made of straight pieces; every piece
 * prolonged lies outside it exactly when tilt never increases with depth (reach is then concave; derived).
 *
 * Turning the plate over reverses the facets and their signs, and the rule is the same read backward: what the
 * through-going jet cannot cut from one face it cannot cut from the other (derived, and worked out anew below).
 * Only cuts that stop inside the plate could do more; `partDepth` says which ones, for whoever has such a process.
 *
 * Where a wall blends, reach goes evenly from one end of the edge to the other, and so does every figure here: what
 * holds at both ends holds between them, and the most is at one of them.
 */

/** A facet as every stage writes it. Depth in mm; tilts in radians, positive outward with depth. */
interface FacetLine {
  readonly depth: number
  readonly tilt: number
  /** At the edge's end, where the wall blends. */
  readonly endTilt?: number | undefined
}

export type Reachability =
  | { readonly kind: 'reachable' }
  | {
      readonly kind: 'blocked'
      /** The first facet that leans further out than the one above it. Each of the two, prolonged, enters the other. */
      readonly facet: number
      /** The most that any facet's line goes into the part, mm square to the edge's vertical plane. */
      readonly intoPart: number
      /** Whether the same jet could cut the wall from the other face. */
      readonly turnedOverDoes: boolean
      /**
       * Cuts that end at the facet's own foot and none beyond: facets clear of the part above them can be cut from
       * the top, those clear below from the bottom. Null when some facet is clear on neither side.
       */
      readonly partDepth: {
        readonly fromTop: readonly number[]
        readonly fromBottom: readonly number[]
      } | null
    }

/** Facets from the top face down, the last ending at the thickness; sound ones only (`bodyProblems`). */
export function reachability(facets: readonly FacetLine[]): Reachability {
  const facet = firstRise(facets)
  if (facet < 0) return { kind: 'reachable' }
  const fromTop: number[] = []
  const fromBottom: number[] = []
  let intoPart = 0
  facets.forEach((_, i) => {
    const entries = endsOf(facets).map((section) => entryOf(section, i))
    const above = Math.max(...entries.map((entry) => entry.above))
    const below = Math.max(...entries.map((entry) => entry.below))
    intoPart = Math.max(intoPart, above, below)
    // A facet that is clear on both sides is cut with the first set-up.
    if (above === 0) fromTop.push(i)
    else if (below === 0) fromBottom.push(i)
  })
  const whole = fromTop.length + fromBottom.length === facets.length
  return {
    kind: 'blocked',
    facet,
    intoPart,
    turnedOverDoes: firstRise(turnedOver(facets)) < 0,
    partDepth: whole ? { fromTop, fromBottom } : null,
  }
}

/** The wall as it stands at either end of its edge; one section where it does not blend. */
function endsOf(facets: readonly FacetLine[]): readonly (readonly FacetLine[])[] {
  if (facets.every(({ endTilt }) => endTilt === undefined)) return [facets]
  return [facets, facets.map(({ depth, tilt, endTilt = tilt }) => ({ depth, tilt: endTilt }))]
}

/**
 * The same wall with the plate turned over about an axis along the edge: reversed order, reversed signs. The edge is
 * then travelled the other way, so that a blend's ends change places.
 */
export function turnedOver(facets: readonly FacetLine[]): FacetLine[] {
  const thickness = facets.at(-1)?.depth ?? 0
  return facets
    .map(({ tilt, endTilt }, i) => {
      const depth = thickness - (facets[i - 1]?.depth ?? 0)
      return endTilt === undefined ? { depth, tilt: -tilt } : { depth, tilt: -endTilt, endTilt: -tilt }
    })
    .reverse()
}

/**
 * The first facet that leans further out than the one above it at either end of the edge, −1 when tilt never increases
 * with depth. Equal tilts are one straight wall. Any unit of angle will do.
 */
export function firstRise(facets: readonly FacetLine[]): number {
  return facets.findIndex(({ tilt, endTilt = tilt }, i) => {
    const above = facets[i - 1]
    return above !== undefined && (tilt > above.tilt || endTilt > (above.endTilt ?? above.tilt))
  })
}

/**
 * How far one facet's prolonged line goes into the part above its head and below its foot, mm; 0 where it stays
 * out. Walked outward from the facet: the gap between wall and line is piecewise linear, so its ends tell.
 */
function entryOf(
  facets: readonly FacetLine[],
  own: number,
): { readonly above: number; readonly below: number } {
  const w = Math.tan(facets[own]?.tilt ?? 0)
  let above = 0
  let below = 0
  // Positive: the part reaches further out than the line, so the jet is in the metal.
  for (let i = own + 1, into = 0; i < facets.length; i++) {
    into += (Math.tan(facets[i]!.tilt) - w) * (facets[i]!.depth - facets[i - 1]!.depth)
    below = Math.max(below, into)
  }
  for (let i = own - 1, into = 0; i >= 0; i--) {
    into += (w - Math.tan(facets[i]!.tilt)) * (facets[i]!.depth - (facets[i - 1]?.depth ?? 0))
    above = Math.max(above, into)
  }
  return { above, below }
}
