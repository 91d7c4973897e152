import { describe, expect, test } from 'vitest'
import { checkMesh } from '../../../shared/solid/check.ts'
import { contourProblems } from '../../../shared/contours/check.ts'
import { contourAt } from '../../../shared/contours/contour.ts'
import { cornersOf } from '../../../shared/seams/corners.ts'
import { firstEvent } from '../../../shared/events/event.ts'
import { meshOf } from '../../../shared/solid/mesh.ts'
import { soundRange } from '../../../shared/events/range.ts'
import { volumeOf } from '../../../shared/solid/volume.ts'
import type { Body, Datum, Wall } from '../../../shared/walls/types.ts'
import { segmentLength } from '../../../shared/geometry/segment.ts'
import { profileProblems } from '../../../shared/geometry/problems.ts'
import type { Point, Vertex } from '../../../shared/geometry/types.ts'
import { DEGREE, circle, facets, plate, rectangle, regular, reversed, seeded } from '../../support/plates.ts'

/** Shapes that real drawings hold: tangents missed by rounding, arcs drawn in parts, tiny edges. */

const t = 12
const tan = (degrees: number) => Math.tan(degrees * DEGREE)
const QUARTER = Math.tan(Math.PI / 8)

/** A plate with rounded corners whose arcs end `miss` mm short of their tangent points: a turn of miss / r. */
function rounded(miss: number, r = 5): Vertex[] {
  const [w, h] = [90, 150]
  return [
    { x: r, y: 0 },
    { x: w - r, y: 0, bulge: QUARTER },
    { x: w, y: r - miss },
    { x: w, y: h - r, bulge: QUARTER },
    { x: w - r, y: h + miss },
    { x: r, y: h, bulge: QUARTER },
    { x: 0, y: h - r },
    { x: 0, y: r, bulge: QUARTER },
  ]
}

describe('tangents missed by rounding', () => {
  test.each([0, 1e-4, 1e-3, 0.02])('a fillet %f mm off its tangent point ends nothing', (miss) => {
    const loop = rounded(miss)
    const body = plate(t, [loop], (_, e) => facets([t, [0, 0, 30, 15, 0, -20, 10, 0][e]!]))
    expect(cornersOf(body).map(({ kind }) => kind)).toEqual(loop.map(() => 'smooth'))
    // Only the fillet that shrinks could end it, and 12 mm at 20° takes 4.4 mm of its 5.
    expect(firstEvent(body)).toBeNull()
    const end = contourAt(body, t).loops[0]!.find(({ edge }) => edge === 2)!
    expect(end.from.x).toBeCloseTo(90 + t * tan(30), 3)
  })

  test('small fillets may miss by more, long arcs may not: a corner that is meant stays one', () => {
    const kinds = (miss: number, r: number) =>
      cornersOf(plate(t, [rounded(miss, r)], () => facets([t, 0]))).map(({ kind }) => kind)
    expect(kinds(0.006, 1)).toEqual(new Array(8).fill('smooth'))
    expect(kinds(0.1, 20)).not.toEqual(new Array(8).fill('smooth'))
  })
})

describe('an arc drawn in parts', () => {
  test('a corner riding along it past the other part is no contact, and quickly told', () => {
    // Three quarters of a circle of radius 30 in two arcs, closed by a chord that moves outward along the circle.
    const r = 30
    const part = Math.tan(((3 / 8) * 2 * Math.PI) / 4)
    const loop = [
      { x: r, y: 0, bulge: part },
      { x: r * Math.cos((3 * Math.PI) / 4), y: r * Math.sin((3 * Math.PI) / 4), bulge: part },
      { x: 0, y: -r },
    ]
    const body = plate(t, [loop], (_, e) => facets([t, e === 2 ? 20 : 0]))
    const start = performance.now()
    expect(firstEvent(body)).toBeNull()
    expect(performance.now() - start).toBeLessThan(500)
    // The chord stands r/√2 from the centre; it leaves the circle when it has gone the rest.
    const deep = plate(40, [loop], (_, e) => facets([40, e === 2 ? 20 : 0]))
    const event = firstEvent(deep)!
    expect(event).toMatchObject({ kind: 'vanish', loop: 0 })
    expect(event.depth).toBeCloseTo((r - r / Math.SQRT2) / tan(20), 9)
  })
})

/** A slot between two points, clockwise as a hole runs. */
function slot(x: number, y: number, length: number, width: number): Vertex[] {
  return reversed([
    { x, y },
    { x: x + length, y, bulge: 1 },
    { x: x + length, y: y + width },
    { x, y: y + width, bulge: 1 },
  ])
}

