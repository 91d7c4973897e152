import { expect, test } from 'vitest'
import { contourArea } from '../../../shared/contours/check.ts'
import { contourAt } from '../../../shared/contours/contour.ts'
import { bodyOf, evaluate } from '../../../shared/evaluate/evaluate.ts'
import { levelsOf } from '../../../shared/walls/levels.ts'
import { randomRequest } from '../../support/requests.ts'

/**
 * Volume against the integral of the area of single contours, by Romberg's rule from one band to the next (the
 * trapezium rule, extrapolated): nothing is shared with the volume's own way.
 */
function integralOfArea(area: (depth: number) => number, from: number, to: number): number {
  const row: number[] = [((to - from) / 2) * (area(from) + area(to))]
  for (let k = 1; k <= 9; k++) {
    const steps = 2 ** k
    const h = (to - from) / steps
    let sum = 0
    for (let i = 1; i < steps; i += 2) sum += area(from + i * h)
    let value = row[0]! / 2 + h * sum
    for (let m = 0; m < k; m++) {
      const before = row[m]!
      row[m] = value
      value += (value - before) / (4 ** (m + 1) - 1)
    }
    row.push(value)
    if (k > 2 && Math.abs(row[k]! - row[k - 1]!) <= 1e-13 * Math.abs(row[k]!)) break
  }
  return row.at(-1)!
}

test('volume is the integral of the area, 150 plates of lines and arcs', () => {
  let compared = 0
  let worst = 0
  for (let seed = 1; compared < 150; seed++) {
    const request = randomRequest(seed, { steepest: 40, arcs: true, cuttable: false })
    const volume = request && evaluate(request).volume
    if (volume === null) continue
    const body = bodyOf(request!)
    const levels = levelsOf(body)
    const area = (depth: number) => contourArea(contourAt(body, depth))
    const sum = levels.slice(1).reduce((all, to, i) => all + integralOfArea(area, levels[i]!, to), 0)
    worst = Math.max(worst, Math.abs(sum / volume - 1))
    compared++
  }
  expect(worst).toBeLessThan(1e-10)
})
