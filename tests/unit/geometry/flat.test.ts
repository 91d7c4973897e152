import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { STRAIGHT_BULGE, loopFromVertices, verticesFromLoop } from '../../../shared/geometry/bulge.ts'
import { pointInProfile, sideOfLoop } from '../../../shared/geometry/inside.ts'
import {
  boundsOf,
  capFactor,
  isCounterClockwise,
  loopLength,
  reverseLoop,
  signedArea,
} from '../../../shared/geometry/loop.ts'
import { cornerInDrawing, edgeInDrawing, orientLoops } from '../../../shared/geometry/orient.ts'
import { profileProblems } from '../../../shared/geometry/problems.ts'
import { chordCount, sampleArc, sampleLoop } from '../../../shared/geometry/sample.ts'
import { endTangent, pointAt, startTangent } from '../../../shared/geometry/segment.ts'
import type { ArcSegment, Vertex } from '../../../shared/geometry/types.ts'
import { circle, rectangle, reversed, seeded, star } from '../../support/plates.ts'

const codes = (...loops: Vertex[][]) => profileProblems(loops.map(loopFromVertices)).map((p) => p.code)

describe('bulges', () => {
  test('a half circle and a three-quarter circle have the radius and centre of plane geometry', () => {
    const [half] = loopFromVertices([{ x: 0, y: 0, bulge: 1 }, { x: 10, y: 0 }]) as ArcSegment[] // prettier-ignore
    expect(half!.radius).toBe(5)
    expect(half!.centre).toEqual({ x: 5, y: 0 })
    expect(half!.sweep).toBeCloseTo(Math.PI, 15)
    const bulge = -Math.tan((3 * Math.PI) / 8)
    const [large] = loopFromVertices([{ x: 0, y: 0, bulge }, { x: 10, y: 0 }]) as ArcSegment[] // prettier-ignore
    expect(large!.radius).toBeCloseTo(5 * Math.SQRT2, 13)
    expect(large!.centre.x).toBeCloseTo(5, 13)
    expect(large!.centre.y).toBeCloseTo(5, 13) // clockwise and more than half: the centre is on the left
  })

  test('there and back, and tangents square to the radius', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -900, max: 900, noNaN: true }),
        fc.double({ min: -900, max: 900, noNaN: true }),
        fc.double({ min: -20, max: 20, noNaN: true }).filter((b) => Math.abs(b) > 1e-3),
        (x, y, bulge) => {
          fc.pre(Math.hypot(x - 1, y - 2) > 1)
          const loop = loopFromVertices([{ x: 1, y: 2, bulge }, { x, y }]) // prettier-ignore
          expect(verticesFromLoop(loop)[0]!.bulge).toBeCloseTo(bulge, 9)
          const arc = loop[0] as ArcSegment
          for (const [t, p] of [
            [startTangent(arc), arc.from],
            [endTangent(arc), arc.to],
          ] as const) {
            // prettier-ignore
            const radial = { x: (p.x - arc.centre.x) / arc.radius, y: (p.y - arc.centre.y) / arc.radius }
            expect(Math.hypot(radial.x, radial.y)).toBeCloseTo(1, 9)
            expect(t.x * radial.x + t.y * radial.y).toBeCloseTo(0, 9)
          }
          const middle = pointAt(arc, 0.5)
          expect(Math.hypot(middle.x - arc.centre.x, middle.y - arc.centre.y)).toBeCloseTo(arc.radius, 6)
        },
      ),
      { seed: 7, numRuns: 200 },
    )
  })

  test('an all but straight bulge is a line', () => {
    expect(loopFromVertices([{ x: 0, y: 0, bulge: STRAIGHT_BULGE / 2 }, { x: 9, y: 0 }])[0]!.kind).toBe('line') // prettier-ignore
    expect(loopFromVertices([{ x: 0, y: 0, bulge: STRAIGHT_BULGE * 2 }, { x: 9, y: 0 }])[0]!.kind).toBe('arc') // prettier-ignore
  })
})

