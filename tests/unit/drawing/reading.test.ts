import { describe, expect, it } from 'vitest'
import {
  arc,
  block,
  circle,
  dxfBytes,
  groups,
  insert,
  line,
  oldPolyline,
  polyline,
  square,
  text,
  type DxfParts,
} from '../../../server/demo/dxf-text.ts'
import { readDrawing } from '../../../shared/drawing/read.ts'
import {
  readingSchema,
  type NoticeCode,
  type Reading,
  type ReadingOptions,
} from '../../../shared/drawing/schema.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import { signedArea } from '../../../shared/geometry/loop.ts'

function read(parts: DxfParts, options: ReadingOptions = {}): Reading {
  return readingSchema.parse(readDrawing(dxfBytes(parts), options))
}

const areas = (reading: Reading) => reading.loops.map((loop) => loop.area)
const notice = (reading: Reading, code: NoticeCode) => reading.notices.find((one) => one.code === code)

describe('entities', () => {
  it('a circle is two half circles', () => {
    const [loop] = read({ entities: [circle(10, 5, 4)] }).loops
    expect(loop?.vertices).toEqual([
      { x: 14, y: 5, bulge: expect.closeTo(1, 12) },
      { x: 6, y: 5, bulge: expect.closeTo(1, 12) },
    ])
    expect(loop?.length).toBeCloseTo(8 * Math.PI, 12)
  })

  it('collinear lines and arcs of one circle stay as drawn', () => {
    const corners = [
      [0, 0],
      [5, 0],
      [10, 0, Math.tan(Math.PI / 8)],
      [20, 10],
      [0, 10],
    ] as const
    const reading = read({ entities: [polyline(corners)] })
    expect(reading.loops[0]?.vertices.map(({ x, y }) => [x, y])).toEqual(corners.map(([x, y]) => [x, y]))
    // A rectangle and a quarter disc of radius 10: 100 + 25π, by hand.
    expect(areas(reading)[0]).toBeCloseTo(100 + 25 * Math.PI, 10)
  })

  it('old and new polylines with bulges come to the same', () => {
    const corners = [
      [0, 0, 0.5],
      [30, 0],
      [30, 20, -0.3],
      [0, 20],
    ] as const
    const [a, b] = [polyline(corners), oldPolyline(corners)].map((entity) => read({ entities: [entity] }))
    expect(a?.loops).toEqual(b?.loops)
  })

  it('the frame of a fitted polyline is not its outline', () => {
    const frame = groups([0, 'VERTEX'], [8, '0'], [10, 500], [20, 500], [70, 16])
    const fitted = oldPolyline(
      [
        [0, 0],
        [9, 0],
        [9, 9],
      ],
      5,
    ).replace('0\nSEQEND', `${frame}0\nSEQEND`)
    expect(areas(read({ entities: [fitted] }))).toEqual([40.5])
  })

  it('drawn from the back: mirrored about the y axis', () => {
    const back = groups([210, 0], [220, 0], [230, -1])
    const half = [arc(10, 0, 5, 90, 270) + back, line(-10, 5, -10, -5)]
    const reading = read({ entities: half })
    expect(reading.loops[0]?.bounds).toEqual({
      minX: -10,
      maxX: expect.closeTo(-5, 12),
      minY: expect.closeTo(-5, 12),
      maxY: expect.closeTo(5, 12),
    })
    expect(notice(reading, 'extrusion-mirrored')?.count).toBe(1)
    expect(areas(reading)[0]).toBeCloseTo((25 * Math.PI) / 2, 10)
  })

  it('tilted out of the page: reported, not read', () => {
    const askew = groups([210, 0], [220, 0.6], [230, 0.8])
    const reading = read({ entities: [square(0, 0, 10), circle(50, 50, 5) + askew] })
    expect(areas(reading)).toEqual([100])
    expect(notice(reading, 'not-planar')?.count).toBe(1)
    expect(reading.entities).toContainEqual({ type: 'CIRCLE', read: 0, ignored: 1 })
  })

  it('an ellipse within the tolerance: area π·a·b', () => {
    const ellipse = groups([0, 'ELLIPSE'], [8, '0'], [10, 0], [20, 0], [11, 30], [21, 40], [40, 0.4])
    for (const arcTolerance of [0.1, 0.001]) {
      const reading = read({ entities: [ellipse] }, { arcTolerance })
      const error = Math.abs((areas(reading)[0] ?? 0) - Math.PI * 50 * 20)
      expect(error).toBeLessThan(arcTolerance * (reading.loops[0]?.length ?? 0))
      expect(notice(reading, 'ellipse-approximated')?.count).toBe(1)
      // Every corner of the approximation lies on the ellipse.
      for (const { x, y } of reading.loops[0]?.vertices ?? []) {
        const [along, across] = [(0.6 * x + 0.8 * y) / 50, (0.6 * y - 0.8 * x) / 20]
        expect(Math.hypot(along, across)).toBeGreaterThan(1 - arcTolerance / 20)
        expect(Math.hypot(along, across)).toBeLessThan(1 + arcTolerance / 20)
      }
    }
  })

  it('a rational spline that is a quarter circle becomes that arc', () => {
    const quarter = groups(
      [0, 'SPLINE'],
      [8, '0'],
      [70, 12],
      [71, 2],
      ...[0, 0, 0, 1, 1, 1].map((knot) => [40, knot] as const),
      ...[1, Math.SQRT1_2, 1].map((weight) => [41, weight] as const),
      [10, 20],
      [20, 0],
      [10, 20],
      [20, 20],
      [10, 0],
      [20, 20],
    )
    const reading = read({ entities: [quarter, line(0, 20, 0, 0), line(0, 0, 20, 0)] })
    expect(areas(reading)[0]).toBeCloseTo(100 * Math.PI, 8)
    const plain = quarter.replace(/41\n0\.7\d+\n/, '41\n1\n')
    const flatter = read({ entities: [plain, line(0, 20, 0, 0), line(0, 0, 20, 0)] })
    // The same frame with equal weights is a parabola: 20² − 20²/6 under it, by integration.
    expect(areas(flatter)[0]).toBeCloseTo(400 - 400 / 6, 1)
  })

  it('what draws no outline is counted', () => {
    const reading = read({ entities: [square(0, 0, 10), text(0, 0, 2, 'A'), text(0, 5, 2, 'B')] })
    expect(reading.entities).toContainEqual({ type: 'TEXT', read: 0, ignored: 2 })
    expect(notice(reading, 'entity-ignored')).toMatchObject({ count: 2, entity: 'TEXT' })
  })
})

