import { describe, expect, it } from 'vitest'
import { EvaluationError } from '../../../shared/evaluate/error.ts'
import { bodyOf, evaluate, evaluateWithMesh } from '../../../shared/evaluate/evaluate.ts'
import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import { circle, plate, rectangle, tilted } from './shapes.ts'

describe('requests without a sound meaning', () => {
  const square = [rectangle(100, 60)]
  const wall = (edge: number, facets = [{ depth: 10, tilt: 30 }], loop = 0) => ({ loop, edge, facets })
  const same = { x: 5, y: 5 }
  it.each<[string, EvaluationRequest, string, object]>([
    ['an edge beyond the loop', plate(square, [wall(4)]), 'wall-names-no-edge', { loop: 0, edge: 4 }],
    ['a loop beyond the profile', plate(square, [wall(0, undefined, 1)]), 'wall-names-no-edge', { loop: 1 }],
    ['an edge named twice', plate(square, [wall(1), wall(1)]), 'wall-named-twice', { edge: 1 }],
    [
      'a square edge named twice',
      plate(square, [wall(1, [{ depth: 10, tilt: 0 }]), wall(1)]),
      'wall-named-twice',
      { edge: 1 },
    ],
    [
      'facets that do not go down',
      plate(square, [
        wall(2, [
          { depth: 6, tilt: 9 },
          { depth: 6, tilt: 5 },
          { depth: 10, tilt: 0 },
        ]),
      ]),
      'facets-out-of-order',
      { edge: 2 },
    ],
    [
      'a last facet that ends early',
      plate(square, [wall(0, [{ depth: 9, tilt: 30 }])]),
      'facets-miss-thickness',
      {},
    ],
    [
      'a last facet that goes too deep',
      plate(square, [wall(0, [{ depth: 11, tilt: 30 }])]),
      'facets-miss-thickness',
      {},
    ],
    [
      'a repeated vertex',
      plate([[{ x: 0, y: 0 }, same, same, { x: 0, y: 9 }]], []),
      'edge-of-no-length',
      { edge: 1 },
    ],
    [
      'no area',
      plate(
        [
          [
            { x: 0, y: 0 },
            { x: 10, y: 0 },
          ],
        ],
        [],
      ),
      'loop-of-no-area',
      { loop: 0 },
    ],
    [
      'a coordinate that is no number',
      plate([[{ x: Number.NaN, y: 0 }, same, { x: 0, y: 9 }]], []),
      'not-finite',
      {},
    ],
  ])('%s', (_, request, code, place) => {
    let caught: unknown
    try {
      evaluate(request)
    } catch (error) {
      caught = error
    }
    expect(caught).toBeInstanceOf(EvaluationError)
    expect(caught).toMatchObject({ code, ...place })
    expect(() => bodyOf(request)).toThrow(EvaluationError)
  })
})

describe('profiles that can be shown but not cut', () => {
  it('reports a loop that crosses itself, with its edges and corners but no contours', () => {
    const bow = [
      { x: 0, y: 0 },
      { x: 40, y: 0 },
      { x: 5, y: 30 },
      { x: 30, y: 30 },
    ]
    const answer = evaluate(plate([bow], tilted([10, 10, 10, 10], 10)))
    expect(answer.findings.map(({ code }) => code)).toContain('profile-crosses-itself')
    expect(answer.findings[0]?.severity).toBe('stop')
    expect(answer).toMatchObject({ contours: [], volume: null, firstEvent: null })
    expect(answer.edges).toHaveLength(4)
    expect(evaluateWithMesh(plate([bow], [])).mesh.indices).toHaveLength(0)
  })

  it('reports a hole that lies outside', () => {
    const answer = evaluate(plate([rectangle(100, 60), circle(200, 30, 8)], []))
    expect(answer.findings).toMatchObject([{ code: 'loop-outside-part', severity: 'stop', loop: 1 }])
  })
})
