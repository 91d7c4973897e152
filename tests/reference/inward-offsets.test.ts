import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { contourArea, contourProblems } from '../../shared/contours/check.ts'
import { contourAt } from '../../shared/contours/contour.ts'
import { firstEvent } from '../../shared/events/event.ts'
import { plate } from '../support/plates.ts'

/**
 * Source: CGAL 6.0.1, exact weighted straight skeleton of 160 plates whose every edge moves inward at its own speed;
 * see figures/README.md. First events and areas above them.
 */
interface Row {
  readonly id: string
  readonly loops: readonly { readonly points: [number, number][]; readonly speeds: number[] }[]
  readonly firstEvent: number
  readonly areas: readonly { readonly depth: number; readonly area: number; readonly beforeEvent: boolean }[]
}

const figures = new URL('./figures/inward-offsets.jsonl', import.meta.url)
const rows = readFileSync(figures, 'utf8')
  .trim()
  .split('\n')
  .map((line) => JSON.parse(line) as Row)

function bodyOf(row: Row) {
  const thickness = 2 * Math.max(row.firstEvent, ...row.areas.map((area) => area.depth))
  const points = row.loops.map((loop) => loop.points.map(([x, y]) => ({ x, y })))
  return plate(thickness, points, (loop, edge) => ({
    facets: [{ depth: thickness, tilt: -Math.atan(row.loops[loop]!.speeds[edge]!) }],
  }))
}

describe('inward offsets against the exact weighted straight skeleton', () => {
  test('there are 160 plates', () => {
    expect(rows).toHaveLength(160)
  })

  test.each(rows.map((row) => [row.id, row] as const))('%s', (_, row) => {
    const body = bodyOf(row)
    const event = firstEvent(body)
    expect(Math.abs(event!.depth / row.firstEvent - 1)).toBeLessThan(1e-9)
    for (const { depth, area, beforeEvent } of row.areas) {
      if (!beforeEvent) continue
      const contour = contourAt(body, depth)
      expect(Math.abs(contourArea(contour) / area - 1)).toBeLessThan(1e-10)
      expect(contourProblems(contour)).toEqual([])
    }
  })
})