/** Round head and straight shank. */
function keyhole(x: number, y: number): Vertex[] {
  const half = Math.asin(3 / 8)
  const bulge = Math.tan((2 * Math.PI - 2 * half) / 4)
  const top = y + 8 * Math.cos(half)
  return reversed([
    { x: x + 3, y: top },
    { x: x + 3, y: y + 25 },
    { x: x - 3, y: y + 25 },
    { x: x - 3, y: top, bulge },
  ])
}

/** Teeth with round tips and roots. */
function gear(teeth: number, radius: number): Vertex[] {
  return regular(4 * teeth, radius).map(({ x, y }, i) => {
    const share = i % 4 < 2 ? 1 : 0.9
    return { x: share * x, y: share * y, bulge: i % 4 === 0 ? 0.2 : i % 4 === 2 ? -0.1 : 0 }
  })
}

/** `rounding`: how near to a corner a crossing is only the drawing's missed tangent, mm. */
const shapes: readonly (readonly [name: string, loops: readonly Vertex[][], rounding: number])[] = [
  ['rounded plate with slots', [rounded(0), slot(20, 40, 30, 9), slot(30, 90, 1, 14)], 0],
  ['fillets off by 1e-3 rad', [rounded(0.005), circle(45, 75, 20, true)], 0.02],
  ['fillets off by 2e-3 rad', [rounded(0.01), slot(30, 60, 20, 12)], 0.02],
  ['keyholes', [rectangle(0, 0, 120, 80), keyhole(30, 30), keyhole(80, 25)], 0],
  ['gear with a bore', [gear(16, 60), circle(0, 0, 20, true)], 0],
  ['tiny edges', [[{ x: 0, y: 0 }, { x: 80, y: 0 }, { x: 80, y: 59.99 }, { x: 79.99, y: 60 }, { x: 0, y: 60 }], circle(40, 30, 9, true)], 0], // prettier-ignore
  ['disc in four arcs', [[0, 1, 2, 3].map((k) => ({ x: 50 * Math.cos((k * Math.PI) / 2), y: 50 * Math.sin((k * Math.PI) / 2), bulge: QUARTER })), keyhole(0, 0)], 0], // prettier-ignore
]

/** Steps may have no length where their walls agree. */
function problemsAt(body: Body, depth: number, rounding: number) {
  const loops = contourAt(body, depth).loops.map((loop) =>
    loop.filter((s) => s.edge !== null || segmentLength(s) > 0),
  )
  const corners = loops.flat().map(({ from }) => from)
  const isRounding = (at: Point | null) =>
    at !== null && corners.some(({ x, y }) => Math.hypot(at.x - x, at.y - y) < rounding)
  return contourProblems({ depth, loops }).filter(({ at }) => !isRounding(at))
}

const RUNS = 24

describe('shapes of real drawings, whatever walls they get', () => {
  test.each(shapes)('%s', (_, loops, rounding) => {
    const random = seeded(loops.flat().length)
    const tilt = () => (random() < 0.5 ? -1 : 1) * (5 + 40 * random())
    let whole = 0
    let ended = 0
    for (let run = 0; run < RUNS; run++) {
      const thickness = [3, 12, 25][run % 3]!
      const datum = (['top', 'top', 'bottom'] as const satisfies Datum[])[Math.floor(random() * 3)]!
      const share = [0.1, 0.3, 1][Math.floor(random() * 3)]!
      const wall = (): Wall => {
        const own = tilt()
        if (random() > share) return facets([thickness, 0])
        return random() < 0.3
          ? facets([0.4 * thickness, own], [0.6 * thickness, 0], [thickness, -own])
          : facets([thickness, own])
      }
      const walls = loops.map((loop) => loop.map(wall))
      const body = plate(thickness, loops, (l, e) => walls[l]![e]!, datum)
      expect(profileProblems(body.loops)).toEqual([])
      const { from, to, event } = soundRange(body)
      // Nothing in these shapes is nearer than 0.01 mm, and no corner runs a hundred times as fast as its walls.
      expect(to - from, `run ${run}: ${JSON.stringify(event)}`).toBeGreaterThan(1e-4)
      for (const at of [1e-4, 0.5, 0.999]) {
        const depth = datum === 'bottom' ? from + at * (to - from) : to - at * (to - from)
        expect(
          problemsAt(body, depth, rounding),
          `run ${run} at share ${at} of ${JSON.stringify(event)}`,
        ).toEqual([])
      }
      const mesh = checkMesh(meshOf(body, 0.02)!)
      expect(mesh.unmatched).toBe(0)
      if (event) {
        ended++
      } else {
        whole++
        expect(Math.abs(mesh.volume / volumeOf(body)! - 1)).toBeLessThan(2e-3)
      }
    }
    expect(whole).toBeGreaterThan(0)
    expect(whole + ended).toBe(RUNS)
  })
})
