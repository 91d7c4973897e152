import { describe, expect, test } from 'vitest'
import type { Body } from '../../../shared/walls/types.ts'
import { frameOf } from '../../../shared/contours/frame.ts'
import { holdsOf } from '../../../shared/way-out/holds.ts'
import { nearest } from '../../../shared/way-out/nearest.ts'
import { mostBrokenOf } from '../../../shared/way-out/way-out.ts'
import { reliefProblems } from '../../../shared/way-out/relief/check.ts'
import { reliefCuts } from '../../../shared/way-out/relief/relief.ts'
import type { ReliefPlan, ReliefSizes } from '../../../shared/way-out/relief/types.ts'
import { fewestAtLeast, fewestRuns, longestRuns, treesOf } from '../../../shared/way-out/relief/runs.ts'
import { circle, DEGREE, facets, plate, rectangle, regular, seeded, star } from '../../support/plates.ts'

const T = 20
const sizes: ReliefSizes = { kerf: 1, ring: 15, moat: 15 }
/** Narrow in the middle, wide at both faces: 20° each way. */
const waist = facets([T / 2, -20], [T, 20])

function planned(body: Body, loop = 0, given = sizes): ReliefPlan {
  const plan = reliefCuts(body, loop, given)
  if (!plan.ok) throw new Error(plan.code)
  expect(reliefProblems(body, plan, given, loop === 0 ? given.moat : Infinity)).toEqual([])
  return plan
}

describe('relief round a part', () => {
  test('a square with a waist: two corners are enough, one line never is', () => {
    const plan = planned(plate(T, [rectangle(0, 0, 100, 100)], () => waist))
    expect(plan.lines).toHaveLength(2)
    expect(plan.proved).toBe(true)
    expect(plan.lines.every((line) => line.clear && line.fraction === 0)).toBe(true)
    // Two opposite corners: each block touches two sides and leaves along the diagonal between them.
    expect(Math.abs(plan.lines[0]!.edge - plan.lines[1]!.edge)).toBe(2)
    // tan 20° less the kerf's 1/(20 cos 20°) for each of two walls at right angles.
    const slope = Math.SQRT2 * (Math.tan(20 * DEGREE) - 1 / (T * Math.cos(20 * DEGREE)))
    for (const { direction } of plan.blocks) expect(Math.tan(direction.angle)).toBeCloseTo(slope, 9)
  })

  test('a line starts half a kerf off the wall where that stands out most, and tells the web it leaves', () => {
    const plan = planned(plate(T, [rectangle(0, 0, 100, 100)], () => waist))
    const line = plan.lines[0]!
    const corner = [0, 100]
    const off = Math.min(
      ...corner.flatMap((x) => corner.map((y) => Math.hypot(line.from.x - x, line.from.y - y))),
    )
    expect(off).toBeCloseTo(0.5 * Math.SQRT2, 9)
    // Along the diagonal the waist draws back √2 · 10 tan 20°; the wall's own kerf opens 1 mm of that.
    expect(line.web).toBeCloseTo(Math.SQRT2 * (T / 2) * Math.tan(20 * DEGREE) - 1, 9)
  })

  test('a narrow moat asks for more lines, and at last is refused with the width that it takes', () => {
    const body = plate(T, [rectangle(0, 0, 100, 100)], () => waist)
    const slope = Math.tan(20 * DEGREE) - 1 / (T * Math.cos(20 * DEGREE))
    const plan = planned(body, 0, { ...sizes, moat: T * slope * 1.01 })
    expect(plan.lines).toHaveLength(4)
    expect(plan.proved).toBe(true)
    const refused = reliefCuts(body, 0, { ...sizes, moat: T * slope * 0.99 })
    expect(refused).toMatchObject({ ok: false, code: 'moat-too-narrow' })
    expect(refused.ok ? null : refused.needed).toBeCloseTo(T * slope, 9)
  })

  test('a ring that leaves whole needs no line', () => {
    const plan = planned(plate(T, [rectangle(0, 0, 100, 100)], () => facets([T, 20])))
    expect(plan.lines).toHaveLength(0)
    expect(plan.proved).toBe(true)
    expect(plan.blocks).toHaveLength(1)
  })

  test('a disc: half of it is never free of its own two ends, so three lines, within its arcs', () => {
    const plan = planned(
      plate(T, [circle(0, 0, 50)], () => waist),
      0,
      { ...sizes, moat: 60 },
    )
    expect(plan.lines).toHaveLength(3)
    expect(plan.proved).toBe(true)
    for (const { from, to } of plan.lines) {
      expect(Math.hypot(from.x, from.y)).toBeCloseTo(50.5, 9)
      expect(Math.hypot(to.x, to.y)).toBeGreaterThan(50 + sizes.ring - 1e-9)
    }
  })

  test('plain polygons of any size, turned as they may be', () => {
    for (const n of [3, 4, 5, 8, 36]) {
      const plan = planned(
        plate(T, [regular(n, 80)], () => waist),
        0,
        { ...sizes, moat: 200 },
      )
      expect(plan.proved).toBe(true)
      expect(plan.lines.length).toBe(2)
    }
  })
})

