import { describe, expect, test } from 'vitest'
import { bodyProblems } from '../../../shared/walls/check.ts'
import { offsetAt } from '../../../shared/walls/datum.ts'
import { levelsOf } from '../../../shared/walls/levels.ts'
import type { Datum, Wall } from '../../../shared/walls/types.ts'
import {
  facetIndexAt,
  outermostReach,
  reachAt,
  tiltAt,
  tiltNeverIncreases,
} from '../../../shared/walls/wall.ts'
import { DEGREE, facets, plate, rectangle, seeded } from '../../support/plates.ts'

const tan = (degrees: number) => Math.tan(degrees * DEGREE)
const double = facets([6, 30], [10, 0], [16, -25])

describe('a double bevel with a root face', () => {
  test('reach is the sum of t·tan β facet by facet', () => {
    expect(reachAt(double, 0)).toBe(0)
    expect(reachAt(double, 3)).toBeCloseTo(3 * tan(30), 14)
    expect(reachAt(double, 8)).toBeCloseTo(6 * tan(30), 14)
    expect(reachAt(double, 16)).toBeCloseTo(6 * tan(30) - 6 * tan(25), 14)
    expect(outermostReach(double)).toBeCloseTo(6 * tan(30), 14)
  })

  test('tilt is told just below a depth', () => {
    expect([0, 6, 10, 16].map((d) => facetIndexAt(double, d))).toEqual([0, 1, 2, 2])
    expect(tiltAt(double, 5.999)).toBe(30 * DEGREE)
  })

  test.each([
    ['top', 0, 16],
    ['bottom', 16, 0],
    ['root', 8, 0],
  ] as [Datum, number, number][])('datum %s: no offset at depth %f', (datum, depth, other) => {
    const body = plate(16, [rectangle(0, 0, 50, 50)], () => double, datum)
    expect(offsetAt(body, 0, 2, depth)).toBe(0)
    expect(offsetAt(body, 0, 2, other)).not.toBe(0)
    expect(levelsOf(body)).toEqual([0, 6, 10, 16])
  })
})

test('a straight jet can cut a wall exactly when no facet’s line, prolonged, enters the part', () => {
  const random = seeded(21)
  let cuttable = 0
  for (let i = 0; i < 400; i++) {
    const tilts = Array.from({ length: 1 + (i % 3) }, () => 90 * (random() - 0.5))
    if (random() < 0.5) tilts.sort((a, b) => b - a)
    const wall: Wall = facets(...tilts.map((tilt, k): [number, number] => [5 * (k + 1), tilt]))
    const end = 5 * tilts.length
    // Straight from the meaning: each line stays at or outside the wall all the way down.
    const clear = tilts.every((tilt, k) =>
      Array.from({ length: 61 }, (_, s) => (s * end) / 60).every((d) => {
        const onLine = reachAt(wall, 5 * k) + (d - 5 * k) * tan(tilt)
        return onLine >= reachAt(wall, d) - 1e-9
      }),
    )
    expect(tiltNeverIncreases(wall)).toBe(clear)
    if (clear) cuttable++
  }
  expect(cuttable).toBeGreaterThan(100)
  expect(cuttable).toBeLessThan(390)
})

test('the checker of bodies names what is wrong with its walls', () => {
  const drawn = rectangle(0, 0, 50, 50)
  const sound = plate(16, [drawn], () => double)
  expect(bodyProblems(sound)).toEqual([])
  const codes = (wall: Wall, thickness = 16) =>
    bodyProblems(plate(thickness, [drawn], (_, e) => (e === 1 ? wall : facets([thickness, 0])))).map(
      (p) => p.code,
    )
  expect(codes(facets([8, 10], [8, 5], [16, 0]))).toEqual(['facets-not-rising'])
  expect(codes(facets([8, 10]))).toEqual(['facets-end-elsewhere'])
  expect(codes(facets([16, 90]))).toEqual(['tilt'])
  expect(codes(double, NaN)).toContain('thickness')
  expect(bodyProblems({ ...sound, walls: [[]] }).map((p) => p.code)).toEqual(['walls-missing'])
})
