// @vitest-environment jsdom
import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { beforeAll, describe, expect, test } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { EvaluatedContour } from '../../../shared/evaluate/schema.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import { segmentLength } from '../../../shared/geometry/segment.ts'
import { corpus } from '../../corpus/parts.ts'
import { pictureOf } from '../../gallery/picture.ts'

/**
 * Draws every part of the corpus to .gallery/ for a person to look at, and holds the pictures against the
 * evaluation: a contour that is drawn has its length and its area.
 */

const FOLDER = join(process.cwd(), '.gallery')

/** Arcs are drawn as chords of at most a degree: what that takes from length and area, and the rounding of the page. */
const CHORDS = 2e-4

interface Measure {
  readonly length: number
  readonly area: number
}

/** Of the polyline as drawn, back in mm: its length, and its area by the trapezium rule. */
function drawnMeasure(points: string, scale: number): Measure {
  const run = points.split(' ').map((pair) => pair.split(',').map(Number))
  let [length, area] = [0, 0]
  for (let i = 1; i < run.length; i++) {
    const [[ax, ay], [bx, by]] = [run[i - 1] as [number, number], run[i] as [number, number]]
    length += Math.hypot(bx - ax, by - ay) / scale
    // The page's Y runs down.
    area -= ((ax - bx) * (ay + by)) / 2 / scale ** 2
  }
  return { length, area }
}

/** Of a loop of the evaluation: sectors are added to the area of its chords. */
function measureOf(loop: EvaluatedContour['loops'][number]): Measure {
  let [length, area] = [0, 0]
  for (const segment of loopFromVertices(loop)) {
    const { from, to } = segment
    length += segmentLength(segment)
    area += (from.x * to.y - to.x * from.y) / 2
    if (segment.kind === 'arc') area += (segment.radius ** 2 * (segment.sweep - Math.sin(segment.sweep))) / 2
  }
  return { length, area }
}

beforeAll(() => {
  mkdirSync(FOLDER, { recursive: true })
})

describe.each(corpus)('$name', ({ name, request, ...part }) => {
  test('is drawn, and drawn true', { timeout: 60_000 }, () => {
    const svg = pictureOf({ name, request, ...part })
    writeFileSync(join(FOLDER, `${name}.svg`), svg)
    const document = new DOMParser().parseFromString(svg, 'image/svg+xml')
    expect(document.querySelector('parsererror')).toBeNull()
    expect(svg).not.toMatch(/NaN|Infinity|undefined|null/)
    const scale = Number(document.querySelector('#plan')?.getAttribute('data-scale'))
    const { contours } = evaluate(request)
    expect(contours.length).toBeGreaterThan(0)
    for (const { depth, loops } of contours) {
      const drawn = [...document.querySelectorAll(`#plan polyline[data-depth="${depth}"]`)]
      expect(drawn.length).toBe(loops.length)
      for (const [l, loop] of loops.entries()) {
        const is = drawnMeasure(drawn[l]!.getAttribute('points')!, scale)
        const should = measureOf(loop)
        expect(Math.abs(is.length / should.length - 1)).toBeLessThan(CHORDS)
        expect(Math.abs(is.area / should.area - 1)).toBeLessThan(CHORDS)
      }
    }
    expect(document.querySelectorAll('.pass').length).toBeGreaterThan(0)
    expect(document.querySelectorAll('.section .wall').length).toBeGreaterThan(0)
  })
})
