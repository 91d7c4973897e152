import { expect, test } from 'vitest'
import { axesAlong } from '../../../shared/head/axes-along.ts'
import { axesFaults, programFaults } from '../../../shared/head/check.ts'
import { refine } from '../../../shared/head/refine.ts'
import { DIRECTION_TOLERANCE, headKinds, POSITION_TOLERANCE } from '../../../shared/head/types.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { circle, DEGREE, facets, plate, seeded, star } from '../../support/plates.ts'
import { headOf, pathFrom, type Station } from './paths.ts'

/** Degrees of rounding in a sum of a few turns. */
const ROUNDING = 1e-6

interface Run {
  readonly from: number
  readonly to: number
}

/** Least turning at the uprights between runs over every choice of half turns in travel; null where a run never fits. */
function leastTurning(runs: readonly Run[], travel: number): number | null {
  let best: number | null = null
  const go = (r: number, at: number, sum: number) => {
    if (best !== null && sum >= best) return
    if (r === runs.length) {
      best = sum
      return
    }
    const { from, to } = runs[r]!
    for (let k = -8; k <= 8; k++) {
      const [start, end] = [from + 180 * k, to + 180 * k]
      if (Math.max(Math.abs(start), Math.abs(end)) > travel + ROUNDING) continue
      go(r + 1, end, r === 0 ? 0 : sum + Math.abs(start - at))
    }
  }
  go(0, 0, 0)
  return best
}

test('150 random passes: no other choice of branches and turns in travel turns less', () => {
  const random = seeded(5)
  let chosen = 0
  for (let n = 0; n < 150; n++) {
    const travel = [180, 270, 360][n % 3]!
    const head = headOf('C-A', { outer: { from: -travel, to: travel, speed: 180 } })
    const runs: Run[] = []
    const stations: Station[] = []
    for (let r = 0; r < 5; r++) {
      const heading = 360 * random()
      const turn = 200 * (random() - 0.5) * (1 + Math.floor(2 * random()))
      if (r > 0) stations.push({ x: stations.length, y: 0, tilt: 0 })
      // Two moves of less than half a turn each.
      for (const part of [0, 0.5, 1])
        stations.push({ x: stations.length, y: 0, tilt: 20, heading: heading + part * turn })
      runs.push({ from: heading - 90, to: heading - 90 + turn })
    }
    const least = leastTurning(runs, travel)
    const { path, passes } = pathFrom(stations)
    const axes = axesAlong(path, passes, head)
    expect(axesFaults(path, passes, axes, head, DIRECTION_TOLERANCE)).toEqual([])
    expect(axes.problems.length > 0).toBe(least === null)
    if (least === null) continue
    const turned = axes.dwell.reduce((sum, turn) => sum + Math.abs(turn), 0) / DEGREE
    expect(Math.abs(turned - least)).toBeLessThan(ROUNDING)
    chosen++
  }
  expect(chosen).toBeGreaterThan(100)
})

test.each(headKinds)('%s: the passes of plates with bevels of both signs, a hole, a taper alone', (kind) => {
  const random = seeded(11)
  const head = headOf(kind, { tilt: 90 })
  const endless = { from: -Infinity, to: Infinity, speed: Math.PI }
  const jet = { kerf: 1, taper: 0.4 * DEGREE }
  for (const tilts of [[0], [30], [-20, 0, 25]]) {
    const outline = star(random, 7, 60, 90)
    const body = plate(12, [outline, circle(0, 0, 12, true)], (_, e) =>
      facets([5, tilts[e % tilts.length]!], [12, Math.min(0, tilts[e % tilts.length]!)]),
    )
    const { path, passes } = passesOf(body, jet, { tilt: null })
    const free = { ...head, outer: endless, inner: endless }
    const axes = axesAlong(path, passes, free)
    expect(axesFaults(path, passes, axes, free, DIRECTION_TOLERANCE)).toEqual([])
    const program = refine(path, passes, axes, free, 3)
    const within = { direction: DIRECTION_TOLERANCE, position: POSITION_TOLERANCE }
    expect(programFaults(path, program, free, 3, within, 11)).toEqual([])
    expect(program.ends).toHaveLength(passes.length)
  }
})
