import { describe, expect, it } from 'vitest'
import { dxfBytes, polyline } from '../../../server/demo/dxf-text.ts'
import { readDrawing } from '../../../shared/drawing/read.ts'
import type { ReadingOptions } from '../../../shared/drawing/schema.ts'

type Corner = readonly [number, number]

/** Corners of a regular polygon, or of part of one. */
function ring(sides: number, radius: number, from = 0, to = 2 * Math.PI): Corner[] {
  return Array.from({ length: sides }, (_, i) => {
    const angle = from + (i * (to - from)) / sides
    return [radius * Math.cos(angle), radius * Math.sin(angle)] as const
  })
}

const read = (corners: readonly Corner[], options: ReadingOptions = {}) =>
  readDrawing(dxfBytes({ units: 4, entities: [polyline(corners)] }), options)

describe('runs of short lines', () => {
  it('a finely divided circle becomes two arcs of its radius', () => {
    const reading = read(ring(360, 50))
    expect(reading.loops[0]?.vertices).toHaveLength(2)
    expect(reading.loops[0]?.area).toBeCloseTo(Math.PI * 2500, 6)
    expect(reading.notices.find((n) => n.code === 'arc-recognised')?.count).toBe(2)
  })

  it('can be left alone', () => {
    const reading = read(ring(360, 50), { recogniseArcs: false })
    expect(reading.loops[0]?.vertices).toHaveLength(360)
  })

  it('polygons stay polygons, however wide the tolerance', () => {
    for (const sides of [3, 4, 6, 8, 12, 20]) {
      const reading = read(ring(sides, 20), { arcTolerance: 1 })
      expect(reading.loops[0]?.vertices).toHaveLength(sides)
    }
  })

  it('a polygon whose flats stand off the circle by more than the tolerance stays one', () => {
    // Flats of a 48-gon of radius 100 stand off by 0.214 mm.
    expect(read(ring(48, 100), { arcTolerance: 0.2 }).loops[0]?.vertices).toHaveLength(48)
    expect(read(ring(48, 100), { arcTolerance: 0.22 }).loops[0]?.vertices).toHaveLength(2)
  })

  it('a slot keeps its straight sides; its ends become arcs', () => {
    const slot: Corner[] = [
      ...ring(90, 10, -Math.PI / 2, Math.PI / 2).map(([x, y]) => [x + 40, y] as const),
      [40, 10],
      ...ring(90, 10, Math.PI / 2, (3 * Math.PI) / 2),
      [0, -10],
    ]
    const reading = read(slot)
    const [loop] = reading.loops
    expect(loop?.vertices).toHaveLength(4)
    expect(loop?.area).toBeCloseTo(800 + 100 * Math.PI, 6)
  })

  it('corners of the drawing stay where they are', () => {
    const corners: Corner[] = [...ring(60, 30, 0, Math.PI / 2), [0, 30], [-20, 0]]
    const vertices = read(corners).loops[0]?.vertices ?? []
    expect(vertices.map(({ x, y }) => [x, y])).toEqual(
      expect.arrayContaining([
        [30, 0],
        [0, 30],
        [-20, 0],
      ]),
    )
    expect(vertices).toHaveLength(3)
  })

  it('an S of two arcs is not read as one', () => {
    const s: Corner[] = [
      ...ring(40, 20, Math.PI, Math.PI / 2),
      ...ring(40, 20, -Math.PI / 2, 0).map(([x, y]) => [x, y + 40] as const),
      [20, 40],
      [60, 40],
      [60, -40],
      [-20, -40],
    ]
    const bulges = (read(s).loops[0]?.vertices ?? [])
      .filter((vertex) => vertex.bulge)
      .map((v) => Math.sign(v.bulge ?? 0))
    expect(bulges.sort()).toEqual([-1, 1])
  })
})
