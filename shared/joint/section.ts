import type { FacetSpec } from '../walls/schema.ts'
import { radians } from '../units/angle.ts'

/**
 * The joint of two plates in cross-section, square to the edge. x runs from this plate (left) to the other
 * (right), 0 at this plate's root; depth runs down from the top face. mm; facets in degrees from vertical.
 */

export interface SectionPoint {
  readonly x: number
  readonly depth: number
}

/** Which other plate stands opposite: the same prep mirrored, or a square edge. */
export type Mate = 'same' | 'square'

export interface JointInput {
  /** From the top face down; the last ends at the thickness. */
  readonly facets: readonly FacetSpec[]
  readonly thickness: number
  readonly mate: Mate
  /** Gap at the closest point. */
  readonly rootOpening: number
}

/** The vertical part of a wall, at its outermost line. Length 0 is a root edge. */
export interface RootFace {
  readonly length: number
  readonly fromDepth: number
  readonly toDepth: number
}

export interface JointSection {
  readonly thickness: number
  readonly rootOpening: number
  /** Wall of this plate from the top face down; its outermost point has x = 0. */
  readonly left: readonly SectionPoint[]
  /** Wall of the other plate; its outermost point has x = rootOpening. */
  readonly right: readonly SectionPoint[]
  readonly rootFace: RootFace
  /** Included angle of both plates, degrees: groove open to the top face, and to the bottom face. */
  readonly grooveAngleTop: number
  readonly grooveAngleBottom: number
  /** Width of the groove at the top and at the bottom face. */
  readonly widthTop: number
  readonly widthBottom: number
  /** Area between the plates over the whole thickness, mm². */
  readonly area: number
}

export function jointSection({ facets, thickness, mate, rootOpening }: JointInput): JointSection {
  const own = sectionOf(facets, thickness)
  const other = mate === 'same' ? own : sectionOf([], thickness)
  const left = own
  const right = other.map(({ x, depth }) => ({ x: rootOpening - x, depth }))
  const sides = mate === 'same' ? 2 : 1
  const last = facets.at(-1)
  return {
    thickness,
    rootOpening,
    left,
    right,
    rootFace: rootFaceOf(facets, thickness),
    grooveAngleTop: sides * Math.max(0, facets[0]?.tilt ?? 0),
    grooveAngleBottom: sides * Math.max(0, -(last?.tilt ?? 0)),
    widthTop: rootOpening - (own[0]?.x ?? 0) - (other[0]?.x ?? 0),
    widthBottom: rootOpening - (own.at(-1)?.x ?? 0) - (other.at(-1)?.x ?? 0),
    area: rootOpening * thickness + hollowBeside(own) + hollowBeside(other),
  }
}

/** One wall's line: from the top face down, x = 0 at its outermost point and negative where it stands back. */
export function sectionOf(facets: readonly FacetSpec[], thickness: number): readonly SectionPoint[] {
  const points: SectionPoint[] = [{ x: 0, depth: 0 }]
  let reach = 0
  let depth = 0
  let outermost = 0
  for (const facet of facets.length > 0 ? facets : [{ depth: thickness, tilt: 0 }]) {
    reach += (facet.depth - depth) * Math.tan(radians(facet.tilt))
    depth = facet.depth
    outermost = Math.max(outermost, reach)
    points.push({ x: reach, depth })
  }
  return points.map((point) => ({ x: point.x - outermost, depth: point.depth }))
}

/** The first vertical facet; where there is none, a root edge at the outermost depth. */
export function rootFaceOf(facets: readonly FacetSpec[], thickness: number): RootFace {
  if (facets.length === 0) return { length: thickness, fromDepth: 0, toDepth: thickness }
  let fromDepth = 0
  for (const { depth, tilt } of facets) {
    if (tilt === 0) return { length: depth - fromDepth, fromDepth, toDepth: depth }
    fromDepth = depth
  }
  const edge = sectionOf(facets, thickness).find(({ x }) => x === 0)
  if (!edge) throw new Error('a wall has an outermost point')
  return { length: 0, fromDepth: edge.depth, toDepth: edge.depth }
}

/** ∫ (outermost reach − reach) dd, exact because the wall is made of straight pieces. */
function hollowBeside(wall: readonly SectionPoint[]): number {
  let area = 0
  for (let i = 1; i < wall.length; i++) {
    const above = wall[i - 1]
    const below = wall[i]
    if (above && below) area -= ((above.x + below.x) / 2) * (below.depth - above.depth)
  }
  return area
}
