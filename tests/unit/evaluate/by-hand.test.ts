import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import { evaluationRequestSchema, type EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'
import { circle, plate, rectangle, tilted, turned } from './shapes.ts'

/** Answers of the front door against figures worked out by hand (each derivation beside its case). */

const tan = (degrees: number) => Math.tan((degrees * Math.PI) / 180)
const answerOf = (request: EvaluationRequest) => evaluate(evaluationRequestSchema.parse(request))
/** Every edge of a loop alike. */
const all = (loop: readonly Vertex[], tilt: number, thickness: number, index = 0) =>
  tilted(new Array<number>(loop.length).fill(tilt), thickness, index)

describe('volumes by hand', () => {
  const t = 12
  const tilts = [20, -15, 30, -5] as const
  const box = rectangle(100, 60)
  /** Prismatoid formula (from memory): exact, as the area of a rectangle with even sides is quadratic in depth. */
  const prismatoid = (area: (depth: number) => number, from: number, to: number) =>
    ((to - from) / 6) * (area(from) + 4 * area((from + to) / 2) + area(to))

  it.each(['top', 'bottom', 'root'] as const)('unlike walls, the drawing at the %s', (datum) => {
    const offset = (edge: 0 | 1 | 2 | 3, depth: number) => {
      const w = tan(tilts[edge])
      return depth * w - { top: 0, bottom: t * w, root: Math.max(0, t * w) }[datum]
    }
    const area = (d: number) => (100 + offset(1, d) + offset(3, d)) * (60 + offset(0, d) + offset(2, d))
    const answer = answerOf(plate([box], tilted(tilts, t), t, { datum }))
    expect(answer.volume).toBeCloseTo(prismatoid(area, 0, t), 7)
    expect(answer.firstEvent).toBeNull()
  })

  it('three facets', () => {
    const facets = [
      { depth: 4, tilt: 30 },
      { depth: 7, tilt: 0 },
      { depth: t, tilt: -30 },
    ]
    const reach = (d: number) => (Math.min(d, 4) - Math.max(0, d - 7)) * tan(30)
    const area = (d: number) => (100 + 2 * reach(d)) * (60 + 2 * reach(d))
    const walls = box.map((_, edge) => ({ loop: 0, edge, facets }))
    const answer = answerOf(plate([box], walls, t))
    const bands = prismatoid(area, 0, 4) + prismatoid(area, 4, 7) + prismatoid(area, 7, t)
    expect(answer.volume).toBeCloseTo(bands, 7)
    expect(answer.contours.map(({ depth }) => depth)).toEqual([0, 4, 7, t])
  })

  it('discs and holes of two vertices, whichever way they run', () => {
    const frustum = (a: number, b: number) => (Math.PI * 10 * (a * a + a * b + b * b)) / 3
    const want = frustum(40, 40 + 10 * tan(20)) - frustum(10, 10 + 10 * tan(10))
    const [disc, hole] = [turned(circle(0, 0, 40)), circle(0, 0, 10)]
    for (const loops of [
      [disc, hole],
      [turned(disc), hole],
      [disc, turned(hole)],
    ]) {
      const answer = answerOf(plate(loops, [...all(disc, 20, 10), ...all(hole, -10, 10, 1)]))
      expect((answer.volume ?? 0) / want).toBeCloseTo(1, 12)
    }
  })
})

describe('first events by hand', () => {
  it('a square hole of 10 mm closes when each wall has come 5 mm in', () => {
    const hole = rectangle(10, 10, 20, 20)
    const answer = answerOf(plate([rectangle(100, 60), hole], all(hole, 20, 20, 1), 20))
    expect(answer.firstEvent).toMatchObject({ kind: 'vanish', loop: 1 })
    expect(answer.firstEvent?.depth).toBeCloseTo(5 / tan(20), 10)
    expect(answer.contours.map(({ depth }) => depth)).toEqual([0])
  })

  it('a web of 3 mm between two holes is eaten from both sides', () => {
    const holes = [rectangle(10, 20, 20, 20), rectangle(10, 20, 33, 20)]
    const walls = holes.flatMap((hole, i) => all(hole, -15, 20, i + 1))
    const answer = answerOf(plate([rectangle(100, 60), ...holes], walls, 20))
    expect(answer.firstEvent?.kind).toBe('break-through')
    expect(answer.firstEvent?.depth).toBeCloseTo(3 / (2 * tan(15)), 10)
  })

  it('a wall rises 12 mm to the corner of a notch', () => {
    const notched = [
      { x: 0, y: 0 },
      { x: 60, y: 0 },
      { x: 60, y: 25 },
      { x: 35, y: 25 },
      { x: 25, y: 12 },
      { x: 15, y: 25 },
      { x: 0, y: 25 },
    ]
    const answer = answerOf(plate([notched], tilted([-20], 40), 40))
    expect(answer.firstEvent).toMatchObject({ kind: 'split', loop: 0, edge: 0 })
    expect(answer.firstEvent?.depth).toBeCloseTo(12 / tan(20), 10)
    expect(answer.firstEvent?.at.x).toBeCloseTo(25, 9)
  })

  it('a fillet of 5 mm vanishes at r / tan β', () => {
    const filleted = [
      { x: 0, y: 0 },
      { x: 60, y: 0 },
      { x: 60, y: 35, bulge: tan(22.5) },
      { x: 55, y: 40 },
      { x: 0, y: 40 },
    ]
    const answer = answerOf(plate([filleted], all(filleted, -25, 20), 20))
    expect(answer.firstEvent).toMatchObject({ kind: 'vanish', loop: 0, edge: 2 })
    expect(answer.firstEvent?.depth).toBeCloseTo(5 / tan(25), 10)
  })
})

describe('requests at the edge of what is allowed', () => {
  const box = [rectangle(100, 60)]

  it('parts of jet and head may be missing', () => {
    for (const more of [{}, { jet: {} }, { jet: { taper: 1 } }, { head: { mechanicalLimit: 90 } }]) {
      expect(answerOf(plate(box, all(rectangle(1, 1), 50, 10), 10, more)).findings).toEqual([])
    }
    const head = { mechanicalLimit: 60, workingLimit: null }
    expect(answerOf(plate(box, tilted([50], 10), 10, { head })).findings).toEqual([])
  })

  it('a negative taper adds to the tilt of the jet', () => {
    const answer = answerOf(plate(box, tilted([10], 10), 10, { jet: { taper: -0.5 } }))
    expect(answer.edges[0]?.jetTilts).toEqual([10.5])
  })

  it('a plate of a metre, and a nearly whole circle in one bulge', () => {
    const thick = answerOf(plate([rectangle(5000, 5000)], all(rectangle(1, 1), 45, 1000), 1000))
    // A frustum of a pyramid, h/3 (A + B + √AB) (from memory): 5 m square on top, 7 m below.
    expect((thick.volume ?? 0) / ((1000 / 3) * (25e6 + 49e6 + 35e6))).toBeCloseTo(1, 12)
    const round = answerOf(plate([[{ x: 0, y: 0, bulge: 9999 }, { x: 1, y: 0 }]], [])) // prettier-ignore
    const radius = (1 + 9999 ** 2) / (4 * 9999)
    expect((round.volume ?? 0) / (10 * Math.PI * radius ** 2)).toBeCloseTo(1, 9)
  })
})
