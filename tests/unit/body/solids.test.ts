import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { checkMesh } from '../../../shared/solid/check.ts'
import { contourArea } from '../../../shared/contours/check.ts'
import { contourAt } from '../../../shared/contours/contour.ts'
import { cornersOf } from '../../../shared/seams/corners.ts'
import { firstEvent } from '../../../shared/events/event.ts'
import { meshOf } from '../../../shared/solid/mesh.ts'
import { soundRange } from '../../../shared/events/range.ts'
import { volumeOf } from '../../../shared/solid/volume.ts'
import type { Body } from '../../../shared/walls/types.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'
import { DEGREE, circle, facets, plate, rectangle, reversed, seeded, star } from '../../support/plates.ts'

const tan = (degrees: number) => Math.tan(degrees * DEGREE)
const frustum = (h: number, a: number, b: number) => (Math.PI * h * (a * a + a * b + b * b)) / 3

describe('closed forms', () => {
  test('a disc is a frustum of a cone, a ring flange the difference of two (handbook formula, from memory)', () => {
    const disc = plate(12, [circle(5, -3, 40)], () => facets([12, 25]))
    expect(volumeOf(disc)! / frustum(12, 40, 40 + 12 * tan(25))).toBeCloseTo(1, 13)
    const flange = plate(20, [circle(0, 0, 120), circle(0, 0, 60, true)], (l) =>
      facets([20, l === 0 ? -30 : -20]),
    )
    const expected = frustum(20, 120, 120 - 20 * tan(30)) - frustum(20, 60, 60 + 20 * tan(20))
    expect(volumeOf(flange)! / expected).toBeCloseTo(1, 13)
  })

  test('a disc with a root face: cylinder and frustum', () => {
    const disc = plate(15, [circle(0, 0, 50)], () => facets([11, 30], [15, 0]), 'root')
    const narrow = 50 - 11 * tan(30)
    expect(volumeOf(disc)! / (frustum(11, narrow, 50) + 4 * Math.PI * 2500)).toBeCloseTo(1, 13)
  })

  test('prismatoid formula h/6 (A₁ + 4Aₘ + A₂) for one facet per wall (from memory)', () => {
    const body = plate(10, [rectangle(0, 0, 80, 50)], (_, e) => facets([10, [30, -20, 10, 0][e]!]))
    const area = (d: number) => contourArea(contourAt(body, d))
    expect(volumeOf(body)!).toBeCloseTo((10 / 6) * (area(0) + 4 * area(5) + area(10)), 8)
    // The rectangle itself: each side moves by its own tangent.
    expect(area(10)).toBeCloseTo((80 + 10 * (tan(-20) + tan(0))) * (50 + 10 * (tan(30) + tan(10))), 9)
  })

  test('an arc met at an angle: a half disc whose flat side moves, against the circular segment integrated by hand', () => {
    // Area below the chord at height h of a circle of radius r is r²acos(h/r) − h√(r² − h²); ∫ over h by parts (derived).
    const r = 30
    const half = [{ x: -r, y: 0 }, { x: r, y: 0, bulge: 1 }] // prettier-ignore
    const body = plate(10, [half], (_, e) => facets([10, e === 0 ? -45 : 0]))
    const primitive = (h: number) => {
      const root = Math.sqrt(r * r - h * h)
      return r * r * (h * Math.acos(h / r) - root) + root ** 3 / 3
    }
    expect(volumeOf(body)! / (primitive(10) - primitive(0))).toBeCloseTo(1, 12)
  })

  test('the drawing lies at its datum', () => {
    const wall = facets([6, 30], [9, 0], [14, -20])
    const drawn = rectangle(0, 0, 60, 40)
    const area = (datum: Body['datum'], d: number) =>
      contourArea(
        contourAt(
          plate(14, [drawn], () => wall, datum),
          d,
        ),
      )
    expect(area('top', 0)).toBe(2400)
    expect(area('bottom', 14)).toBe(2400)
    expect(area('root', 7.5)).toBeCloseTo(2400, 10)
  })
})

describe('the range in which the contour is right', () => {
  const strip = rectangle(0, 0, 100, 10)

  test('told upward from the bottom edge', () => {
    const body = plate(30, [strip], () => facets([30, 30]), 'bottom')
    const { from, to, event, empty } = soundRange(body)
    expect(event!.kind).toBe('vanish')
    expect(from).toBeCloseTo(30 - 5 / tan(30), 10)
    expect([to, empty]).toEqual([30, false])
    expect(volumeOf(body)).toBeNull()
    expect(meshOf(body, 0.1)!.depth).toBe(30)
  })

  test('empty where the top contour cannot be reached from the root', () => {
    const body = plate(30, [strip], () => facets([20, 30], [30, 0]), 'root')
    expect(soundRange(body)).toMatchObject({
      from: 0,
      to: 0,
      empty: true,
      event: { depth: 0, kind: 'vanish' },
    })
    expect(meshOf(body, 0.1)).toBeNull()
  })

  test('an event at the bottom itself is told, and the volume stands', () => {
    const body = plate(5 / tan(30), [strip], () => facets([5 / tan(30), -30]))
    expect(firstEvent(body)!.depth).toBeCloseTo(5 / tan(30), 10)
  })
})

