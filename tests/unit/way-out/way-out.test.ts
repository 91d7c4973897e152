import { describe, expect, test } from 'vitest'
import type { Body, Wall } from '../../../shared/walls/types.ts'
import { wayOutProblems } from '../../../shared/way-out/check.ts'
import type { PieceWayOut, WayOut } from '../../../shared/way-out/types.ts'
import { wayOut } from '../../../shared/way-out/way-out.ts'
import { circle, DEGREE, facets, plate, rectangle, regular, reversed } from '../../support/plates.ts'

/** Plates whose way out is known by hand. Thickness 20 mm, kerf 1 mm unless said. */
const T = 20
const square = rectangle(0, 0, 100, 100)
const block = (wallFor: (edge: number) => Wall) => plate(T, [square], (_, e) => wallFor(e))
const tilted = (degrees: number) => facets([T, degrees])
const partOf = (body: Body, kerf = 1) => sound(body, kerf, wayOut(body, kerf).part)

function sound(body: Body, kerf: number, piece: PieceWayOut): PieceWayOut {
  expect(wayOutProblems(body, kerf, piece)).toEqual([])
  return piece
}

const degrees = (way: WayOut) => way.direction && way.direction.angle / DEGREE

describe('the part', () => {
  test('square walls: both ways, up is taken', () => {
    expect(partOf(block(() => tilted(0))).free.verdict).toBe('lifts')
  })

  test('wider below: drops; narrower below: lifts', () => {
    expect(partOf(block(() => tilted(30))).free.verdict).toBe('drops')
    expect(partOf(block(() => tilted(-30))).free.verdict).toBe('lifts')
  })

  test('sheared by 30°: slides at 30°, away from the wall that leans out', () => {
    // Edge 1 is the right side (outward normal +X), edge 3 the left.
    const way = partOf(block((e) => tilted(e === 1 ? 30 : e === 3 ? -30 : 0))).free
    expect(way.verdict).toBe('slides')
    expect(degrees(way)).toBeCloseTo(30, 9)
    expect(way.direction!.heading).toBeCloseTo(Math.PI, 9)
    expect(way.direction!.z).toBeGreaterThan(0)
  })

  test('sheared two ways at once: the slopes add up at right angles', () => {
    const way = partOf(block((e) => tilted([20, 30, -20, -30][e]!))).free
    const slope = Math.hypot(Math.tan(20 * DEGREE), Math.tan(30 * DEGREE))
    expect(way.direction!.angle).toBeCloseTo(Math.atan(slope), 12)
  })

  test('a slide that only goes down', () => {
    // Mostly wider below: only the side that leans in by 5° keeps it from dropping straight.
    const way = partOf(plate(T, [regular(3, 50)], (_, e) => tilted([40, 10, -5][e]!))).free
    expect(way.verdict).toBe('slides')
    expect(way.direction!.z).toBeLessThan(0)
  })

  test('a waist (wide at both faces) is trapped, and two walls that face each other prove it', () => {
    const way = partOf(block(() => facets([T / 2, -30], [T, 30]))).free
    expect(way.verdict).toBe('trapped')
    expect(way.trap!.up.map((hold) => hold.facet)).toEqual([1, 1])
    expect(way.trap!.down.map((hold) => hold.facet)).toEqual([0, 0])
    expect(Math.abs(way.trap!.up[0]!.edge - way.trap!.up[1]!.edge)).toBe(2)
  })

  test('a double bevel (wide in the middle) is trapped as well; on one side alone it slides', () => {
    const double = facets([T / 2, 30], [T, -30])
    expect(partOf(block(() => double)).free.verdict).toBe('trapped')
    const one = partOf(block((e) => (e === 1 ? double : tilted(0)))).free
    expect(one.verdict).toBe('trapped')
    const open = partOf(block((e) => (e === 1 ? double : e === 3 ? tilted(-30) : tilted(0)))).free
    expect(open.verdict).toBe('slides')
    expect(degrees(open)).toBeCloseTo(30, 9)
  })

  test('a triangle held by three walls', () => {
    const way = partOf(plate(T, [regular(3, 50)], () => facets([T / 2, -20], [T, 20]))).free
    expect(way.trap!.up).toHaveLength(3)
    for (const { weight } of way.trap!.up) expect(weight).toBeCloseTo(1 / 3, 9)
  })

  test('a blend counts with the worse of its two tilts, whichever way the part moves', () => {
    const blend = { facets: [{ depth: T, tilt: -10 * DEGREE, endTilt: 10 * DEGREE }] }
    expect(partOf(block((e) => (e === 1 ? blend : tilted(0)))).free.verdict).toBe('trapped')
    expect(partOf(block((e) => (e === 1 ? blend : tilted(-10)))).free.verdict).toBe('slides')
  })
})

