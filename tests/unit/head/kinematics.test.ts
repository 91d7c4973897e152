import { expect, test } from 'vitest'
import {
  axesOf,
  lessTurns,
  nearestTilt,
  tipAndPivot,
  toolVector,
  upOfSlope,
} from '../../../shared/head/kinematics.ts'
import { headKinds } from '../../../shared/head/types.ts'
import { DEGREE, seeded } from '../../support/plates.ts'

/** Unit vectors are compared to a few roundings. */
const EXACT = 14

test('a jet that leans outward along X with depth has its nozzle on the other side', () => {
  const up = upOfSlope(Math.tan(30 * DEGREE), 0)
  expect(up.x).toBeCloseTo(-0.5, EXACT)
  expect(up.z).toBeCloseTo(Math.sqrt(3) / 2, EXACT)
})

test('crossed tilts: A about X carries B about Y', () => {
  expect(toolVector('A-B', { outer: 30 * DEGREE, inner: 0 }).y).toBeCloseTo(-0.5, EXACT)
  expect(toolVector('A-B', { outer: 0, inner: 30 * DEGREE }).x).toBeCloseTo(0.5, EXACT)
  // B is carried, so with both at 45° it is B whose lean is whole: (√½, −½, ½).
  const both = toolVector('A-B', { outer: 45 * DEGREE, inner: 45 * DEGREE })
  expect(both.x).toBeCloseTo(Math.SQRT1_2, EXACT)
  expect(both.y).toBeCloseTo(-0.5, EXACT)
})

test.each(headKinds)('%s: forward and inverse, both branches, 2,000 slopes to 80°', (kind) => {
  const random = seeded(7)
  for (let n = 0; n < 2000; n++) {
    const slope = Math.tan(80 * DEGREE * random() ** 3)
    const heading = 2 * Math.PI * random()
    const [p, q] = [slope * Math.cos(heading), slope * Math.sin(heading)]
    const wanted = upOfSlope(p, q)
    const branches = axesOf(kind, p, q)
    for (const angles of branches) {
      const told = toolVector(kind, angles)
      expect(Math.hypot(told.x - wanted.x, told.y - wanted.y, told.z - wanted.z)).toBeLessThan(1e-14)
    }
    expect(Math.abs(branches[0].outer)).toBeLessThanOrEqual(Math.PI)
    expect(Math.abs(branches[0].inner)).toBeLessThan(Math.PI / 2)
    const other = kind === 'C-A' ? -branches[0].inner : Math.PI - branches[0].inner
    expect(branches[1].inner).toBe(other)
  }
})

test('the nearest tilt for a given C is nearer than its neighbours, and exact on the heading', () => {
  const random = seeded(8)
  for (let n = 0; n < 200; n++) {
    const [p, q, c] = [random() - 0.5, random() - 0.5, 7 * random()]
    const up = upOfSlope(p, q)
    const off = (inner: number) => {
      const told = toolVector('C-A', { outer: c, inner })
      return Math.hypot(told.x - up.x, told.y - up.y, told.z - up.z)
    }
    const best = nearestTilt(p, q, c)
    expect(off(best)).toBeLessThan(off(best + 1e-4))
    expect(off(best)).toBeLessThan(off(best - 1e-4))
    const exact = axesOf('C-A', p, q)
    expect(nearestTilt(p, q, exact[0].outer)).toBeCloseTo(exact[0].inner, 13)
    expect(nearestTilt(p, q, exact[1].outer)).toBeCloseTo(exact[1].inner, 13)
  }
})

test('tip at the stand-off and pivot a pivot length further up the nozzle', () => {
  const { tip, pivot } = tipAndPivot(10, 20, upOfSlope(Math.tan(30 * DEGREE), 0), 4, 100)
  expect(tip.x).toBeCloseTo(10 - 2, 12)
  expect(tip.z).toBeCloseTo(4 * Math.cos(30 * DEGREE), 12)
  expect(pivot.x).toBeCloseTo(10 - 52, 12)
  expect(pivot.z).toBeCloseTo(104 * Math.cos(30 * DEGREE), 12)
})

test('angles less whole turns', () => {
  expect(lessTurns(7 * Math.PI + 0.25)).toBeCloseTo(-Math.PI + 0.25, 12)
  expect(lessTurns(-0.5)).toBe(-0.5)
})
