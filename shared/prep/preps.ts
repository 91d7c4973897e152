import type { FacetSpec, WallSpec } from '../walls/schema.ts'
import type { EdgeRef } from '../walls/types.ts'
import { edgeKey } from '../walls/names.ts'

/**
 * Preps as joint forms of the trade, turned into the facets of this plate's wall and of its mate's. mm, degrees from
 * vertical. The part is cut from the top: a groove that opens to the top face has a positive tilt there.
 */

export const prepForms = ['square', 'tilt', 'single-bevel', 'double-bevel', 'single-v', 'double-v'] as const
export type PrepForm = (typeof prepForms)[number]

/**
 * Which plates of the joint are prepared: this one alone, its mate square, or both alike, mirrored. A bevel angle is
 * that of every prepared plate; a groove angle is the total, so that one plate alone takes the whole of it.
 */
export type PreparedPlates = 'one' | 'both'

export type Prep =
  | { readonly form: 'square' }
  /** One straight wall at a signed tilt. */
  | { readonly form: 'tilt'; readonly tilt: number; readonly plates?: PreparedPlates }
  | {
      readonly form: 'single-bevel'
      /** Bevel angle of a prepared plate, positive. */
      readonly angle: number
      readonly rootFace: number
      /** The face that the groove opens to; the root face lies at the other. */
      readonly opensTo: 'top' | 'bottom'
      /** One, where not told. */
      readonly plates?: PreparedPlates
    }
  | {
      readonly form: 'double-bevel'
      readonly topAngle: number
      readonly bottomAngle: number
      /** Depth of bevel from the top face. */
      readonly topDepth: number
      readonly rootFace: number
      /** One, where not told. */
      readonly plates?: PreparedPlates
    }
  | {
      readonly form: 'single-v'
      /** Total of both plates. */
      readonly grooveAngle: number
      readonly rootFace: number
      readonly opensTo: 'top' | 'bottom'
      /** Both, where not told. */
      readonly plates?: PreparedPlates
    }
  | {
      readonly form: 'double-v'
      /** Totals of both plates. */
      readonly topGrooveAngle: number
      readonly bottomGrooveAngle: number
      readonly topDepth: number
      readonly rootFace: number
      /** Both, where not told. */
      readonly plates?: PreparedPlates
    }

export const prepErrorCodes = ['angle-out-of-range', 'root-face-too-deep'] as const
export type PrepErrorCode = (typeof prepErrorCodes)[number]

export interface PrepError {
  readonly kind: 'error'
  readonly code: PrepErrorCode
  readonly message: string
}

export type PrepFacets =
  | {
      readonly kind: 'facets'
      /** This plate, from the top face down. None: square, as an edge without a wall is. */
      readonly facets: readonly FacetSpec[]
      /** The plate opposite, told like this one (outward is towards this plate). None: square. */
      readonly mate: readonly FacetSpec[]
    }
  | PrepError

/** Which plates a prep prepares: V forms both and others one, unless it says so itself. */
export function preparedPlates(prep: Prep): PreparedPlates {
  if (prep.form === 'square') return 'one'
  return prep.plates ?? (prep.form === 'single-v' || prep.form === 'double-v' ? 'both' : 'one')
}

/** The facets of a prep in a plate of this thickness, or why there are none. */
export function prepFacets(prep: Prep, thickness: number): PrepFacets {
  const plates = preparedPlates(prep)
  const own = ownFacets(prep, plates === 'both' ? 2 : 1, thickness)
  if (!Array.isArray(own)) return own
  return { kind: 'facets', facets: own, mate: plates === 'both' ? own.map((facet) => ({ ...facet })) : [] }
}

type Own = FacetSpec[] | PrepError

/** `sharedBy`: how many plates a groove angle is shared between. */
function ownFacets(prep: Prep, sharedBy: 1 | 2, thickness: number): Own {
  switch (prep.form) {
    case 'square':
      return []
    case 'tilt':
      return single(prep.tilt, 0, prep.tilt >= 0 ? 'top' : 'bottom', thickness)
    case 'single-bevel':
      return bevelAngle(prep.angle) ?? single(prep.angle, prep.rootFace, prep.opensTo, thickness)
    case 'single-v': {
      const angle = prep.grooveAngle / sharedBy
      return bevelAngle(angle) ?? single(angle, prep.rootFace, prep.opensTo, thickness)
    }
    case 'double-bevel':
      return double(prep.topAngle, prep.bottomAngle, prep.topDepth, prep.rootFace, thickness)
    case 'double-v':
      return double(
        prep.topGrooveAngle / sharedBy,
        prep.bottomGrooveAngle / sharedBy,
        prep.topDepth,
        prep.rootFace,
        thickness,
      )
  }
}

