import { describe, expect, test } from 'vitest'
import { contourAt } from '../../../shared/contours/contour.ts'
import { contourProblems } from '../../../shared/contours/check.ts'
import type { ContourSegment } from '../../../shared/contours/types.ts'
import { cornersOf } from '../../../shared/seams/corners.ts'
import { offsetAt } from '../../../shared/walls/datum.ts'
import { soundRange } from '../../../shared/events/range.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import { profileProblems } from '../../../shared/geometry/problems.ts'
import { segmentLength } from '../../../shared/geometry/segment.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'
import type { Body, Datum, Wall } from '../../../shared/walls/types.ts'
import { DEGREE, circle, plate, reversed, seeded, star } from '../../support/plates.ts'

/**
 * Events of blended walls against a second method that knows nothing of motion: outlines at single depths, each
 * checked for edges that cross. Before the event every outline must be sound, just past it unsound.
 */
function randomBody(seed: number, arcs: boolean, datum: Datum): Body | null {
  const random = seeded(seed)
  const thickness = 10 + 40 * random()
  const bulged = (loop: Vertex[]) =>
    loop.map((v) => (arcs && random() < 0.4 ? { ...v, bulge: 0.8 * (random() - 0.5) } : v))
  const loops = [bulged(star(random, 4 + Math.floor(9 * random()), 60, 100))]
  if (random() < 0.5) loops.push(bulged(reversed(star(random, 3 + Math.floor(4 * random()), 15, 30))))
  if (profileProblems(loops.map(loopFromVertices)).length > 0) return null
  const tilt = () => (random() - 0.5) * 100 * DEGREE
  const facet = (depth: number) =>
    random() < 0.6 ? { depth, tilt: tilt(), endTilt: tilt() } : { depth, tilt: tilt() }
  const wall = (): Wall => ({
    facets: random() < 0.3 ? [facet(thickness * 0.4), facet(thickness)] : [facet(thickness)],
  })
  const walls = loops.map((loop) => loop.map(wall))
  return plate(thickness, loops, (l, e) => walls[l]![e]!, datum)
}

/** What the events themselves promise on arcs met at an angle is 0.02 mm; a grazing contact tells it in depth. */
const ARC_MARGIN = 0.05
const LINE_MARGIN = 1e-6

/** No edges cross, no line or arc runs against its drawing, no radius is used up, and arcs still meet their neighbours. */
function sound(body: Body, depth: number, tolerance = 1e-4): boolean {
  const contour = contourAt(body, depth, tolerance)
  const loops = contour.loops.map((loop) =>
    loop.filter((s: ContourSegment) => s.edge !== null || segmentLength(s) > 0),
  )
  return contourProblems({ depth, loops }).length === 0 && edgesKeepTheirWay(body, loops, depth)
}

function edgesKeepTheirWay(
  body: Body,
  loops: readonly (readonly ContourSegment[])[],
  depth: number,
): boolean {
  const smooth = body.loops.map((loop) => loop.map(() => false))
  for (const { loop, vertex, kind } of cornersOf(body)) smooth[loop]![vertex] = kind === 'smooth'
  return body.loops.every((loop, l) =>
    loop.every((drawn, edge) => {
      const own = loops[l]!.filter((s) => s.edge === edge)
      const from = own[0]!.from
      const to = own.at(-1)!.to
      if (drawn.kind === 'line') {
        return (
          (to.x - from.x) * (drawn.to.x - drawn.from.x) + (to.y - from.y) * (drawn.to.y - drawn.from.y) > 0
        )
      }
      const { centre, radius, sweep } = drawn
      const round = own.reduce((sum, s) => {
        const [ax, ay] = [s.from.x - centre.x, s.from.y - centre.y]
        const [bx, by] = [s.to.x - centre.x, s.to.y - centre.y]
        return (
          sum +
          (own.length > 1 || s.kind === 'line' ? Math.atan2(ax * by - ay * bx, ax * bx + ay * by) : s.sweep)
        )
      }, 0)
      if (round * sweep <= 0) return false
      return ([from, to] as const).every(({ x, y }, i) => {
        const own = radius + Math.sign(sweep) * offsetAt(body, l, edge, depth, i === 0 ? 'start' : 'end')
        const off = Math.abs(Math.hypot(x - centre.x, y - centre.y) - own)
        return own > 0 && off < (smooth[l]![(edge + i) % loop.length]! ? 1e-4 : 1e-7)
      })
    }),
  )
}

