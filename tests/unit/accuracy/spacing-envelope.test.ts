import { describe, expect, it } from 'vitest'
import { envelopeFaults } from '../../../shared/accuracy/check.ts'
import { furthestOutside, hullOfPoints, outerHull } from '../../../shared/accuracy/outer-hull.ts'
import { spacingEnvelope } from '../../../shared/accuracy/spacing-envelope.ts'
import { makeSpots, putSpot } from '../../../shared/accuracy/spots.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { CornerMove } from '../../../shared/passes/types.ts'
import { circle, DEGREE, facets, plate, rectangle, seeded, star } from '../../support/plates.ts'

const FREE = { tilt: null }
const pivots = (n: number) => new Map(Array.from({ length: n }, (_, g) => [g, CornerMove.pivot]))

describe('convex hulls', () => {
  it('hold every spot, and stand off by no more than the tangents’ corners', () => {
    const random = seeded(5)
    for (let round = 0; round < 40; round++) {
      const spots = makeSpots(8)
      for (let k = 0; k < 60; k++)
        putSpot(
          spots,
          0,
          100 * random(),
          40 * random(),
          random(),
          2 * random() - 1,
          2 * random() - 1,
          0.1 * random(),
        )
      const { x, y } = outerHull(spots, 32)
      for (let k = 0; k < 90; k++) {
        const [ex, ey] = [Math.cos(k * 4 * DEGREE), Math.sin(k * 4 * DEGREE)]
        let [of, within] = [-Infinity, -Infinity]
        x.forEach((px, i) => (of = Math.max(of, px * ex + y[i]! * ey)))
        for (let i = 0; i < spots.count; i++) {
          const lean = spots.p[i]! * ex + spots.q[i]! * ey
          const reach =
            spots.x[i]! * ex + spots.y[i]! * ey + spots.width[i]! * Math.hypot(1, lean) + spots.pad[i]!
          within = Math.max(within, reach)
        }
        expect(of).toBeGreaterThan(within - 1e-10)
        // Flattest spot: radius of curvature up to 1·(1 + 2) + 0.1.
        expect(of).toBeLessThan(within + 3.1 * (1 / Math.cos(Math.PI / 32) - 1) + 1e-10)
      }
    }
  })

  it('tell how far one stands outside the other', () => {
    const random = seeded(6)
    for (let round = 0; round < 60; round++) {
      const points = (n: number, size: number) => Array.from({ length: n }, () => size * (random() - 0.5))
      const inner = hullOfPoints(points(9, 60), points(9, 60))
      const xs = [...points(6, 120), ...inner.x]
      const ys = [...points(6, 120), ...inner.y]
      const outer = hullOfPoints(xs, ys)
      // Slowly: the greatest difference of reaches over many headings.
      let slowly = 0
      for (let k = 0; k < 4_000; k++) {
        const heading = (2 * Math.PI * k) / 4_000
        const reach = (hull: typeof inner) =>
          hull.x.reduce(
            (most, x, i) => Math.max(most, x * Math.cos(heading) + hull.y[i]! * Math.sin(heading)),
            -Infinity,
          )
        slowly = Math.max(slowly, reach(outer) - reach(inner))
      }
      const quick = furthestOutside(outer, inner)
      expect(quick).toBeGreaterThan(slowly - 1e-9)
      // Corners are at most 85 apart: that times half a step of heading.
      expect(quick - slowly).toBeLessThan((85 * Math.PI) / 4_000)
    }
  })
})