describe('blocks', () => {
  it('are moved, turned, scaled, mirrored and repeated', () => {
    const reading = read({
      blocks: [
        block(
          'CUP',
          [
            polyline([
              [0, 0],
              [4, 0, 1],
              [4, 2],
              [0, 2],
            ]),
          ],
          [0, 0],
        ),
      ],
      entities: [insert('cup', 10, 20, [41, -2], [42, 2], [50, 90], [70, 2], [71, 3], [44, 30], [45, 40])],
    })
    const area = 4 * (8 + Math.PI / 2)
    expect(areas(reading)).toEqual(Array.from({ length: 6 }, () => expect.closeTo(area, 9)))
    for (const loop of reading.loops) expect(signedArea(loopFromVertices(loop.vertices))).toBeCloseTo(area, 9)
    // Columns run along the turned x axis, that is along y: 10 − (4…0) wide, −2·5 high before the turn.
    expect(reading.bounds).toEqual({
      minX: expect.closeTo(10 - 80 - 4, 9),
      maxX: expect.closeTo(10, 9),
      minY: expect.closeTo(20 - 10, 9),
      maxY: expect.closeTo(20 + 30, 9),
    })
  })

  it('within blocks, stretched: circles become ellipses', () => {
    const reading = read({
      blocks: [
        block('HOLE', [circle(0, 0, 5)]),
        block('PAIR', [insert('HOLE', 0, 0), insert('HOLE', 50, 0)]),
      ],
      entities: [insert('PAIR', 0, 0, [41, 2], [42, 1])],
    })
    expect(areas(reading)).toHaveLength(2)
    for (const area of areas(reading)) expect(area).toBeCloseTo(50 * Math.PI, 0)
    expect(notice(reading, 'ellipse-approximated')?.count).toBe(2)
  })

  it('bulges either way, stretched: the area grows by the determinant', () => {
    const blocks = [
      block('A', [
        polyline([
          [30, 0],
          [30, 20, -0.3],
          [0, 20],
          [0, 0, 0.4],
        ]),
      ]),
    ]
    const plain = areas(read({ blocks, entities: [insert('A', 0, 0)] }))[0] ?? 0
    for (const [x, y] of [
      [1.7, 0.6],
      [-1.7, 0.6],
      [3, -0.5],
    ] as const) {
      const reading = read(
        { blocks, entities: [insert('A', 5, 5, [41, x], [42, y], [50, 25])] },
        { arcTolerance: 0.001 },
      )
      expect(reading.loops).toHaveLength(1)
      expect(areas(reading)[0]).toBeGreaterThan(plain * Math.abs(x * y) - 0.2)
      expect(areas(reading)[0]).toBeLessThan(plain * Math.abs(x * y) + 0.2)
      expect(reading.loops[0]?.vertices.length).toBeLessThan(100)
    }
  })

  it('entities on layer 0 take the layer of the insertion; a missing block is reported', () => {
    const inserted = groups([0, 'INSERT'], [8, 'CUT'], [2, 'A'], [10, 0], [20, 0])
    const reading = read({
      blocks: [block('A', [circle(0, 0, 5), circle(30, 0, 5, 'DRILL')])],
      entities: [inserted, insert('ELSEWHERE', 5, 6)],
    })
    expect(reading.layers.map((layer) => layer.name)).toEqual(['CUT', 'DRILL'])
    expect(notice(reading, 'block-missing')?.places).toEqual([{ x: 5, y: 6 }])
  })
})