describe('the plain contour is right up to the event and wrong just past it', () => {
  test.each([
    { datum: 'top', arcs: false, first: 1, seeds: 150 },
    { datum: 'bottom', arcs: false, first: 1, seeds: 150 },
    { datum: 'top', arcs: true, first: 28, seeds: 24 },
    { datum: 'bottom', arcs: true, first: 28, seeds: 24 },
  ] as const)('datum $datum, arcs $arcs', ({ datum, arcs, first, seeds }) => {
    const margin = arcs ? ARC_MARGIN : LINE_MARGIN
    let judged = 0
    let withEvent = 0
    for (let seed = first; seed < first + seeds; seed++) {
      const body = randomBody(seed + (arcs ? 10_000 : 0), arcs, datum)
      if (!body) continue
      judged++
      const { from, to, event } = soundRange(body)
      for (const share of [0, 0.01, 0.1, 0.25, 0.5, 0.75, 0.9]) {
        const way = margin + share * (to - from)
        const depth = datum === 'top' ? to - way : from + way
        if (depth < from || depth > to) continue
        expect(
          sound(body, depth),
          `seed ${seed}: sound at share ${share} from ${JSON.stringify(event)}`,
        ).toBe(true)
      }
      if (!event) continue
      withEvent++
      const past = datum === 'top' ? to + margin + 0.1 : from - margin - 0.1
      if (past < 0 || past > body.thickness) continue
      expect(sound(body, past, 1e-6), `seed ${seed}: unsound past ${JSON.stringify(event)}`).toBe(false)
    }
    expect(judged).toBeGreaterThan(seeds / 2)
    expect(withEvent).toBeGreaterThan(seeds / 3)
  })
})

describe('events of blends by hand', () => {
  test('a wall that turns folds onto its neighbour, and is the one that ends', () => {
    // The right side's lower end comes in by d, its upper end stands: it leans to the left, and meets nothing.
    const blended = (tilt: number, endTilt: number): Wall => ({
      facets: [{ depth: 30, tilt: tilt * DEGREE, endTilt: endTilt * DEGREE }],
    })
    const square: Wall = { facets: [{ depth: 30, tilt: 0 }] }
    const tri = [{ x: 0, y: 0 }, { x: 20, y: 0 }, { x: 0, y: 40 }] // prettier-ignore
    // Bottom edge: its right corner slides in along nothing but the slanted side's drawn line, at tan 45° · d.
    const body = plate(30, [tri], (_, e) => (e === 1 ? blended(-45, 0) : square))
    // Offset −d at the start of a line of slope −2: the corner on y = 0 comes to x = 20 − d·√5/2, and 0 at d = 8√5.
    const { event } = soundRange(body)
    expect(event?.depth).toBeCloseTo(8 * Math.sqrt(5), 9)
    expect(event?.kind).toBe('vanish')
    expect([event?.at.x, event?.at.y].map((v) => Math.abs(v!) < 1e-6)).toEqual([true, true])
  })

  test('a blended disc ends where the narrow end of its radius is used up', () => {
    const half = (tilt: number, endTilt: number): Wall => ({
      facets: [{ depth: 50, tilt: tilt * DEGREE, endTilt: endTilt * DEGREE }],
    })
    const body = plate(50, [circle(3, -2, 20)], (_, e) => (e === 0 ? half(-10, -45) : half(-45, -10)))
    const { event } = soundRange(body)
    expect(event?.kind).toBe('vanish')
    expect(event?.depth).toBeCloseTo(20, 9)
    expect([event?.at.x, event?.at.y]).toEqual([3, -2])
  })
})