describe('relief inside a hole', () => {
  const holed = (thickness: number) =>
    plate(thickness, [rectangle(-60, -60, 120, 120), circle(0, 0, 40, true)], (l) =>
      l === 0 ? facets([thickness, 0]) : facets([thickness / 2, 10], [thickness, -10]),
    )

  test('a round slug gets a core and lines from the wall towards its middle', () => {
    const plan = planned(holed(T), 1, { ...sizes, kerf: 0.5 })
    expect(plan.lines.length).toBeGreaterThanOrEqual(2)
    for (const { from, to, clear } of plan.lines) {
      expect(clear).toBe(true)
      expect(Math.hypot(to.x, to.y)).toBeLessThan(Math.hypot(from.x, from.y))
      // Hole of 40 mm that draws in to 40 − 10 tan 10°, less the ring.
      expect(Math.hypot(to.x, to.y)).toBeLessThan(40 - sizes.ring)
    }
  })

  test('a hole without room for a core is refused', () => {
    expect(reliefCuts(holed(T), 1, { ...sizes, ring: 45 })).toMatchObject({
      ok: false,
      code: 'slug-too-small',
    })
  })
})

/** Every way to place k lines at row ends, tried one after another; each run judged by a search over all its rows. */
function fewestByTrying(body: Body, flattest: number): number {
  const holds = holdsOf(frameOf(body), 0, -1, 0)
  const n = holds.count
  const allowed = (first: number, length: number) =>
    [holds.up, holds.down].some((bounds) => {
      const pick = (column: Float64Array) => Float64Array.from({ length }, (_, i) => column[(first + i) % n]!)
      const run = {
        count: length,
        ax: pick(holds.ax),
        ay: pick(holds.ay),
        bx: pick(holds.bx),
        by: pick(holds.by),
        round: new Uint8Array(length),
        edge: new Int32Array(length),
        up: pick(holds.up),
        down: pick(holds.down),
      }
      return nearest(mostBrokenOf(run, pick(bounds)), flattest).out
    })
  if (allowed(0, n)) return 1
  let fewest = Infinity
  for (let set = 1; set < 2 ** n; set++) {
    const cuts = Array.from({ length: n }, (_, i) => i).filter((i) => set & (1 << i))
    if (cuts.length < 2 || cuts.length >= fewest) continue
    const works = cuts.every((cut, k) => {
      const next = cuts[(k + 1) % cuts.length]!
      return allowed(cut, ((next - cut + n - 1) % n) + 1)
    })
    if (works) fewest = cuts.length
  }
  return fewest
}

test('the fewest runs, against every division there is; 60 stars of up to nine sides', () => {
  const counts = new Set<number>()
  for (let seed = 1; seed <= 60; seed++) {
    const random = seeded(seed)
    const loop = star(random, 5 + (seed % 5), 40, 100)
    const walls = loop.map(() => {
      const tilt = 20 + 15 * random()
      return facets([T / 2, -tilt], [T, tilt])
    })
    const body = plate(T, [loop], (_, e) => walls[e]!)
    const holds = holdsOf(frameOf(body), 0, -1, 0)
    const flattest = 0.71 + 0.4 * random()
    const lengths = longestRuns(treesOf(holds), flattest)
    if (lengths.includes(0)) continue
    const { runs } = fewestRuns(lengths)
    expect(runs).toBe(fewestByTrying(body, flattest))
    expect(fewestAtLeast(lengths, holds.round)).toBe(runs)
    counts.add(runs)
  }
  expect(counts.size).toBeGreaterThan(2)
})

test('100 stars with waists and arcs: every plan found stands up to the checker', () => {
  let found = 0
  let proved = 0
  for (let seed = 1; seed <= 100; seed++) {
    const random = seeded(seed)
    const loop = star(random, 4 + (seed % 7), 60, 100).map((v) =>
      random() < 0.3 ? { ...v, bulge: 0.4 * random() - 0.1 } : v,
    )
    const walls = loop.map(() => facets([T / 2, -15 * random()], [T, 15 * random()]))
    const plan = reliefCuts(
      plate(T, [loop], (_, e) => walls[e]!),
      0,
      { kerf: 0.5, ring: 10, moat: 20 },
    )
    if (!plan.ok) continue
    found++
    if (plan.proved) proved++
    expect(plan.lines.length).toBeGreaterThanOrEqual(plan.atLeast)
    expect(
      reliefProblems(
        plate(T, [loop], (_, e) => walls[e]!),
        plan,
        { kerf: 0.5, ring: 10, moat: 20 },
        20,
      ),
    ).toEqual([])
  }
  expect(found).toBeGreaterThan(90)
  expect(proved).toBeGreaterThan(60)
})
