import { bench, describe } from 'vitest'
import { contourAt } from '../../shared/contours/contour.ts'
import { cornersOf } from '../../shared/seams/corners.ts'
import { firstEvent } from '../../shared/events/event.ts'
import { volumeOf } from '../../shared/solid/volume.ts'
import { loopFromVertices } from '../../shared/geometry/bulge.ts'
import { profileProblems } from '../../shared/geometry/problems.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import { facets, seeded } from '../support/plates.ts'

/** A toothed outline of n edges, each of about the same length whatever n, walls from a seed. */
function gear(n: number): Vertex[] {
  return Array.from({ length: n }, (_, i) => {
    const radius = n * 0.8 + (i % 4 === 1 || i % 4 === 2 ? 2 : -2)
    const heading = (2 * Math.PI * i) / n
    return { x: radius * Math.cos(heading), y: radius * Math.sin(heading) }
  })
}

/** Read after the run, so that no result can be left out. */
export const seen: (number | null)[] = []

describe('a whole plate evaluated, read as ratios between the rows (20 times the edges should cost about 20 times)', () => {
  for (const n of [100, 500, 2000]) {
    const random = seeded(n)
    const walls = [Array.from({ length: n }, () => facets([1, 30 * (random() - 0.5)]))]
    const vertices = gear(n)
    bench(
      `${n} edges`,
      () => {
        const loops = [loopFromVertices(vertices)]
        const body = { thickness: 1, datum: 'top' as const, loops, walls }
        seen[0] = profileProblems(loops).length
        seen[1] = firstEvent(body)?.depth ?? null
        seen[2] = cornersOf(body).length + contourAt(body, 0).loops.length + contourAt(body, 1).loops.length
        seen[3] = volumeOf(body)
      },
      { warmupIterations: 5 },
    )
  }
})