describe('measures', () => {
  const round = loopFromVertices(circle(7, -4, 3))

  test('a circle of two arcs: area, length, bounds', () => {
    expect(signedArea(round)).toBeCloseTo(9 * Math.PI, 12)
    expect(signedArea(reverseLoop(round))).toBeCloseTo(-9 * Math.PI, 12)
    expect(loopLength(round)).toBeCloseTo(6 * Math.PI, 12)
    const box = boundsOf(round)
    for (const [side, value] of Object.entries({ minX: 4, minY: -7, maxX: 10, maxY: -1 })) {
      expect(box[side as keyof typeof box]).toBeCloseTo(value, 13)
    }
  })

  test('the cap of a flat arc keeps its digits: sweep³/6 (1 − sweep²/20 …), and joins its plain form', () => {
    expect(capFactor(1e-6)).toBeCloseTo(1e-18 / 6, 30)
    expect(capFactor(0.1) / (0.1 - Math.sin(0.1))).toBeCloseTo(1, 11)
    expect(capFactor(-0.05)).toBe(-capFactor(0.05))
  })

  test('sampled chords stay within the tolerance and no coarser count does', () => {
    const arc = round[0] as ArcSegment
    const points = sampleArc(arc, 0.01)
    expect(points).toHaveLength(chordCount(3, Math.PI, 0.01) + 1)
    const sagitta = (n: number) => 3 * (1 - Math.cos(Math.PI / n / 2))
    expect(sagitta(points.length - 1)).toBeLessThanOrEqual(0.01)
    expect(sagitta(points.length - 2)).toBeGreaterThan(0.01)
    expect(points[0]).toEqual(arc.from)
    expect(points.at(-1)).toEqual(arc.to)
    expect(sampleLoop(round, 0.01)).toHaveLength(2 * (points.length - 1))
  })

  test('a point is in a loop exactly when a finely sampled polygon has it, away from the rim', () => {
    const random = seeded(5)
    const vertices = star(random, 9, 40, 90).map((v) => ({ ...v, bulge: random() - 0.5 }))
    const loop = loopFromVertices(vertices)
    const polygon = sampleLoop(loop, 1e-4)
    let inside = 0
    for (let i = 0; i < 400; i++) {
      const p = { x: 220 * (random() - 0.5), y: 220 * (random() - 0.5) }
      // Winding number by angles: another method than the ray's.
      let turn = 0
      for (const [k, a] of polygon.entries()) {
        const b = polygon[(k + 1) % polygon.length]!
        turn += Math.atan2((a.x - p.x) * (b.y - p.y) - (a.y - p.y) * (b.x - p.x), (a.x - p.x) * (b.x - p.x) + (a.y - p.y) * (b.y - p.y)) // prettier-ignore
      }
      const expected = Math.abs(turn) > 1 ? 'inside' : 'outside'
      if (expected === 'inside') inside++
      expect(sideOfLoop(loop, p, -1)).toBe(expected)
    }
    expect(inside).toBeGreaterThan(50)
    expect(sideOfLoop(loop, pointAt(loop[3]!, 0.4), 1e-9)).toBe('on')
  })

  test('a point of the profile is inside the outer loop and outside holes', () => {
    const loops = [loopFromVertices(rectangle(0, 0, 20, 20)), loopFromVertices(circle(10, 10, 4, true))]
    expect(pointInProfile(loops, { x: 2, y: 2 })).toBe(true)
    expect(pointInProfile(loops, { x: 10, y: 11 })).toBe(false)
  })
})

test('orientation is put right and names are carried back to the drawing', () => {
  const vertices = rectangle(0, 0, 10, 5)
  const { loops, reversed: turned } = orientLoops([
    loopFromVertices(reversed(vertices)),
    loopFromVertices(circle(5, 2, 1)),
  ])
  expect(turned).toEqual([true, true])
  expect(isCounterClockwise(loops[0]!)).toBe(true)
  expect(isCounterClockwise(loops[1]!)).toBe(false)
  const drawn = loopFromVertices(reversed(vertices))
  for (const [k, segment] of loops[0]!.entries()) {
    expect(drawn[edgeInDrawing(k, 4, true)]!.to).toEqual(segment.from)
    expect(drawn[cornerInDrawing(k, 4, true)]!.from).toEqual(segment.from)
  }
})

