import { expect, test } from 'vitest'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'
import type { Body, Facet } from '../../../shared/walls/types.ts'
import { wayOutProblems } from '../../../shared/way-out/check.ts'
import type { PieceWayOut } from '../../../shared/way-out/types.ts'
import { wayOut } from '../../../shared/way-out/way-out.ts'
import { reversed, seeded, star } from '../../support/plates.ts'

/** Turning, mirroring, scaling and turning over a plate change the answer only as they must. 120 seeded plates. */

interface Plan {
  readonly thickness: number
  readonly loops: readonly (readonly Vertex[])[]
  readonly facets: readonly (readonly (readonly Facet[])[])[]
}

function randomPlan(seed: number): Plan {
  const random = seeded(seed)
  const thickness = 10 + 30 * random()
  const bulged = (loop: Vertex[], sign: number) =>
    loop.map((v) => (random() < 0.3 ? { ...v, bulge: sign * 0.3 * random() } : v))
  const loops = [
    bulged(star(random, 3 + Math.floor(8 * random()), 60, 100), 1),
    reversed(bulged(star(random, 3 + Math.floor(4 * random()), 10, 25), 1)),
  ]
  const sheared = seed % 3 === 0 ? 0 : 1
  const lean = { x: sheared * (random() - 0.5), y: sheared * (random() - 0.5) }
  const spread = 0.4 * random()
  const bias = seed % 2 === 0 ? 0.8 : 0.2
  return {
    thickness,
    loops,
    facets: loops.map((loop) => leaning(loop, lean, spread, bias, thickness, random)),
  }
}

/** Walls of a sheared plate, each off by up to `spread`, some in two facets: a mix of all four verdicts. */
function leaning(
  loop: readonly Vertex[],
  lean: { x: number; y: number },
  spread: number,
  bias: number,
  thickness: number,
  random: () => number,
): Facet[][] {
  return loop.map((v, i) => {
    const w = loop[(i + 1) % loop.length]!
    const length = Math.hypot(w.x - v.x, w.y - v.y)
    const slope = ((w.y - v.y) * lean.x - (w.x - v.x) * lean.y) / length
    const tilt = () => Math.atan(-slope + spread * (random() - bias))
    return random() < 0.2
      ? [
          { depth: thickness / 2, tilt: tilt() },
          { depth: thickness, tilt: tilt() },
        ]
      : [{ depth: thickness, tilt: tilt() }]
  })
}

function bodyOf({ thickness, loops, facets }: Plan): Body {
  const walls = facets.map((loop) => loop.map((wall) => ({ facets: wall })))
  return { thickness, datum: 'top', loops: loops.map(loopFromVertices), walls }
}

const turned = (plan: Plan, by: number, scale = 1): Plan => ({
  thickness: plan.thickness * scale,
  loops: plan.loops.map((loop) =>
    loop.map((v) => ({
      ...v,
      x: scale * (v.x * Math.cos(by) - v.y * Math.sin(by)),
      y: scale * (v.x * Math.sin(by) + v.y * Math.cos(by)),
    })),
  ),
  facets: plan.facets.map((loop) =>
    loop.map((wall) => wall.map((facet) => ({ ...facet, depth: facet.depth * scale }))),
  ),
})

/** Mirrored in the Y axis; `reversed` keeps the material on the left, edge i becomes edge n − 1 − i. */
const mirrored = (plan: Plan): Plan => ({
  ...plan,
  loops: plan.loops.map((loop) =>
    reversed(loop).map(({ x, y, bulge }) => ({
      x: -x,
      y,
      ...(bulge === undefined ? {} : { bulge: -bulge }),
    })),
  ),
  facets: plan.facets.map((loop) => [...loop].reverse()),
})

/** Top and bottom swapped, the outline left as it is: every tilt changes sign, the facets their order. */
const turnedOver = (plan: Plan): Plan => ({
  ...plan,
  facets: plan.facets.map((loop) =>
    loop.map((wall) =>
      [...wall].reverse().map((facet, i) => ({
        depth: i === wall.length - 1 ? plan.thickness : plan.thickness - wall[wall.length - 2 - i]!.depth,
        tilt: -facet.tilt,
      })),
    ),
  ),
})

function ways(plan: Plan, kerf: number): PieceWayOut[] {
  const body = bodyOf(plan)
  const { part, slugs } = wayOut(body, kerf)
  for (const piece of [part, ...slugs]) expect(wayOutProblems(body, kerf, piece)).toEqual([])
  return [part, ...slugs]
}

test('120 plates, turned, mirrored, scaled and turned over', () => {
  const verdicts = new Map<string, number>()
  for (let seed = 1; seed <= 120; seed++) {
    const plan = randomPlan(seed)
    const kerf = 1
    const here = ways(plan, kerf)
    const pairs: [PieceWayOut[], (x: number, y: number) => [number, number]][] = [
      [
        ways(turned(plan, 1.234), kerf),
        (x, y) => [x * Math.cos(1.234) - y * Math.sin(1.234), x * Math.sin(1.234) + y * Math.cos(1.234)],
      ],
      [ways(turned(plan, 0, 7), kerf * 7), (x, y) => [x, y]],
      [ways(mirrored(plan), kerf), (x, y) => [-x, y]],
    ]
    for (const [there, move] of pairs) {
      for (const [i, piece] of here.entries()) {
        for (const key of ['free', 'withinKerf'] as const) {
          verdicts.set(piece[key].verdict, (verdicts.get(piece[key].verdict) ?? 0) + 1)
          expect(there[i]![key].verdict).toBe(piece[key].verdict)
          const a = piece[key].direction
          const b = there[i]![key].direction
          if (!a || !b) continue
          const [x, y] = move(a.x, a.y)
          expect(Math.hypot(b.x - x, b.y - y, b.z - a.z)).toBeLessThan(1e-8)
        }
      }
    }
    for (const [i, { free }] of ways(turnedOver(plan), 0).entries()) {
      const other = here[i]!.free
      // Straight both ways is told as a lift either way up; everything else swaps up and down.
      if (other.direction?.heading === null && free.verdict === other.verdict) continue
      expect(free.direction?.angle ?? null).toEqual(
        other.direction ? expect.closeTo(other.direction.angle, 9) : null,
      )
      if (free.direction && other.direction) expect(free.direction.z * other.direction.z).toBeLessThan(0)
    }
  }
  for (const verdict of ['lifts', 'drops', 'slides', 'trapped']) {
    expect(verdicts.get(verdict) ?? 0).toBeGreaterThan(20)
  }
})
