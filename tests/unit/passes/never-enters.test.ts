import { expect, it } from 'vitest'
import { contourAt } from '../../../shared/contours/contour.ts'
import { soundRange } from '../../../shared/events/range.ts'
import { distanceToSegment, pointInProfile } from '../../../shared/geometry/inside.ts'
import { jetAt } from '../../../shared/passes/jet-at.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { CornerMove, LeanRefusal, MoveKind, type Jet, type Passes } from '../../../shared/passes/types.ts'
import type { Body } from '../../../shared/walls/types.ts'
import { circle, DEGREE, facets, plate, rectangle, regular, seeded, star } from '../../support/plates.ts'

/** How far any jet of the passes enters the part, mm: the rim of the cone is sampled at depths along every move. */
function deepestEntry(body: Body, jet: Jet, { path }: Passes): number {
  const depths = [0, 0.3, 0.7, 1].map((part) => part * body.thickness)
  const contours = depths.map((depth) => contourAt(body, depth).loops)
  let deepest = 0
  for (let i = 0; i < path.count; i++) {
    if (path.move[i] === MoveKind.end) continue
    for (const part of [0, 0.15, 0.5, 0.85, 1]) {
      const { x, y, p, q } = jetAt(path, i, part)
      const length = Math.sqrt(1 + p * p + q * q)
      for (const [k, depth] of depths.entries()) {
        for (let a = 0; a < 16; a++) {
          const [ex, ey] = [Math.cos((a * Math.PI) / 8), Math.sin((a * Math.PI) / 8)]
          const along = (ex * p + ey * q) / length
          const half = jet.kerf / 2 - depth * length * Math.tan(jet.taper)
          const rim = half / (Math.sqrt(1 - along * along) + along * Math.tan(jet.taper))
          const at = { x: x + depth * p + rim * ex, y: y + depth * q + rim * ey }
          if (!pointInProfile(contours[k]!, at)) continue
          const entry = Math.min(...contours[k]!.flat().map((segment) => distanceToSegment(segment, at)))
          deepest = Math.max(deepest, entry)
        }
      }
    }
  }
  return deepest
}

it('no jet enters the part: leads, leans, run outs, seams, bevels and roots', () => {
  const random = seeded(23)
  const jet = { kerf: 0.9, taper: 0.7 * DEGREE }
  let checked = 0
  for (let round = 0; round < 4; round++) {
    const tilts = Array.from({ length: 7 }, () => [30 * random(), -25 * random()] as const)
    const body = plate(
      8,
      [star(random, 7, 60, 110), circle(0, 0, 16, true), rectangle(26, -5, 14, 9).reverse()],
      (l, e) =>
        l === 1
          ? facets([8, 12])
          : l === 0 && e % 3 > 0
            ? facets([3, tilts[e]![0]], [5, 0], [8, tilts[e]![1]])
            : facets([8, e % 2 === 0 ? 0 : 5]),
    )
    if (soundRange(body).event) continue
    checked++
    for (const limit of [null, 20 * DEGREE]) {
      const passes = passesOf(body, jet, { tilt: limit })
      const told = passes.problems.map(({ code }) => code)
      if (told.includes('no-room-to-pierce')) continue
      expect(deepestEntry(body, jet, passes)).toBeLessThan(1e-6)
    }
  }
  expect(checked).toBeGreaterThan(2)
})

it('nor with the widening jet of a slow cut', () => {
  const jet = { kerf: 1, taper: -0.4 * DEGREE }
  const body = plate(10, [regular(5, 60)], () => facets([10, 20]))
  expect(deepestEntry(body, jet, passesOf(body, jet, { tilt: null }))).toBeLessThan(1e-6)
})

it('runs out where an arc bends the seam, and tells it where that cannot be', () => {
  const jet = { kerf: 1, taper: 0 }
  const arcs = (bulge: number, tilt: number) =>
    plate(10, [regular(5, 60).map((v, i) => (i === 2 ? { ...v, bulge } : v))], () => facets([10, tilt]))
  const convex = passesOf(arcs(0.2, 25), jet, { tilt: null })
  expect([convex.leanRefusals[2], convex.leanRefusals[3]]).toEqual([LeanRefusal.bent, LeanRefusal.bent])
  expect([convex.cornerMoves[2], convex.cornerMoves[3]]).toEqual([CornerMove.runOut, CornerMove.runOut])
  expect(deepestEntry(arcs(0.2, 25), jet, convex)).toBeLessThan(1e-6)
  // A bay so deep that its ends are concave corners.
  const bay = plate(
    10,
    [
      [
        { x: 0, y: 0 },
        { x: 90, y: 0 },
        { x: 90, y: 60 },
        { x: 60, y: 60, bulge: 0.3 },
        { x: 30, y: 60 },
        { x: 0, y: 60 },
      ],
    ],
    () => facets([10, 25]),
  )
  const told = passesOf(bay, jet, { tilt: null }).problems
  expect(told.map(({ code, at }) => [code, at])).toEqual([
    ['bent-seam', 3],
    ['bent-seam', 4],
  ])
})
