import { parse } from 'csv-parse/sync'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import { cautions } from '../../../shared/files/cautions.ts'
import { csvText } from '../../../shared/files/csv.ts'
import { edgesCsv } from '../../../shared/files/edges-csv.ts'
import { evaluationRequestOf } from '../../../shared/setup/schema.ts'
import { content } from '../setup/content.ts'

const setup = content()
const evaluation = evaluate(evaluationRequestOf(setup))
const text = edgesCsv(setup, evaluation)
/** Strict: every row has as many cells as the header. */
const rows = parse(text, { columns: true, record_delimiter: '\r\n' }) as Record<string, string>[]

describe('edges as CSV', () => {
  it('has a row per facet, in order, and nothing else', () => {
    expect(rows.map((row) => [row['Edge'], row['Facet (from the top)']])).toEqual([
      ['e1', '1'],
      ['e1', '2'],
      ['e2', '1'],
      ['e3', '1'],
      ['e4', '1'],
      ['h1.e1', '1'],
      ['h1.e2', '1'],
    ])
    expect(text.endsWith('\r\n')).toBe(true)
    expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/)
  })

  it('gives the angle three ways, with its units in the header', () => {
    expect(rows[0]).toMatchObject({
      Prep: 'wall +30° with 3 mm root face (facet 1 of 2)',
      'From depth (mm)': '0',
      'To depth (mm)': '17',
      'Angle from vertical (deg; positive outward with depth)': '30',
      'Angle from plate face (deg)': '60',
      'Groove angle of both plates (deg)': '60',
      'Root face (mm)': '3',
      Joint: 'J1',
      'Root opening (mm)': '2',
    })
    expect(rows[3]).toMatchObject({
      'Angle from vertical (deg; positive outward with depth)': '-45',
      'Groove angle of both plates (deg)': '',
      'Start corner': 'C3',
      'End corner': 'C4',
    })
  })

  it("has the evaluation's own figures, to the last digit", () => {
    const third = evaluation.edges[2]
    expect(Number(rows[3]?.['Bottom offset (mm; positive outward)'])).toBe(third?.bottomOffset)
    expect(Number(rows[3]?.['Bottom length (mm)'])).toBe(third?.bottomLength)
    expect(Number(rows[3]?.['Start corner jet tilt (deg)'])).toBe(evaluation.corners[2]?.jetTilt)
  })

  it('carries the cautions once', () => {
    expect(rows.map((row) => row['Cautions'])).toEqual([cautions.join(' '), '', '', '', '', '', ''])
  })

  it('leaves blank what is not sound', () => {
    const thick = content({
      plate: { material: 'S355', thickness: 100 },
      walls: [0, 1, 2, 3].map((edge) => ({ loop: 0, edge, facets: [{ depth: 100, tilt: -45 }] })),
      joints: [],
      loops: setup.loops.slice(0, 1),
    })
    const read = parse(edgesCsv(thick, evaluate(evaluationRequestOf(thick))), { columns: true }) as Record<
      string,
      string
    >[]
    expect(read[0]).toMatchObject({ 'Top length (mm)': '200', 'Bottom length (mm)': '' })
  })
})

describe('cells', () => {
  it.each(['=1+1', '+1', '-1', '@SUM(A1)', '\t=1', '  =1', '\r=1', '|cmd'])(
    '%j cannot run as a formula',
    (cell) => {
      const [row] = parse(csvText([[cell]])) as string[][]
      expect(row).toEqual([`'${cell}`])
    },
  )

  it('quotes what needs it and keeps it whole', () => {
    const cells = ['a,b', 'say "30°"', 'two\r\nlines', 'plain', '']
    expect(parse(csvText([cells]))).toEqual([cells])
  })

  it('writes numbers as they are, and nothing for null', () => {
    expect(csvText([[-30, 0.1, -0, null, 1e-7]])).toBe('-30,0.1,0,,1e-7\r\n')
  })
})
