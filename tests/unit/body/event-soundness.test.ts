import { describe, expect, test } from 'vitest'
import { contourProblems } from '../../../shared/contours/check.ts'
import { contourAt } from '../../../shared/contours/contour.ts'
import { cornersOf } from '../../../shared/seams/corners.ts'
import { soundRange } from '../../../shared/events/range.ts'
import type { Body, Datum, Wall } from '../../../shared/walls/types.ts'
import type { ContourSegment } from '../../../shared/contours/types.ts'
import { segmentLength } from '../../../shared/geometry/segment.ts'
import { profileProblems } from '../../../shared/geometry/problems.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import type { ArcSegment, Vertex } from '../../../shared/geometry/types.ts'
import { circle, facets, plate, reversed, seeded, star } from '../../support/plates.ts'

/**
 * The event against a second method that knows nothing of motion: outlines at single depths, each checked for
 * edges that cross (`profileProblems`). Before the event every outline must be sound, just past it unsound.
 */
function randomBody(seed: number, arcs: boolean, datum: Datum): Body | null {
  const random = seeded(seed)
  const thickness = 10 + 40 * random()
  const bulged = (loop: Vertex[], share: number) =>
    loop.map((v) => (arcs && random() < share ? { ...v, bulge: 0.8 * (random() - 0.5) } : v))
  const loops = [bulged(star(random, 4 + Math.floor(9 * random()), 60, 100), 0.5)]
  if (random() < 0.5) loops.push(bulged(reversed(star(random, 3 + Math.floor(4 * random()), 15, 30)), 0.5))
  if (arcs && random() < 0.4) {
    // A tangent slot: two unlike walls make steps.
    loops.push(reversed([{ x: -8, y: 38 }, { x: 8, y: 38, bulge: 1 }, { x: 8, y: 46 }, { x: -8, y: 46, bulge: 1 }])) // prettier-ignore
  }
  if (arcs && random() < 0.3) loops.push(circle(-40, -5, 5, true))
  if (profileProblems(loops.map(loopFromVertices)).length > 0) return null
  const tilt = () => (random() - 0.5) * 100
  const wall = (): Wall =>
    random() < 0.3 ? facets([thickness * 0.4, tilt()], [thickness, tilt()]) : facets([thickness, tilt()])
  const walls = loops.map((loop) => loop.map(wall))
  return plate(thickness, loops, (l, e) => walls[l]![e]!, datum)
}

/** Contours whose slivers are thinner than the drawing's rounding cannot be judged; steps may have no length. */
function sound(body: Body, depth: number): boolean {
  const contour = contourAt(body, depth)
  const loops = contour.loops.map((loop) =>
    loop.filter((s: ContourSegment) => s.edge !== null || segmentLength(s) > 0),
  )
  return contourProblems({ depth, loops }).length === 0 && edgesKeepTheirWay(body, loops)
}

/** No line runs against its drawing, no radius is used up, and arcs still meet their neighbours. */
function edgesKeepTheirWay(body: Body, loops: readonly (readonly ContourSegment[])[]): boolean {
  const smooth = body.loops.map((loop) => loop.map(() => false))
  for (const { loop, vertex, kind } of cornersOf(body)) smooth[loop]![vertex] = kind === 'smooth'
  return loops.every((loop, l) =>
    loop.every((s) => {
      if (s.edge === null) return true
      const ends = [smooth[l]![s.edge]!, smooth[l]![(s.edge + 1) % body.loops[l]!.length]!]
      const drawn = body.loops[l]![s.edge]!
      if (s.kind === 'arc')
        return drawn.kind === 'arc' && s.sweep * drawn.sweep > 0 && s.radius > 0 && endsOnCircle(s, ends)
      const along =
        (s.to.x - s.from.x) * (drawn.to.x - drawn.from.x) + (s.to.y - s.from.y) * (drawn.to.y - drawn.from.y)
      return along > 0
    }),
  )
}

/** Nearly tangent corners leave their circle by at most (offset × turn)² / 8r: here 60 mm, 10′ and r of 40 mm or more. */
const OFF_CIRCLE = 1e-4

function endsOnCircle({ from, to, centre, radius }: ArcSegment, smooth: readonly boolean[]): boolean {
  return [from, to].every((end, i) => {
    const off = Math.abs(Math.hypot(end.x - centre.x, end.y - centre.y) - radius)
    return off < (smooth[i] ? OFF_CIRCLE : 1e-7)
  })
}

const cases = (['top', 'bottom'] as const).flatMap((datum) => [
  { datum, arcs: false },
  { datum, arcs: true },
])

describe('the plain contour is right up to the event and wrong just past it', () => {
  test.each(cases)('datum $datum, arcs $arcs', ({ datum, arcs }) => {
    let judged = 0
    let withEvent = 0
    for (let seed = 1; seed <= 120; seed++) {
      const body = randomBody(seed + (arcs ? 10_000 : 0), arcs, datum)
      if (!body) continue
      judged++
      const { from, to, event } = soundRange(body)
      const inside = (share: number) =>
        datum === 'top' ? to - share * (to - from) : from + share * (to - from)
      for (const share of [1e-6, 0.01, 0.1, 0.25, 0.5, 0.75, 0.9, 0.99]) {
        expect(sound(body, inside(share)), `seed ${seed}: sound at share ${share} from the event`).toBe(true)
      }
      if (!event) continue
      withEvent++
      const past = datum === 'top' ? to + 1e-3 : from - 1e-3
      if (past <= 0 || past >= body.thickness) continue
      expect(sound(body, past), `seed ${seed}: unsound past ${JSON.stringify(event)}`).toBe(false)
    }
    expect(judged).toBeGreaterThan(60)
    expect(withEvent).toBeGreaterThan(30)
  })
})
