import type { Body } from './types.ts'

/** The depths between which no wall changes tilt: 0, every facet end within the plate, the thickness; rising. */
export function levelsOf(body: Body): readonly number[] {
  const levels = new Set([0, body.thickness])
  for (const walls of body.walls) {
    for (const wall of walls) {
      for (const { depth } of wall.facets) if (depth > 0 && depth < body.thickness) levels.add(depth)
    }
  }
  return [...levels].sort((a, b) => a - b)
}
