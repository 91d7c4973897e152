import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { Finding } from '../../../shared/findings/schema.ts'
import { evaluationRequestOf } from '../../../shared/setup/schema.ts'
import { findingGroups } from '../../../src/features/sheet/finding-groups.ts'
import {
  MOST_ROWS,
  edgeRuns,
  letters,
  prepGroups,
  sheetRows,
  tableRows,
} from '../../../src/features/sheet/sheet-model.ts'
import { content } from '../setup/content.ts'

const joint = { rootOpening: 2, mate: 'same', label: 'J1' } as const
const bevel = [
  { depth: 17, tilt: 30 },
  { depth: 20, tilt: 0 },
]
const setup = content({
  jet: { kerf: 1, taper: 0.4, standoff: 3, nozzleDiameter: 7.14 },
  walls: [
    { loop: 0, edge: 0, facets: bevel },
    { loop: 0, edge: 1, facets: bevel },
    { loop: 0, edge: 2, facets: bevel },
  ],
  joints: [
    { loop: 0, edge: 0, ...joint },
    { loop: 0, edge: 2, ...joint, label: 'J2' },
  ],
})
const rows = sheetRows(setup, evaluate(evaluationRequestOf(setup)))

describe('rows of the edge table', () => {
  it('has every edge of every loop, named', () => {
    expect(rows.map(({ name }) => name)).toEqual(['e1', 'e2', 'e3', 'e4', 'h1.e1', 'h1.e2'])
  })

  it('gives each pass its angles three ways and its jet tilt, taper tilted away', () => {
    expect(rows[0]!.passes).toEqual([
      { fromVertical: 30, fromPlateFace: 60, included: 60, jetTilt: expect.closeTo(29.6, 9) },
      { fromVertical: 0, fromPlateFace: 90, included: 0, jetTilt: expect.closeTo(-0.4, 9) },
    ])
    expect(rows[1]!.passes[0]!.included).toBeNull()
  })

  it('carries lengths, offset and path from the evaluation: 17·tan 30° = 9.815, path 20 / cos 29.6°', () => {
    expect(rows[0]!.topLength).toBe(200)
    expect(rows[0]!.bottomOffset).toBeCloseTo(9.815, 4)
    expect(rows[0]!.metalPath).toBeCloseTo(20 / Math.cos((29.6 * Math.PI) / 180), 9)
  })

  it('lists every edge of an ordinary part and gathers the plain ones of a long one', () => {
    expect(tableRows(rows)).toEqual({ listed: rows, gathered: [] })
    const many = Array.from({ length: MOST_ROWS + 1 }, (_, edge) => ({
      ...rows[edge % 2 === 0 ? 0 : 3]!,
      edge,
    }))
    const { listed, gathered } = tableRows(many)
    expect(listed).toHaveLength(31)
    expect(gathered).toHaveLength(30)
  })
})

describe('preps drawn once', () => {
  it('puts edges with one prep and one joint together, whatever the joint is called', () => {
    const groups = prepGroups(rows)
    expect(groups.map(({ label, edges }) => [label, edgeRuns(edges)])).toEqual([
      ['A', 'e1, e3'],
      ['B', 'e2'],
    ])
    expect(groups[0]!.joint?.rootOpening).toBe(2)
    expect(groups[1]!.joint).toBeNull()
  })

  it('keeps joints with another gap or other plate apart', () => {
    const other = rows.map((row) =>
      row.name === 'e3' ? { ...row, joint: { loop: 0, edge: 2, ...joint, rootOpening: 3 } } : row,
    )
    expect(prepGroups(other)).toHaveLength(3)
  })

  it('letters run on past Z', () => {
    expect([0, 25, 26, 51, 52].map(letters)).toEqual(['A', 'Z', 'AA', 'AZ', 'BA'])
  })
})

describe('runs of edges', () => {
  const refs = (...pairs: [number, number][]) => pairs.map(([loop, edge]) => ({ loop, edge }))
  it('joins three and more neighbours of one loop', () => {
    expect(edgeRuns(refs([0, 0], [0, 2], [0, 3], [0, 4], [0, 6], [0, 7], [1, 8]))).toBe(
      'e1, e3–e5, e7, e8, h1.e9',
    )
  })
})

describe('findings told once', () => {
  const fillet = (vertex: number): Finding => ({
    code: 'concave-fillet',
    severity: 'note',
    loop: 0,
    vertex,
    value: 0.5,
    message: `Corner C${vertex + 1} keeps a fillet.`,
  })
  const stop: Finding = { code: 'wall-vanishes', severity: 'stop', loop: 0, edge: 3, message: 'Gone.' }

  it('puts the gravest first and gathers those that differ by place alone', () => {
    const groups = findingGroups([fillet(1), fillet(4), stop, { ...fillet(6), value: 0.7 }])
    expect(groups.map(({ first, alsoAt }) => [first.code, first.vertex, alsoAt])).toEqual([
      ['wall-vanishes', undefined, []],
      ['concave-fillet', 1, ['C5']],
      ['concave-fillet', 6, []],
    ])
  })

  it('never gathers findings with a cure: it names its own edges', () => {
    const cured = (vertex: number) => ({ ...fillet(vertex), cure: { message: `Set e${vertex}.` } })
    expect(findingGroups([cured(1), cured(2)])).toHaveLength(2)
  })
})
