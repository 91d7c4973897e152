import { describe, expect, it } from 'vitest'
import { facetsCutIn } from '../../../shared/findings/edge.ts'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import { findingSeverities } from '../../../shared/findings/schema.ts'
import { roundTilt } from '../../../shared/findings/place.ts'
import { circle, plate, rectangle, tilted } from '../evaluate/shapes.ts'

const jet = { kerf: 1, taper: 0, standoff: 3, nozzleDiameter: 7.14 }
const notch = [
  { x: 0, y: 0 },
  { x: 100, y: 0 },
  { x: 100, y: 60 },
  { x: 60, y: 60 },
  { x: 60, y: 30 },
  { x: 0, y: 30 },
]

describe('findings about the part', () => {
  it('a tilt that increases with depth cannot be cut from either face', () => {
    const facets = [
      { depth: 4, tilt: -20 },
      { depth: 10, tilt: 10 },
    ]
    const answer = evaluate(plate([rectangle(100, 60)], [{ loop: 0, edge: 2, facets }]))
    expect(answer.findings).toMatchObject([
      {
        code: 'facets-cut-into-part',
        severity: 'stop',
        edge: 2,
        message:
          'Facet 2 of edge e3 leans +10° under −20° at 4 mm. Cutting either facet, a straight jet would go up to ' +
          '3.24 mm into the part. Turning the plate over does not help: the jet goes through the whole plate from ' +
          'either face.',
      },
    ])
    expect(answer.findings[0]?.cure).toEqual({
      message:
        'Set facet 2 of e3 to −20° or less. Only cuts that stop inside the plate could keep the shape: facet 1 from ' +
        'the top, 2 from the bottom.',
      set: { edges: [{ loop: 0, edge: 2 }], facet: 1, tilt: -20 },
    })
  })

  it('a blend whose facets cross towards its end cannot be cut either', () => {
    const facets = [
      { depth: 4, tilt: 20, endTilt: -20 },
      { depth: 10, tilt: 10 },
    ]
    const found = facetsCutIn({ loop: 0, edge: 2, facets })
    expect(found).toMatchObject({ code: 'facets-cut-into-part', value: 10, limit: -20 })
    expect(found?.cure?.set).toBeUndefined()
    expect(
      facetsCutIn({ loop: 0, edge: 2, facets: [{ depth: 4, tilt: 20, endTilt: 15 }, facets[1]!] }),
    ).toBeNull()
  })

  it('a concave corner keeps half the kerf as a fillet; a convex one does not', () => {
    const answer = evaluate(plate([notch], [], 10, { jet }))
    expect(answer.findings).toEqual([
      {
        code: 'concave-fillet',
        severity: 'note',
        loop: 0,
        vertex: 4,
        value: 0.5,
        message: 'Corner C5 keeps a fillet of 0.5 mm, half the kerf.',
      },
    ])
    expect(evaluate(plate([notch], [])).findings).toEqual([])
  })

  it('a nearly flat concave corner is not worth a word', () => {
    const flat = [...rectangle(100, 60).slice(0, 2), { x: 100, y: 60 }, { x: 50, y: 59.5 }, { x: 0, y: 60 }]
    const answer = evaluate(plate([flat], [], 10, { jet }))
    expect(answer.corners[3]?.kind).toBe('concave')
    expect(answer.findings).toEqual([])
  })

  it.each([
    ['round', circle(50, 30, 0.45), 0.9],
    ['square', rectangle(0.8, 4, 20, 20), 0.8],
    [
      'slanted slot',
      [
        { x: 20, y: 20 },
        { x: 27.071, y: 27.071 },
        { x: 26.5, y: 27.642 },
        { x: 19.429, y: 20.571 },
      ],
      0.8075,
    ],
  ])('a %s hole narrower than the kerf stops', (_, hole, width) => {
    const answer = evaluate(plate([rectangle(100, 60), hole], [], 10, { jet }))
    expect(answer.findings[0]).toMatchObject({
      code: 'hole-smaller-than-kerf',
      severity: 'stop',
      loop: 1,
      limit: 1,
    })
    expect(answer.findings[0]?.value).toBeCloseTo(width, 3)
  })

  it('a hole just wider than the kerf passes', () => {
    const { findings } = evaluate(plate([rectangle(100, 60), circle(50, 30, 0.51)], [], 10, { jet }))
    expect(findings.map(({ code }) => code)).not.toContain('hole-smaller-than-kerf')
  })

  it('a hole that closes below the kerf with depth stops', () => {
    const walls = tilted([10, 10], 10, 1)
    const answer = evaluate(plate([rectangle(100, 60), circle(50, 30, 2.2)], walls, 10, { jet }))
    expect(answer.findings.map(({ code }) => code)).toContain('hole-smaller-than-kerf')
  })

  it('the nozzle is checked where the tilt is largest, once, with the stand-off that clears', () => {
    const answer = evaluate(plate([rectangle(100, 60)], tilted([45, 45, 0, 0], 10), 10, { jet }))
    expect(answer.findings).toMatchObject([
      {
        code: 'nozzle-touches-plate',
        severity: 'warning',
        vertex: 1,
        message:
          'At 54.74° (corner C2) the rim of a 7.14 mm nozzle would reach 1.18 mm into the plate; it clears from a stand-off of 5.05 mm.',
        cure: { standoff: 6 },
      },
    ])
  })

  it('walls that break through name both', () => {
    const holes = [circle(30, 30, 10), circle(56, 30, 10)]
    const walls = [...tilted([-40, -40], 20, 1), ...tilted([-40, -40], 20, 2)]
    const answer = evaluate(plate([rectangle(100, 60), ...holes], walls, 20))
    const depth = 3 / Math.tan((40 * Math.PI) / 180)
    expect(answer.firstEvent).toMatchObject({ kind: 'break-through', depth: expect.closeTo(depth, 6) })
    const [finding] = answer.findings
    expect(finding).toMatchObject({ code: 'walls-break-through', severity: 'stop', limit: 20 })
    expect(finding?.message).toMatch(/h1\.e\d.*h2\.e\d|h2\.e\d.*h1\.e\d/)
  })
})

describe('the list', () => {
  it('has the gravest first', () => {
    const head = { mechanicalLimit: 60, workingLimit: 30 }
    const answer = evaluate(plate([notch], tilted([40, 0, 0, 0, 0, 65], 5), 5, { jet, head }))
    const ranks = answer.findings.map(({ severity }) => findingSeverities.indexOf(severity))
    expect(ranks).toEqual([...ranks].sort((a, b) => a - b))
    expect(new Set(ranks).size).toBe(3)
  })
})

describe('rounding of cures', () => {
  it('goes to the tenth on the safe side, and leaves tenths alone', () => {
    expect([50.7685, 50.7, 0.05, -0.05, -50.7685].map((tilt) => roundTilt(tilt, 'down'))).toEqual([
      50.7, 50.7, 0, -0.1, -50.8,
    ])
    expect([50.7685, 50.7, -50.7685, -0.05].map((tilt) => roundTilt(tilt, 'up'))).toEqual([
      50.8, 50.7, -50.7, 0,
    ])
  })
})
