import type { EvaluationRequest } from '../../shared/evaluate/schema.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import { seeded } from '../support/plates.ts'

/** The gears that are measured, and the request that is evaluated for each. mm and degrees. */

/** The mean radius for each edge: about 5 mm of circumference. */
const RADIUS_PER_EDGE = 0.8

/** Half the height of a tooth. */
export const toothHeights = {
  /** 2 mm up and down whatever the count: a bigger gear has more teeth of the same shape. */
  'constant tooth': () => 2,
  /** 5 % of the radius up and down: the more teeth, the more slender. */
  'slender tooth': (radius: number) => 0.05 * radius,
} as const

export type OutlineName = keyof typeof toothHeights

/** A toothed outline: two edges out and in, a land and a root, for every four vertices. */
export function gear(edges: number, outline: OutlineName): Vertex[] {
  const radius = edges * RADIUS_PER_EDGE
  const half = toothHeights[outline](radius)
  return Array.from({ length: edges }, (_, i) => {
    const from = i % 4 === 1 || i % 4 === 2 ? radius + half : radius - half
    const heading = (2 * Math.PI * i) / edges
    return { x: from * Math.cos(heading), y: from * Math.sin(heading) }
  })
}

const THICKNESS = 1
export const tilts = [-15, -10, -5, 0, 5, 10, 15] as const

/** Every edge with one of seven tilts by a seed, the jet and the head given; no wall ends inside the plate. */
export function requestOf(loop: readonly Vertex[]): EvaluationRequest {
  const random = seeded(loop.length)
  return {
    plate: { thickness: THICKNESS },
    loops: [[...loop]],
    walls: loop.map((_, edge) => ({
      loop: 0,
      edge,
      facets: [{ depth: THICKNESS, tilt: tilts[Math.floor(random() * tilts.length)]! }],
    })),
    jet: { kerf: 1, taper: 0.3, standoff: 3, nozzleDiameter: 7.14 },
    head: { mechanicalLimit: 60, workingLimit: 55 },
  }
}
