import { existsSync } from 'node:fs'
import dxfParserModule, { type ILwpolylineEntity } from 'dxf-parser'
import { beforeAll, describe, expect, it } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { Evaluation } from '../../../shared/evaluate/schema.ts'
import { cautions } from '../../../shared/files/cautions.ts'
import { contoursDxf, type FileInfo } from '../../../shared/files/contours-dxf.ts'
import { evaluationRequestOf } from '../../../shared/setup/schema.ts'
import { ezdxf, PYTHON, type ReadBack } from '../../support/ezdxf.ts'
import { content } from '../../unit/setup/content.ts'

/** The package is CommonJS: its types name the class as default export, at run time it is the export itself. */
const DxfParser = dxfParserModule as unknown as typeof dxfParserModule.default

/** The file is read back by two readers that share no code with its writer: ezdxf (Debian's python3-ezdxf) and dxf-parser. */

function info(change: Partial<FileInfo> = {}): FileInfo {
  return {
    part: 'SW-104 Bearing plate',
    setup: 'First side',
    revision: 3,
    state: 'approved',
    hash: 'cd'.repeat(32),
    material: 'S355',
    thickness: 20,
    ...change,
  }
}

const TOLERANCE = 1e-6

function expectSameContour(
  read: ReadBack,
  layer: string,
  contour: Evaluation['contours'][number] | undefined,
): void {
  const polylines = read.polylines.filter((own) => own.layer === layer)
  expect(polylines).toHaveLength(contour?.loops.length ?? -1)
  for (const [l, { points, closed }] of polylines.entries()) {
    const loop = contour?.loops[l] ?? []
    expect(closed).toBe(true)
    expect(points).toHaveLength(loop.length)
    for (const [i, [x, y, bulge]] of points.entries()) {
      const vertex = loop[i]
      expect(Math.abs(x - (vertex?.x ?? Number.NaN))).toBeLessThanOrEqual(TOLERANCE)
      expect(Math.abs(y - (vertex?.y ?? Number.NaN))).toBeLessThanOrEqual(TOLERANCE)
      expect(Math.abs(bulge - (vertex?.bulge ?? 0))).toBeLessThanOrEqual(1e-9)
    }
  }
}

const setup = content({
  loops: [
    [
      { x: 0, y: 0 },
      { x: 200.123456789, y: 0 },
      { x: 200, y: 120, bulge: 0.31 },
      { x: -3.3333333333, y: 120 },
    ],
    [
      { x: 50, y: 60, bulge: -1 },
      { x: 70, y: 60, bulge: -1 },
    ],
  ],
  walls: [
    ...content().walls,
    ...[0, 1].map((edge) => ({
      loop: 1,
      edge,
      facets: [
        { depth: 12.5, tilt: -15 },
        { depth: 20, tilt: -20 },
      ],
    })),
  ],
})

describe('contours as DXF', () => {
  const evaluation = evaluate(evaluationRequestOf(setup))
  const text = contoursDxf(evaluation, info())
  let read: ReadBack

  beforeAll(() => {
    if (!existsSync(PYTHON)) throw new Error('install python3 and python3-ezdxf to run this test')
    read = ezdxf(text)
  })

  it('passes the audit of ezdxf without an error or a fix', () => {
    expect(read).toMatchObject({ version: 'AC1015', unit: 4, errors: [], fixes: [] })
  })

  it('has each depth on its own layer, and nothing else', () => {
    expect(evaluation.contours.map(({ depth }) => depth)).toEqual([0, 12.5, 17, 20])
    // ezdxf adds a layer of its own, Defpoints, to every document that it reads.
    expect(read.layers).toEqual(['0', 'TOP', 'LEVEL_12.5', 'LEVEL_17', 'BOTTOM', 'Defpoints'])
    expect(read.entities).toBe(8)
  })

  it('has every contour as evaluated, arcs as arcs', () => {
    const layers = ['TOP', 'LEVEL_12.5', 'LEVEL_17', 'BOTTOM']
    layers.forEach((layer, i) => expectSameContour(read, layer, evaluation.contours[i]))
    expect(read.polylines.some(({ points }) => points.some(([, , bulge]) => bulge !== 0))).toBe(true)
  })

  it('is read the same by dxf-parser', () => {
    const parsed = new DxfParser().parseSync(text)
    expect(parsed?.header['$INSUNITS']).toBe(4)
    const bottom = (parsed?.entities ?? []).filter(({ layer }) => layer === 'BOTTOM') as ILwpolylineEntity[]
    const last = evaluation.contours.at(-1)
    expect(bottom.map(({ shape }) => shape)).toEqual([true, true])
    for (const [l, { vertices }] of bottom.entries()) {
      for (const [i, { x, y, bulge }] of vertices.entries()) {
        const vertex = last?.loops[l]?.[i]
        expect(Math.abs(x - (vertex?.x ?? Number.NaN))).toBeLessThanOrEqual(TOLERANCE)
        expect(Math.abs(y - (vertex?.y ?? Number.NaN))).toBeLessThanOrEqual(TOLERANCE)
        expect(Math.abs((bulge ?? 0) - (vertex?.bulge ?? 0))).toBeLessThanOrEqual(1e-9)
      }
    }
  })

  it('says where it comes from and carries the cautions', () => {
    const comments = [...text.matchAll(/^999\r\n(.*)\r\n/gm)].map(([, line]) => line)
    expect(comments.slice(1, 3)).toEqual([
      'Part SW-104 Bearing plate; set-up First side, revision 3, approved.',
      `S355, 20 mm. Content SHA-256 ${'cd'.repeat(32)}.`,
    ])
    expect(comments.slice(-cautions.length)).toEqual([...cautions])
  })

  it('cannot be bent by what people type', () => {
    const hostile = contoursDxf(
      evaluation,
      info({ part: 'A\r\n0\r\nEOF\r\n', setup: 'Größe 5° \u{1f600}', material: '0\n  0\nENDSEC' }),
    )
    const again = ezdxf(hostile)
    expect(again).toMatchObject({ errors: [], fixes: [], entities: 8 })
    expect([...hostile].every((character) => character.charCodeAt(0) < 127)).toBe(true)
  })
})

describe('contours that end early', () => {
  it('says so at the head, and has no bottom', () => {
    const walls = [0, 1, 2, 3].map((edge) => ({ loop: 0, edge, facets: [{ depth: 100, tilt: -45 }] }))
    const early = content({
      plate: { material: 'S355', thickness: 100 },
      walls,
      loops: content().loops.slice(0, 1),
    })
    const evaluation = evaluate(evaluationRequestOf(early))
    expect(evaluation.firstEvent?.depth).toBeCloseTo(60, 9)
    const text = contoursDxf(evaluation, info({ thickness: 100 }))
    expect(text).toContain('NOT COMPLETE')
    expect(ezdxf(text)).toMatchObject({ errors: [], fixes: [], entities: 1 })
  })

  it('is an empty drawing when nothing is sound', () => {
    const none: Evaluation = { ...evaluate(evaluationRequestOf(setup)), contours: [] }
    expect(ezdxf(contoursDxf(none, info()))).toMatchObject({ errors: [], fixes: [], entities: 0 })
  })
})
