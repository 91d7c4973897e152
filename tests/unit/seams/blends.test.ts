import { describe, expect, test } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import { applyTilt } from '../../../shared/prep/preps.ts'
import { blendCure } from '../../../shared/seams/blend-cure.ts'
import { cornersOf, seamTiltOf } from '../../../shared/seams/corners.ts'
import { reachability, turnedOver } from '../../../shared/walls/reachability.ts'
import type { Wall } from '../../../shared/walls/types.ts'
import { DEGREE, plate, rectangle } from '../../support/plates.ts'

const blend = (depth: number, from: number, to: number): Wall => ({
  facets: [{ depth, tilt: from * DEGREE, endTilt: to * DEGREE }],
})

test('a seam is told by the tilts that its walls have at the corner', () => {
  const body = plate(10, [rectangle(0, 0, 80, 50)], (_, e) =>
    blend(10, [0, 20, 30, 5][e]!, [10, 25, 35, 40][e]!),
  )
  cornersOf(body).forEach(({ bands: [band] }, i) => {
    const [before, after] = [[40, 10, 25, 35][i]! * DEGREE, [0, 20, 30, 5][i]! * DEGREE]
    expect(band!.tilts).toEqual([before, after])
    expect(band!.seamTilt).toBe(seamTiltOf(before, after, Math.PI / 2))
  })
})

describe('a step at a smooth corner', () => {
  // A slot-shaped part: its sides run into its round ends.
  const request: EvaluationRequest = {
    plate: { thickness: 10 },
    loops: [
      [
        { x: 0, y: 0 },
        { x: 80, y: 0, bulge: 1 },
        { x: 80, y: 30 },
        { x: 0, y: 30, bulge: 1 },
      ],
    ],
    walls: [
      { loop: 0, edge: 0, facets: [{ depth: 10, tilt: 10 }] },
      { loop: 0, edge: 1, facets: [{ depth: 10, tilt: 30 }] },
      { loop: 0, edge: 2, facets: [{ depth: 10, tilt: 10, endTilt: 20 }] },
      { loop: 0, edge: 3, facets: [{ depth: 10, tilt: 20, endTilt: 10 }] },
    ],
  }
  const steps = (own: EvaluationRequest) =>
    evaluate(own).findings.filter(({ code }) => code === 'smooth-step')

  test('is none where the end of one blend is the start of the next, and is cured by a blend of the longer edge', () => {
    const found = steps(request)
    expect(found.map(({ vertex }) => vertex)).toEqual([1, 2])
    expect(found.map(({ cure }) => cure?.set)).toEqual([
      { edges: [{ loop: 0, edge: 0 }], facet: 0, tilt: 10, endTilt: 30 },
      { edges: [{ loop: 0, edge: 2 }], facet: 0, tilt: 30, endTilt: 20 },
    ])
    const walls = found.reduce((own, { cure }) => applyTilt(own, cure!.set!, 10), request.walls)
    expect(steps({ ...request, walls })).toEqual([])
  })

  test('is the same when the loop comes in the other way round, its walls told from their own starts', () => {
    const loop = request.loops[0]!
    const n = loop.length
    const turned: EvaluationRequest = {
      ...request,
      loops: [
        loop.map((_, i) => {
          const { x, y } = loop[(n - i) % n]!
          return { x, y, bulge: -(loop[(n - 1 - i + n) % n]!.bulge ?? 0) }
        }),
      ],
      walls: request.walls.map(({ edge, facets }) => ({
        loop: 0,
        edge: n - 1 - edge,
        facets: facets.map(({ depth, tilt, endTilt }) => ({ depth, tilt: endTilt ?? tilt, endTilt: tilt })),
      })),
    }
    const found = steps(turned)
    expect(found.map(({ vertex }) => vertex)).toEqual([2, 3])
    const walls = found.reduce((own, { cure }) => applyTilt(own, cure!.set!, 10), turned.walls)
    const [there, back] = [
      evaluate({ ...turned, walls }),
      evaluate({
        ...request,
        walls: steps(request).reduce((own, { cure }) => applyTilt(own, cure!.set!, 10), request.walls),
      }),
    ]
    expect(steps({ ...turned, walls })).toEqual([])
    expect(there.volume! / back.volume!).toBeCloseTo(1, 12)
  })

  test('is beyond one blend where more than one facet differs', () => {
    const facets = (...tilts: number[]) => tilts.map((tilt, i) => ({ depth: 5 * (i + 1), tilt }))
    expect(blendCure({ facets: facets(30, 0), length: 10 }, { facets: facets(20, 0), length: 20 })).toEqual({
      change: 'after',
      facet: 0,
      tilt: 30,
      endTilt: 20,
    })
    expect(
      blendCure({ facets: facets(30, 10), length: 10 }, { facets: facets(20, 0), length: 20 }),
    ).toBeNull()
    expect(blendCure({ facets: facets(30), length: 10 }, { facets: facets(20, 0), length: 20 })).toBeNull()
  })
})

test('what a jet can cut is asked at both ends of an edge', () => {
  const facets = (end: number) => [
    { depth: 4, tilt: 0.3, endTilt: 0.1 },
    { depth: 10, tilt: 0, endTilt: end },
  ]
  expect(reachability(facets(0.05)).kind).toBe('reachable')
  const blocked = reachability(facets(0.2))
  expect(blocked).toMatchObject({ kind: 'blocked', facet: 1, turnedOverDoes: false })
  if (blocked.kind !== 'blocked') return
  expect(blocked.intoPart).toBeCloseTo(6 * (Math.tan(0.2) - Math.tan(0.1)), 12)
  expect(turnedOver(turnedOver(facets(0.2)))).toEqual(facets(0.2))
})
