import type { Bounds } from './types.ts'

/**
 * What arithmetic may have done to a coordinate, mm: 2^-40 of the largest one, which is some thousand units in
 * its last place (2^-53), as an intersection is the outcome of dozens of operations and may lie far out.
 * Points nearer than this cannot be told apart. A metre gives 1e-9 mm.
 */
export function roundingOf({ minX, minY, maxX, maxY }: Bounds): number {
  const largest = Math.max(-minX, -minY, maxX, maxY)
  return largest > 0 && largest < Infinity ? 2 ** -40 * largest : 0
}
