import * as fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  axisTop,
  breachesOf,
  cellAt,
  cellsOf,
  drawnCells,
  labelled,
  perimeterOf,
  tiltAt,
  tiltLine,
  type StripEdge,
} from '../../../src/features/bench/model/strip.ts'

const edges: StripEdge[] = [
  { edge: 0, length: 100, tilt: 45, cornerTilt: 54.74 },
  { edge: 1, length: 60, tilt: 45, cornerTilt: 54.74 },
  { edge: 2, length: 30, tilt: 0, cornerTilt: null },
]

describe('the wall strip', () => {
  it('unrolls the perimeter without gaps', () => {
    expect(cellsOf(edges)).toEqual([
      { edge: 0, from: 0, to: 100 },
      { edge: 1, from: 100, to: 160 },
      { edge: 2, from: 160, to: 190 },
    ])
    expect(perimeterOf(edges)).toBe(190)
    expect(cellAt(cellsOf(edges), 120)?.edge).toBe(1)
    expect(cellAt(cellsOf(edges), 191)).toBeNull()
  })

  it('is a plateau along an edge and reaches the seam’s tilt at its corner', () => {
    const line = tiltLine(edges, 20)
    expect(tiltAt(line, 50)).toBe(45)
    expect(tiltAt(line, 100)).toBe(54.74)
    expect(tiltAt(line, 90)).toBeCloseTo((45 + 54.74) / 2, 12)
    expect(tiltAt(line, 80)).toBe(45)
  })

  it('steps where there is no single seam', () => {
    const line = tiltLine(edges, 20)
    expect(tiltAt(line, 160)).toBe(45)
    expect(tiltAt(line, 161)).toBe(0)
  })

  it('closes: the line ends where it began', () => {
    const line = tiltLine(edges, 20)
    expect(line[0]).toEqual({ s: 0, tilt: 54.74 })
    expect(line.at(-1)).toEqual({ s: 190, tilt: 54.74 })
  })

  it('shades exactly what lies above the limit', () => {
    const line = tiltLine(edges, 20)
    const breaches = breachesOf(line, 50)
    // 54.74 at the corner falls to 45 over 20 mm, so 50 is crossed (4.74 / 9.74) of the way down
    const reach = (20 * 4.74) / 9.74
    expect(breaches.map(({ from, to }) => [from, to])).toEqual([
      [0, expect.closeTo(reach, 9)],
      [expect.closeTo(100 - reach, 9), expect.closeTo(100 + reach, 9)],
      // e3 is 30 mm long, so its ramp is 10 mm: from 0 to 54.74, past 50 for the last 4.74 / 54.74 of it
      [expect.closeTo(190 - (10 * 4.74) / 54.74, 9), 190],
    ])
    expect(breachesOf(line, 54.74)).toEqual([])
  })

  it('finds breaches that agree with the line at any place', () => {
    const edge = fc.record({
      length: fc.double({ min: 1, max: 500, noNaN: true }),
      tilt: fc.double({ min: 0, max: 80, noNaN: true }),
      cornerTilt: fc.option(fc.double({ min: 0, max: 85, noNaN: true })),
    })
    fc.assert(
      fc.property(
        fc.array(edge, { minLength: 1, maxLength: 12 }),
        fc.double({ min: 1, max: 80, noNaN: true }),
        fc.double({ min: 0.001, max: 0.999, noNaN: true }),
        (list, limit, share) => {
          const line = tiltLine(
            list.map((each, i) => ({ ...each, edge: i })),
            20,
          )
          const s = share * line.at(-1)!.s
          const tilt = tiltAt(line, s)!
          const within = breachesOf(line, limit).some(({ from, to }) => s >= from && s <= to)
          if (Math.abs(tilt - limit) > 1e-6) expect(within).toBe(tilt > limit)
        },
      ),
      { seed: 20_260_301, numRuns: 300 },
    )
  })

  it('draws neighbours that are too narrow as one, and loses none', () => {
    const cells = cellsOf(
      Array.from({ length: 1_000 }, (_, edge) => ({
        edge,
        length: edge === 500 ? 80 : 0.3,
        tilt: 0,
        cornerTilt: null,
      })),
    )
    const drawn = drawnCells(cells, 2)
    expect(drawn.flatMap((cell) => cell.edges)).toEqual(cells.map(({ edge }) => edge))
    expect(drawn.length).toBeLessThan(200)
    expect(drawn.find(({ edges: [first] }) => first === 500)?.edges).toEqual([500])
    expect(drawn.every((cell, i) => i === 0 || cell.from === drawn[i - 1]!.to)).toBe(true)
  })

  it('names only cells that have room for their name', () => {
    const cells = drawnCells(cellsOf(edges), 1)
    expect([...labelled(cells, () => 50)]).toEqual([0, 1])
  })

  it('ends its axis above the line and the limits', () => {
    const line = tiltLine(edges, 20)
    expect(axisTop(line, [55, 60])).toBe(75)
    expect(axisTop(line, [])).toBe(60)
    expect(axisTop([], [])).toBe(30)
  })
})
