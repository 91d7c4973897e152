import { describe, expect, it } from 'vitest'
import { circle, dxfBytes, line, polyline, square, type DxfParts } from '../../../server/demo/dxf-text.ts'
import { readDrawing } from '../../../shared/drawing/read.ts'
import type { NoticeCode, Reading, ReadingOptions } from '../../../shared/drawing/schema.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import { signedArea } from '../../../shared/geometry/loop.ts'

const read = (parts: DxfParts, options: ReadingOptions = {}): Reading => readDrawing(dxfBytes(parts), options)
const areas = (reading: Reading) => reading.loops.map((loop) => loop.area)
const notice = (reading: Reading, code: NoticeCode) => reading.notices.find((one) => one.code === code)

describe('chains', () => {
  const corner = [line(0, 0, 100, 0), line(100, 0, 100, 50), line(100, 50, 0, 50)]

  it('joins gaps within the tolerance and reports the place; leaves larger ones open', () => {
    const gap = (y: number) => ({ entities: [...corner, line(0, 50, 0, y)] })
    const joined = read(gap(0.4), { joinTolerance: 0.5 })
    expect(joined.loops).toHaveLength(1)
    expect(notice(joined, 'gap-joined')).toMatchObject({
      count: 1,
      places: [{ x: 0, y: expect.closeTo(0.2, 9) }],
    })
    const open = read(gap(0.6), { joinTolerance: 0.5 })
    expect(open.loops).toEqual([])
    expect(notice(open, 'chain-open')?.places).toHaveLength(2)
    expect(open.open).toEqual([{ branched: false, layer: '0', points: expect.any(Array) }])
  })

  it('fine detail is not pulled together by a wide tolerance', () => {
    const fine = Array.from({ length: 40 }, (_, i) => line(i * 0.1, 0, (i + 1) * 0.1, 0))
    const reading = read(
      { entities: [...fine, line(4, 0, 4, 30), line(4, 30, 0, 30), line(0, 30, 0, 0)] },
      { joinTolerance: 1 },
    )
    expect(reading.loops[0]?.vertices).toHaveLength(43)
    expect(areas(reading)[0]).toBeCloseTo(120, 9)
  })

  it('drops what is drawn twice, either way round, and lines of no length', () => {
    const reading = read({
      entities: [
        ...corner,
        line(0, 0, 0, 50),
        line(0, 50, 0, 0),
        line(100, 0, 0, 0),
        line(7, 7, 7, 7),
        circle(20, 20, 5),
        circle(20, 20, 5),
      ],
    })
    expect(reading.loops).toHaveLength(2)
    expect(notice(reading, 'duplicate-dropped')?.count).toBe(4)
    expect(notice(reading, 'zero-length-dropped')?.count).toBe(1)
  })

  it('a branch is reported where it is, once for the figure', () => {
    const reading = read({ entities: [...corner, line(0, 50, 0, 0), line(100, 50, 150, 80)] })
    expect(reading.loops).toEqual([])
    expect(notice(reading, 'chain-branched')).toMatchObject({ count: 1, places: [{ x: 100, y: 50 }] })
  })

  it('an outline on its own layer, or one that closes by itself, is an outline whatever touches it', () => {
    const layered = [...corner, line(0, 50, 0, 0)].map((one) => one.replace('8\n0\n', '8\nCUT\n'))
    expect(areas(read({ entities: [...layered, line(100, 50, 150, 80, 'AXES')] }))).toEqual([5_000])
    expect(areas(read({ entities: [square(0, 0, 10), line(10, 10, 50, 50)] }))).toEqual([100])
  })

  it('layers may be left out', () => {
    const parts = { entities: [square(0, 0, 10, 'CUT'), line(10, 10, 50, 50, 'AXES')] }
    const reading = read(parts, { layers: ['CUT'] })
    expect(reading.open).toEqual([])
    expect(reading.layers).toEqual([
      { name: 'CUT', entities: 1, read: true },
      { name: 'AXES', entities: 1, read: false },
    ])
    expect(notice(reading, 'layer-left-out')).toMatchObject({ count: 1, layer: 'AXES' })
    expect(read(parts, { layers: [] }).bounds).toBeNull()
  })

  it('outlines that cross, touch or lie on one another are reported at the place', () => {
    const crossing = read({ entities: [circle(0, 0, 10), circle(12, 0, 10)] })
    expect(notice(crossing, 'loop-crosses')?.places).toEqual([
      { x: 6, y: expect.closeTo(8, 9) },
      { x: 6, y: expect.closeTo(-8, 9) },
    ])
    const bow = read({
      entities: [
        polyline([
          [0, 0],
          [10, 10],
          [10, 0],
          [0, 8],
        ]),
      ],
    })
    expect(notice(bow, 'loop-crosses')?.count).toBe(1)
    const shared = read({ entities: [square(0, 0, 10), square(10, 2, 5)] })
    expect(notice(shared, 'lines-overlap')?.count).toBe(1)
    expect(notice(read({ entities: [square(0, 0, 10), circle(5, 5, 4.99)] }), 'loop-crosses')).toBeUndefined()
  })
})

describe('parts', () => {
  it('outlines, holes and islands; the largest first; orientation put right', () => {
    const reading = read({
      entities: [
        circle(35, 35, 5),
        square(20, 20, 30),
        square(200, 0, 20),
        polyline([
          [0, 0],
          [0, 100],
          [100, 100],
          [100, 0],
        ]),
      ],
    })
    expect(reading.parts.map(({ outer, holes, area }) => [outer, holes, area])).toEqual([
      [0, [1], 9_100],
      [2, [], 400],
      [3, [], expect.closeTo(25 * Math.PI, 9)],
    ])
    expect(reading.loops.map((loop) => [loop.role, loop.parent])).toEqual([
      ['outer', null],
      ['hole', 0],
      ['outer', null],
      ['outer', 1],
    ])
    for (const loop of reading.loops) {
      expect(Math.sign(signedArea(loopFromVertices(loop.vertices)))).toBe(loop.role === 'outer' ? 1 : -1)
    }
  })
})
