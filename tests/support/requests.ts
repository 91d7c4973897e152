import { loopFromVertices } from '../../shared/geometry/bulge.ts'
import { profileProblems } from '../../shared/geometry/problems.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import type { EvaluationRequest } from '../../shared/evaluate/schema.ts'
import type { FacetSpec } from '../../shared/walls/schema.ts'
import { circle, rectangle, reversed, seeded, star } from './plates.ts'

/** Set-ups from a seed: lines and arcs, holes, one to three facets of both signs, any datum. */
export interface RandomRequest {
  /** Largest tilt, degrees. */
  readonly steepest: number
  readonly arcs: boolean
  /** Facets that a jet from the top can cut: tilt never increases with depth. */
  readonly cuttable: boolean
}

/** Null where the seed's outline crosses itself. */
export function randomRequest(seed: number, kind: RandomRequest): EvaluationRequest | null {
  const random = seeded(seed)
  const between = (low: number, high: number) => low + (high - low) * random()
  const thickness = between(4, 40)
  const bulged = (loop: Vertex[]) =>
    loop.map((v) => (kind.arcs && random() < 0.4 ? { ...v, bulge: 0.6 * (random() - 0.5) } : v))
  const outline =
    random() < 0.3 ? rectangle(-110, -90, 220, 180) : star(random, 4 + Math.floor(9 * random()), 110, 180)
  const loops = [bulged(outline)]
  if (random() < 0.4) loops.push(bulged(reversed(star(random, 3 + Math.floor(4 * random()), 30, 50))))
  if (kind.arcs && random() < 0.4) loops.push(circle(-70, -10, between(8, 16), true))
  if (profileProblems(loops.map(loopFromVertices)).length > 0) return null
  const tilt = () => Math.round(between(-kind.steepest, kind.steepest) * 10) / 10
  const facets = (): FacetSpec[] => {
    const count = random() < 0.6 ? 1 : random() < 0.6 ? 2 : 3
    const tilts = Array.from({ length: count }, tilt)
    if (kind.cuttable) tilts.sort((a, b) => b - a)
    return tilts.map((own, i) => ({ depth: (thickness * (i + 1)) / count, tilt: own }))
  }
  return {
    plate: { thickness },
    datum: (['top', 'top', 'bottom', 'root'] as const)[Math.floor(4 * random())]!,
    loops,
    walls: loops.flatMap((loop, l) =>
      loop.flatMap((_, edge) => (random() < 0.8 ? [{ loop: l, edge, facets: facets() }] : [])),
    ),
    jet: {
      kerf: between(0.6, 1.4),
      taper: random() < 0.5 ? 0 : between(-0.3, 0.8),
      standoff: between(2, 5),
      nozzleDiameter: 7.14,
    },
    head: { mechanicalLimit: 60, workingLimit: random() < 0.5 ? null : between(35, 60) },
  }
}