function single(angle: number, rootFace: number, opensTo: 'top' | 'bottom', thickness: number): Own {
  const size = Math.abs(angle)
  if (!(size < 90)) return angleError()
  if (!(rootFace >= 0 && rootFace < thickness)) return rootFaceError(thickness)
  if (size === 0) return []
  if (rootFace === 0) return [{ depth: thickness, tilt: opensTo === 'top' ? size : -size }]
  return opensTo === 'top'
    ? [
        { depth: thickness - rootFace, tilt: size },
        { depth: thickness, tilt: 0 },
      ]
    : [
        { depth: rootFace, tilt: 0 },
        { depth: thickness, tilt: -size },
      ]
}

function double(
  topAngle: number,
  bottomAngle: number,
  topDepth: number,
  rootFace: number,
  thickness: number,
): Own {
  const wrong = bevelAngle(topAngle) ?? bevelAngle(bottomAngle)
  if (wrong) return wrong
  if (!(topDepth > 0 && rootFace >= 0 && topDepth + rootFace < thickness)) return rootFaceError(thickness)
  const top = { depth: topDepth, tilt: topAngle }
  const bottom = { depth: thickness, tilt: -bottomAngle }
  return rootFace === 0 ? [top, bottom] : [top, { depth: topDepth + rootFace, tilt: 0 }, bottom]
}

/** Null when the angle will do. */
function bevelAngle(angle: number): PrepError | null {
  return angle > 0 && angle < 90 ? null : angleError()
}

function angleError(): PrepError {
  return {
    kind: 'error',
    code: 'angle-out-of-range',
    message: 'A bevel angle is more than 0° and less than 90° from vertical. Type another angle.',
  }
}

function rootFaceError(thickness: number): PrepError {
  return {
    kind: 'error',
    code: 'root-face-too-deep',
    message: `Root face and depth of bevel must leave some bevel in a ${thickness} mm plate. Make them smaller.`,
  }
}

/** Gives the same wall to many edges; no facets makes them square. The answer is in order of loop and edge. */
export function applyPrep(
  walls: readonly WallSpec[],
  edges: readonly EdgeRef[],
  facets: readonly FacetSpec[],
): WallSpec[] {
  const chosen = new Set(edges.map(edgeKey))
  const kept = walls.filter((wall) => !chosen.has(edgeKey(wall)))
  if (facets.length === 0) return kept
  const added = [...chosen].map((key): WallSpec => {
    const [loop = 0, edge = 0] = key.split('-').map(Number)
    return { loop, edge, facets: facets.map((facet) => ({ ...facet })) }
  })
  return [...kept, ...added].sort((a, b) => a.loop - b.loop || a.edge - b.edge)
}

/** Walls for another thickness: the last facet is moved to the bottom; null where an earlier one would not fit. */
export function wallsForThickness(walls: readonly WallSpec[], thickness: number): WallSpec[] | null {
  const moved = walls.map((wall) => {
    const before = wall.facets.at(-2)?.depth ?? 0
    if (before >= thickness) return null
    return {
      ...wall,
      facets: wall.facets.map((facet, i) =>
        i === wall.facets.length - 1 ? { ...facet, depth: thickness } : { ...facet },
      ),
    }
  })
  return moved.every((wall) => wall !== null) ? moved : null
}

/**
 * A finding's one-click cure: another tilt for one facet of some edges, or with `endTilt` a blend; without it the facet
 * keeps no blend. Edges without a wall count as square.
 */
export function applyTilt(
  walls: readonly WallSpec[],
  set: {
    readonly edges: readonly EdgeRef[]
    readonly facet: number
    readonly tilt: number
    readonly endTilt?: number | undefined
  },
  thickness: number,
): WallSpec[] {
  const byEdge = new Map(walls.map((wall) => [edgeKey(wall), wall]))
  return set.edges.reduce<WallSpec[]>(
    (current, edge) => {
      const own = byEdge.get(edgeKey(edge))?.facets ?? [{ depth: thickness, tilt: 0 }]
      const facets = own.map((facet, i) => (i === set.facet ? tilted(facet.depth, set) : facet))
      return applyPrep(current, [edge], facets)
    },
    [...walls],
  )
}

function tilted(
  depth: number,
  { tilt, endTilt }: { readonly tilt: number; readonly endTilt?: number | undefined },
): FacetSpec {
  return endTilt === undefined || endTilt === tilt ? { depth, tilt } : { depth, tilt, endTilt }
}