/** Mixed plates with arcs, holes and several facets, down to their event. */
function mixedPlate(seed: number): Body {
  const random = seeded(seed)
  const outer = star(random, 5 + Math.floor(8 * random()), 70, 100).map((v): Vertex =>
    random() < 0.4 ? { ...v, bulge: 0.5 * (random() - 0.5) } : v,
  )
  const slot = reversed([{ x: -15, y: 20 }, { x: 15, y: 20, bulge: 1 }, { x: 15, y: 32 }, { x: -15, y: 32, bulge: 1 }]) // prettier-ignore
  const loops = [outer, slot, circle(10, -20, 14, true)]
  const walls = loops.map((loop) =>
    loop.map(() => facets([5, 60 * (random() - 0.5)], [12, 60 * (random() - 0.5)])),
  )
  return plate(12, loops, (l, e) => walls[l]![e]!)
}

test.each(Array.from({ length: 30 }, (_, i) => [i + 1]))(
  'mesh of mixed plate %i is closed and as large as the body',
  (seed) => {
    const body = mixedPlate(seed)
    const mesh = meshOf(body, 0.01)
    if (!mesh) return expect(soundRange(body).to).toBe(0)
    const check = checkMesh(mesh)
    expect(check.unmatched).toBe(0)
    const volume = volumeOf(body)
    if (volume === null) return expect(mesh.depth).toBe(soundRange(body).to)
    expect(check.repeated).toBe(0)
    // Chords cut off slivers of at most two thirds of the tolerance along arcs, on either side; seams likewise.
    const perimeter = contourAt(body, 0).loops.flat().length * 40
    expect(Math.abs(check.volume - volume)).toBeLessThan(0.01 * perimeter * body.thickness)
    expect(Math.abs(check.volume / volume - 1)).toBeLessThan(1e-3)
  },
)

describe('turned, mirrored, scaled, started elsewhere', () => {
  const samples = Array.from({ length: 12 }, (_, i) => {
    const random = seeded(300 + i)
    const outer = star(random, 5 + i, 60, 100)
    const hole = reversed(star(random, 4, 15, 30))
    const tilts = [outer, hole].map((loop) => loop.map(() => 100 * (random() - 0.5)))
    return { loops: [outer, hole], tilts }
  })
  const make = (loops: Vertex[][], tilts: number[][], thickness: number) =>
    plate(thickness, loops, (l, e) => facets([thickness, tilts[l]![e]!]))

  test('nothing but the names and places change', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: samples.length - 1 }),
        fc.double({ min: 0, max: 2 * Math.PI, noNaN: true }),
        fc.double({ min: 0.01, max: 50, noNaN: true }),
        fc.boolean(),
        fc.nat({ max: 20 }),
        (index, turn, scale, mirror, start) => {
          const { loops, tilts } = samples[index]!
          const thickness = 60
          const plain = make(loops, tilts, thickness)
          const [cos, sin] = [Math.cos(turn) * scale, Math.sin(turn) * scale]
          const move = ({ x, y }: Vertex) => ({ x: x * cos - y * sin, y: x * sin + y * cos })
          let moved = loops.map((loop) => loop.map(move))
          let movedTilts = tilts.map((list) => [...list])
          if (mirror) {
            // Mirrored in the x axis and walked the other way; edge i becomes edge n − 1 − i.
            moved = moved.map((loop) => reversed(loop.map(({ x, y }) => ({ x, y: -y }))))
            movedTilts = movedTilts.map((list) => [...list].reverse())
          }
          const shift = <T>(list: T[]) => [
            ...list.slice(start % list.length),
            ...list.slice(0, start % list.length),
          ]
          const other = make(moved.map(shift), movedTilts.map(shift), thickness * scale)
          const [a, b] = [firstEvent(plain), firstEvent(other)]
          expect(b?.kind).toBe(a?.kind)
          if (a && b) expect(b.depth / scale / a.depth).toBeCloseTo(1, 9)
          const depth = 0.9 * soundRange(plain).to
          const [areaA, areaB] = [
            contourArea(contourAt(plain, depth)),
            contourArea(contourAt(other, depth * scale)),
          ]
          expect(areaB / scale ** 2 / areaA).toBeCloseTo(1, 9)
          const seams = (body: Body) =>
            cornersOf(body)
              .map((c) => c.bands[0]!.seamTilt!)
              .sort((p, q) => p - q)
          const [seamsA, seamsB] = [seams(plain), seams(other)]
          for (const [i, seam] of seamsA.entries()) expect(seamsB[i]).toBeCloseTo(seam, 9)
        },
      ),
      { seed: 20261201, numRuns: 150 },
    )
  })
})
