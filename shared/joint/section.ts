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

/**
 * Which other plate stands opposite: the same prep mirrored, a square edge, or facets of its own, told like this
 * plate's (from the top face down, outward towards this plate positive).
 */
export type Mate = 'same' | 'square' | readonly FacetSpec[]

/** The facets that stand opposite; none is square. */
export function mateFacetsOf(facets: readonly FacetSpec[], mate: Mate): readonly FacetSpec[] {
  return mate === 'same' ? facets : mate === 'square' ? [] : mate
}

export interface JointInput {
  /** From the top face down; the last ends at the thickness. */
  readonly facets: readonly FacetSpec[]
  readonly thickness: number
  readonly mate: Mate
  /**
   * Gap between the outermost lines of both walls. That is the closest they come wherever these lines lie at one
   * depth, as with every mirrored or square mate; otherwise see `narrowest`.
   */
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
  /** Least width at any depth. */
  readonly narrowest: number
  /** Area between the plates over the whole thickness, mm². */
  readonly area: number
}

export function jointSection({ facets, thickness, mate, rootOpening }: JointInput): JointSection {
  const facing = mateFacetsOf(facets, mate)
  const left = sectionOf(facets, thickness)
  const other = sectionOf(facing, thickness)
  return {
    thickness,
    rootOpening,
    left,
    right: other.map(({ x, depth }) => ({ x: rootOpening - x, depth })),
    rootFace: rootFaceOf(facets, thickness),
    // A wall that leans over its mate's bevel takes from the angle between them.
    grooveAngleTop: Math.max(0, (facets[0]?.tilt ?? 0) + (facing[0]?.tilt ?? 0)),
    grooveAngleBottom: Math.max(0, -(facets.at(-1)?.tilt ?? 0) - (facing.at(-1)?.tilt ?? 0)),
    widthTop: rootOpening - (left[0]?.x ?? 0) - (other[0]?.x ?? 0),
    widthBottom: rootOpening - (left.at(-1)?.x ?? 0) - (other.at(-1)?.x ?? 0),
    narrowest: rootOpening + least(left, other),
    area: rootOpening * thickness + hollowBeside(left) + hollowBeside(other),
  }
}

/** Least of what both walls leave free beyond the gap: they are made of straight pieces, so at an end of one. */
function least(left: readonly SectionPoint[], other: readonly SectionPoint[]): number {
  const depths = [...left, ...other].map(({ depth }) => depth)
  return Math.min(...depths.map((depth) => -xAt(left, depth) - xAt(other, depth)))
}

function xAt(wall: readonly SectionPoint[], depth: number): number {
  const i = Math.max(
    1,
    wall.findIndex((point) => point.depth >= depth),
  )
  const [above, below] = [wall[i - 1], wall[i]]
  if (!above || !below) throw new RangeError(`no wall at a depth of ${depth} mm`)
  if (depth === below.depth) return below.x
  return above.x + ((depth - above.depth) / (below.depth - above.depth)) * (below.x - above.x)
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
