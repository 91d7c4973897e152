import type { FacetSpec } from '../../shared/evaluate/schema.ts'
import type { SectionPoint, SectionSpec } from './types.ts'

const RADIANS = Math.PI / 180

/** Corners of a wall from its top edge (0, 0) down, one more than it has facets. */
export function wallPoints(facets: readonly FacetSpec[]): SectionPoint[] {
  const points: SectionPoint[] = [{ x: 0, depth: 0 }]
  for (const { depth, tilt } of facets) {
    const last = points.at(-1)!
    points.push({ x: last.x + (depth - last.depth) * Math.tan(tilt * RADIANS), depth })
  }
  return points
}

export interface Outline {
  /** The wall of the left plate, from the top down. */
  readonly left: readonly SectionPoint[]
  /** The wall of the right plate of a joint; null for one plate. */
  readonly right: readonly SectionPoint[] | null
}

/** Walls of the drawn plates in section millimetres. */
export function outlineOf({ facets, mate }: SectionSpec): Outline {
  const own = wallPoints(facets)
  if (!mate) return { left: own, right: null }
  const other = wallPoints(mate.facets)
  const half = mate.rootOpening / 2
  const ownRoot = outermost(own)
  const otherRoot = outermost(other)
  return {
    left: own.map(({ x, depth }) => ({ x: x - ownRoot - half, depth })),
    right: other.map(({ x, depth }) => ({ x: otherRoot - x + half, depth })),
  }
}

export function outermost(points: readonly SectionPoint[]): number {
  return Math.max(...points.map((point) => point.x))
}
