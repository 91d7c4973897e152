import { describe, expect, it } from 'vitest'
import { boundsOfLoops } from '../../../src/ui/loop-bounds.ts'
import { outlinePath, polylinePath, viewBoxOf } from '../../../src/ui/outline-path.ts'
import { placeBalloons } from '../../../src/ui/place-balloons.ts'

const square = [
  { x: 0, y: 0 },
  { x: 10, y: 0 },
  { x: 10, y: 20 },
]

describe('a path', () => {
  it('turns Y up and closes every loop', () => {
    expect(outlinePath([square])).toBe('M0 0L10 0L10 -20L0 0Z')
    expect(outlinePath([square, square])).toBe('M0 0L10 0L10 -20L0 0ZM0 0L10 0L10 -20L0 0Z')
    expect(polylinePath(square)).toBe('M0 0L10 0L10 -20')
    expect(outlinePath([[]])).toBe('')
  })

  it('draws a circle of two half turns with its radius', () => {
    const circle = [
      { x: -5, y: 0, bulge: 1 },
      { x: 5, y: 0, bulge: 1 },
    ]
    expect(outlinePath([circle])).toBe('M-5 0A5 5 0 0 0 5 0A5 5 0 0 0 -5 0Z')
  })

  // Derived: a quarter turn has bulge tan(90°/4); its chord of 10√2 belongs to a radius of 10.
  it('draws a quarter turn on the side that its sign says', () => {
    const bulge = Math.tan(Math.PI / 8)
    const left = [
      { x: 10, y: 0, bulge },
      { x: 0, y: 10 },
    ]
    const right = [
      { x: 10, y: 0, bulge: -bulge },
      { x: 0, y: 10 },
    ]
    expect(outlinePath([left])).toContain('A10 10 0 0 0 0 -10')
    expect(outlinePath([right])).toContain('A10 10 0 0 1 0 -10')
  })

  // Derived: three quarters of a turn has bulge tan(270°/4) = 1 + √2, the same chord and radius.
  it('takes the large arc past half a turn', () => {
    const loop = [
      { x: 10, y: 0, bulge: Math.tan((3 * Math.PI) / 8) },
      { x: 0, y: 10 },
    ]
    expect(outlinePath([loop])).toContain('A10 10 0 1 0 0 -10')
  })
})

describe('what a picture shows', () => {
  it('fits the bounds with a margin of the longer side', () => {
    expect(viewBoxOf({ minX: 10, minY: 20, maxX: 110, maxY: 70 }, 0.1)).toBe('0 -80 120 70')
  })

  it('holds a whole circle though its vertices stand on a line', () => {
    const circle = [
      { x: -5, y: 0, bulge: 1 },
      { x: 5, y: 0, bulge: 1 },
    ]
    expect(boundsOfLoops([circle])).toEqual({ minX: -5, minY: -5, maxX: 5, maxY: 5 })
  })

  it('bulges to the right of the way for a counter-clockwise arc', () => {
    const loop = [
      { x: 0, y: 0, bulge: 1 },
      { x: 10, y: 0 },
    ]
    expect(boundsOfLoops([loop])).toEqual({ minX: 0, minY: -5, maxX: 10, maxY: 0 })
  })
})

describe('balloons', () => {
  const box = { width: 400, height: 300 }
  const apart = (a: { x: number; y: number }, b: { x: number; y: number }) => Math.hypot(a.x - b.x, a.y - b.y)

  it('stand apart from each other though their places are one', () => {
    const spots = placeBalloons(
      Array.from({ length: 12 }, () => ({ x: 200, y: 150 })),
      box,
      11,
    )
    for (const [i, a] of spots.entries())
      for (const b of spots.slice(i + 1)) expect(apart(a, b)).toBeGreaterThanOrEqual(22)
  })

  it('stay inside the box at its corners', () => {
    const corners = [
      { x: 0, y: 0 },
      { x: 400, y: 0 },
      { x: 400, y: 300 },
      { x: 0, y: 300 },
    ]
    for (const { x, y } of placeBalloons(corners, box, 11)) {
      expect(x).toBeGreaterThanOrEqual(11)
      expect(x).toBeLessThanOrEqual(389)
      expect(y).toBeGreaterThanOrEqual(11)
      expect(y).toBeLessThanOrEqual(289)
    }
  })

  it('are all placed even where there is no room', () => {
    expect(
      placeBalloons(
        Array.from({ length: 90 }, () => ({ x: 5, y: 5 })),
        { width: 30, height: 30 },
        11,
      ),
    ).toHaveLength(90)
  })
})
