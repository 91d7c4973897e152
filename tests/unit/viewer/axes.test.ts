import { expect, test } from 'vitest'
import { basisOf } from '../../../src/viewer/camera/view-state.ts'
import { axisArms } from '../../../src/viewer/overlay/axes.ts'

const arms = (azimuth: number, elevation: number) =>
  Object.fromEntries(axisArms(basisOf({ azimuth, elevation })).map((arm) => [arm.name, arm]))

test('from the top X points right, Y up, and Z at the eye has no letter', () => {
  const { X, Y, Z } = arms(0, Math.PI / 2)
  expect(X!.x).toBeCloseTo(15)
  expect(X!.y).toBeCloseTo(0)
  expect(Y!.x).toBeCloseTo(0)
  expect(Y!.y).toBeCloseTo(-15)
  expect(Z!.letter).toBeNull()
  expect(Z!.away).toBe(false)
})

test('from the front Y points away, from the back it points at the eye', () => {
  expect(arms(0, 0).Y!.away).toBe(true)
  expect(arms(Math.PI, 0).Y!.away).toBe(false)
  expect(arms(Math.PI, 0).X!.x).toBeCloseTo(-15)
})