describe('problems of a profile', () => {
  const outer = rectangle(0, 0, 100, 60)

  test('sound profiles have none', () => {
    expect(codes(outer, circle(50, 30, 10, true), circle(20, 20, 5, true))).toEqual([])
    const slot = [{ x: 20, y: 20, bulge: 0 }, { x: 60, y: 20, bulge: 1 }, { x: 60, y: 30, bulge: 0 }, { x: 20, y: 30, bulge: 1 }] // prettier-ignore
    expect(codes(slot)).toEqual([])
    expect(codes(star(seeded(1), 400, 50, 60))).toEqual([])
  })

  test.each([
    ['crosses-itself', [[{ x: 0, y: 0 }, { x: 10, y: 10 }, { x: 10, y: 0 }, { x: 0, y: 9 }, { x: -5, y: 5 }]]],
    ['crosses-itself', [[{ x: 0, y: 0 }, { x: 10, y: 0 }, { x: 10, y: 10 }, { x: 5, y: 0 }, { x: 0, y: 10 }]]],
    ['crosses-itself', [[{ x: 0, y: 0 }, { x: 10, y: 0 }, { x: 4, y: 0 }, { x: 4, y: 8 }]]],
    ['crosses-itself', [[{ x: 0, y: 0, bulge: -0.9 }, { x: 10, y: 0 }, { x: 10, y: 3 }, { x: 0, y: 3 }]]],
    ['loops-cross', [outer, circle(98, 30, 5, true)]],
    ['loops-cross', [outer, circle(95, 30, 5, true)]],
    ['hole-outside', [outer, circle(120, 30, 5, true)]],
    ['hole-in-hole', [outer, circle(50, 30, 20, true), circle(50, 30, 5, true)]],
    ['wrong-orientation', [reversed(outer)]],
    ['wrong-orientation', [outer, circle(50, 30, 5)]],
    ['no-area', [[{ x: 0, y: 0, bulge: 0.5 }, { x: 10, y: 0, bulge: -0.5 }]]],
    ['zero-edge', [[...outer, { x: 0, y: 60 }]]],
    ['too-few-edges', [[{ x: 0, y: 0 }]]],
    ['not-finite', [[...outer, { x: NaN, y: 0 }]]],
  ] as [string, Vertex[][]][])('%s', (code, loops) => {
    expect(codes(...loops)).toContain(code)
  }) // prettier-ignore

  test('tangent corners are no crossings, wherever the part lies and however its digits were cut', () => {
    const random = seeded(11)
    for (let i = 0; i < 200; i++) {
      const r = 1 + 30 * random()
      const [w, h] = [100 * random(), 2.5 * r + 100 * random()]
      const [turn, dx, dy] = [7 * random(), 900 * random(), 900 * random()]
      const quarter = Math.tan(Math.PI / 8)
      // A rounded rectangle with an S of two arcs in its side, moved and written to four digits or in full.
      const drawn: Vertex[] = [
        { x: -r, y: 0 },
        { x: r + w, y: 0, bulge: quarter },
        { x: 2 * r + w, y: r },
        { x: 2 * r + w, y: r + h, bulge: quarter },
        { x: r + w, y: 2 * r + h },
        { x: r, y: 2 * r + h, bulge: quarter },
        { x: 0, y: r + h, bulge: -quarter },
        { x: -r, y: h, bulge: quarter },
        { x: -2 * r, y: h - r },
        { x: -2 * r, y: r, bulge: quarter },
      ]
      const cut = (v: number) => (i % 2 ? v : Math.round(v * 1e4) / 1e4)
      const moved = drawn.map(({ x, y, bulge }) => ({
        x: cut(dx + x * Math.cos(turn) - y * Math.sin(turn)),
        y: cut(dy + x * Math.sin(turn) + y * Math.cos(turn)),
        bulge,
      }))
      expect(profileProblems([loopFromVertices(moved)]), `case ${i}`).toEqual([])
    }
  })

  test('says where: edges and the point', () => {
    const bow = [{ x: 0, y: 0 }, { x: 10, y: 10 }, { x: 10, y: 0 }, { x: 0, y: 10 }] // prettier-ignore
    const problem = profileProblems([loopFromVertices(bow)]).find((p) => p.code === 'crosses-itself')!
    expect(problem).toMatchObject({ loop: 0, edge: 0, other: { loop: 0, edge: 2 }, at: { x: 5, y: 5 } })
  })
})