describe('units and size', () => {
  it('inches become millimetres; the user has the last word', () => {
    const inch = { units: 1, entities: [square(0, 0, 2)] }
    expect(areas(read(inch))[0]).toBeCloseTo(2580.64, 10)
    expect(areas(read(inch, { unit: 'mm' }))).toEqual([4])
  })

  it('says when the unit is undeclared, and asks when the size is unlikely', () => {
    const none = read({ entities: [square(0, 0, 100)] })
    expect(none.unit).toEqual({ declared: null, used: 'mm', suggested: null })
    expect(notice(none, 'unit-undeclared')).toBeDefined()
    const large = read({ units: 1, entities: [square(0, 0, 100)] })
    expect(large.unit.suggested).toBe('mm')
    expect(notice(large, 'unit-improbable')?.message).toContain('2540.0 mm')
  })

  it('reads a millimetre drawing that declares metres, with an error to answer', () => {
    const reading = read({ units: 6, entities: [square(0, 0, 250)] })
    expect(reading.unit).toEqual({ declared: 'm', used: 'mm', suggested: null })
    expect(notice(reading, 'unit-improbable')?.severity).toBe('error')
    expect(areas(reading)).toEqual([62_500])
  })

  it('a drawing far from its origin is moved to it', () => {
    const reading = read({ entities: [square(5_000_000.5, -7_000_000, 100)] })
    expect(reading.bounds).toEqual({ minX: 0.5, minY: 0, maxX: 100.5, maxY: 100 })
    expect(areas(reading)).toEqual([10_000])
    expect(notice(reading, 'origin-moved')).toBeDefined()
  })
})