describe('spacing of a square plate', () => {
  const upright = plate(20, [rectangle(0, 0, 100, 60)], () => facets([20, 0]))

  it('is the part and its kerf when nothing leans or leads', () => {
    const { box, reach, furthest, hull, loops } = spacingEnvelope(upright, null, { kerf: 1, taper: 0 }, 10)
    expect(box).toEqual({ minX: -1, minY: -1, maxX: 101, maxY: 61 })
    expect(reach).toEqual({ left: 1, right: 1, near: 1, far: 1 })
    expect(hull.x.length).toBe(4)
    expect(furthest).toBeCloseTo(Math.SQRT2, 12)
    expect(loops).toEqual([])
  })

  it('grows below by the tilt, down to the depth asked for', () => {
    const body = plate(20, [rectangle(0, 0, 100, 60)], () => facets([20, 45]))
    const jet = { kerf: 1, taper: 0 }
    const { reach } = spacingEnvelope(body, null, jet, 10)
    expect(reach.left).toBeCloseTo(30 + Math.SQRT2, 12)
    // Pivots and no more, so the jet reaches as far on the sides without a lead.
    const passes = passesOf(body, jet, FREE, { corners: pivots(4) })
    const cut = spacingEnvelope(body, passes, jet, 10)
    const most = Math.min(...Object.values(cut.reach))
    expect(most).toBeGreaterThanOrEqual(30 + Math.SQRT2)
    expect(most).toBeLessThan(30 + Math.SQRT2 + cut.slack)
    expect(cut.loops.map(({ loop }) => loop)).toEqual([0])
    expect(cut.loops[0]!.box).toEqual(cut.box)
  })

  it('holds the lead, and the nozzle where it is told', () => {
    const jet = { kerf: 1, taper: 0 }
    const passes = passesOf(upright, jet, FREE)
    const at = (nozzle: object) => spacingEnvelope(upright, passes, { ...jet, ...nozzle }, 0)
    const { path } = passes
    const [plain, wide] = [at({}), at({ standoff: 3, nozzleDiameter: 7 })]
    const pierce = { x: path.x[0]!, y: path.y[0]! }
    expect(plain.box.minX).toBeLessThanOrEqual(pierce.x - 0.5)
    expect(plain.box.minY).toBeLessThanOrEqual(pierce.y - 0.5)
    expect(wide.box.minX).toBeCloseTo(plain.box.minX - 3, 12)
    expect(wide.box.maxY).toBeCloseTo(plain.box.maxY + 3, 12)
  })

  it('moves with the plate', () => {
    const jet = { kerf: 1, taper: 0.01 }
    const moved = plate(20, [rectangle(1000, -500, 100, 60)], () => facets([20, 0]))
    const [a, b] = [upright, moved].map((body) => spacingEnvelope(body, passesOf(body, jet, FREE), jet, 5))
    expect(b!.furthest).toBeCloseTo(a!.furthest, 8)
    expect(b!.reach.left).toBeCloseTo(a!.reach.left, 8)
  })
})

describe('random plates', () => {
  it('keep the whole jet inside, and no more room than the slack says', () => {
    const random = seeded(12)
    for (let round = 0; round < 12; round++) {
      const n = 4 + Math.floor(random() * 6)
      const tilts = Array.from({ length: n }, () => (random() - 0.4) * 80)
      const round_ = round % 3 === 0
      const outer = round_ ? circle(0, 0, 60) : star(random, n, 60, 110)
      const body = plate(10, [outer, circle(0, 0, 20, true)], (l, e) =>
        facets([10, l === 0 ? tilts[e]! : 30]),
      )
      const jet = { kerf: 1, taper: (random() - 0.4) * 2 * DEGREE }
      const moves = [CornerMove.lean, CornerMove.runOut, CornerMove.pivot]
      const corners = new Map(outer.map((_, g) => [g, moves[Math.floor(3 * random())]!]))
      const passes = passesOf(body, jet, FREE, round_ ? {} : { corners })
      if (!passes.passes.some(({ loop }) => loop === 0)) continue
      const envelope = spacingEnvelope(body, passes, jet, 6)
      // Samples of a half circle of up to 80 mm stand 5.6° apart: 80·(1 − cos 2.8°).
      expect(envelopeFaults(envelope, passes, jet, 16, 0.1)).toEqual([])
      expect(envelope.slack).toBeLessThan(0.35)
    }
  })
})
