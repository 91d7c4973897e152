import type { EdgeRef } from '../walls/types.ts'

/** What the makers of findings are told. Degrees and mm, the caller's numbering. */

export interface FacetDegrees {
  readonly depth: number
  readonly tilt: number
  /** At the edge's end, where the wall blends. */
  readonly endTilt?: number | undefined
}

/** An edge and its wall, from the top face down. */
export interface EdgeWall extends EdgeRef {
  readonly facets: readonly FacetDegrees[]
  /** Length of the edge in the drawing, mm, where it matters. */
  readonly length?: number
}

export interface Limits {
  readonly mechanical: number
  readonly working: number | null
}

/**
 * How far a computed tilt may seem to pass a limit through rounding alone, degrees: thousands of times what
 * double precision loses, millions of times finer than a head can turn.
 */
export const LIMIT_ROUNDING = 1e-9

/** The limit that a tilt passes, the graver first; null when it passes none. */
export function limitPassed(
  tilt: number,
  limits: Limits,
): { readonly kind: 'mechanical' | 'working'; readonly limit: number } | null {
  if (tilt > limits.mechanical + LIMIT_ROUNDING) return { kind: 'mechanical', limit: limits.mechanical }
  if (limits.working !== null && tilt > limits.working + LIMIT_ROUNDING) {
    return { kind: 'working', limit: limits.working }
  }
  return null
}

/** The limit that a cure keeps to: one click should not leave the next finding behind. */
export function strictestLimit({ mechanical, working }: Limits): number {
  return working === null ? mechanical : Math.min(mechanical, working)
}

/** Cures are given in tenths of a degree, as a head is set. */
const STEPS_PER_DEGREE = 10

/** The tenth of a degree at or next below (`down`) or above a tilt, so that a cure stays inside its limit. */
export function roundTilt(tilt: number, direction: 'down' | 'up'): number {
  const steps = tilt * STEPS_PER_DEGREE
  const rounded =
    direction === 'down' ? Math.floor(steps + LIMIT_ROUNDING) : Math.ceil(steps - LIMIT_ROUNDING)
  return rounded === 0 ? 0 : rounded / STEPS_PER_DEGREE
}

/** The wall with one facet at another tilt; null when a jet could no longer cut it from the top (tilt would increase). */
export function withTilt(wall: EdgeWall, facet: number, tilt: number): EdgeWall | null {
  const facets = wall.facets.map((old, i) => (i === facet ? { ...old, tilt } : old))
  const cuttable = facets.every(({ tilt: own }, i) => i === 0 || own <= (facets[i - 1]?.tilt ?? own))
  return cuttable ? { ...wall, facets } : null
}