describe('round edges', () => {
  const round = circle(0, 0, 30)

  test('a disc lifts, drops or is trapped like a polygon of ever so many sides', () => {
    expect(partOf(plate(T, [round], () => tilted(-15))).free.verdict).toBe('lifts')
    expect(partOf(plate(T, [round], () => tilted(15))).free.verdict).toBe('drops')
    expect(partOf(plate(T, [round], () => facets([10, -15], [T, 15]))).free.verdict).toBe('trapped')
  })

  test('a half disc whose flat leans out slides until the round wall stops it', () => {
    // Flat along X below (normal −Y), half circle above. The flat asks for y ≥ tan β; the half circle,
    // leaning in by γ, allows |(x, y)| ≤ tan γ above.
    const half = [
      { x: -30, y: 0 },
      { x: 30, y: 0, bulge: 1 },
    ]
    const lean = (flat: number, arc: number) =>
      partOf(plate(T, [half], (_, e) => tilted(e === 0 ? flat : -arc))).free
    expect(degrees(lean(19.9, 20))).toBeCloseTo(19.9, 9)
    const held = lean(20.1, 20)
    // Down, the half circle pushes the part below every side: only the flat's own way is left, and it is shut.
    expect(held.verdict).toBe('trapped')
    expect(held.trap!.up).toHaveLength(2)
  })

  test('a slit in an arc does not matter: halves and thirds of a circle say the same', () => {
    const thirds = [0, 1, 2].map((k) => ({
      x: 30 * Math.cos((k * 2 * Math.PI) / 3),
      y: 30 * Math.sin((k * 2 * Math.PI) / 3),
      bulge: Math.tan(Math.PI / 6),
    }))
    const wall = facets([10, -15], [T, 15])
    expect(partOf(plate(T, [thirds], () => wall)).free.verdict).toBe('trapped')
    expect(partOf(plate(T, [thirds], () => tilted(-15))).free.verdict).toBe('lifts')
  })
})

describe('slugs', () => {
  const ring = (outer: number, hole: Wall) =>
    plate(T, [square, reversed(regular(8, 20)).map(({ x, y }) => ({ x: x + 50, y: y + 50 }))], (l) =>
      l === 0 ? tilted(outer) : hole,
    )
  const slugOf = (body: Body) => sound(body, 1, wayOut(body, 1).slugs[0]!).free.verdict

  test('a hole that narrows with depth frees its slug upward, one that widens downward', () => {
    expect(slugOf(ring(0, tilted(10)))).toBe('lifts')
    expect(slugOf(ring(0, tilted(-10)))).toBe('drops')
    expect(slugOf(ring(0, facets([5, 10], [T, -10])))).toBe('trapped')
  })

  test('the part is held by its outer loop alone: a trapped slug travels with it', () => {
    const body = ring(-10, facets([5, 10], [T, -10]))
    expect(partOf(body).free.verdict).toBe('lifts')
  })
})

describe('kerf', () => {
  test('a kerf W gives each wall W/(t cos β): just enough, and just too little', () => {
    // Straight up past a wall that leans out by β: tan β ≤ W/(t cos β), that is t sin β ≤ W.
    const body = block(() => facets([T / 2, -2], [T, 2]))
    const need = T * Math.sin(2 * DEGREE)
    expect(partOf(body, need * 0.999).withinKerf.verdict).toBe('trapped')
    const way = partOf(body, need * 1.001)
    expect(way.free.verdict).toBe('trapped')
    expect(way.withinKerf.verdict).toBe('lifts')
  })
})
