import type { Body, Wall } from './types.ts'

/** The depths between which no wall changes tilt: 0, every facet end within the plate, the thickness; rising. */
export function levelsOf(body: Body): readonly number[] {
  return levelsOfWalls(body.walls.flat(), body.thickness)
}

export function levelsOfWalls(walls: readonly Wall[], thickness: number): readonly number[] {
  const levels = new Set([0, thickness])
  for (const { facets } of walls) {
    for (const { depth } of facets) if (depth > 0 && depth < thickness) levels.add(depth)
  }
  return [...levels].sort((a, b) => a - b)
}
