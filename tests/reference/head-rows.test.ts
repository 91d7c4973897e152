import { expect, test } from 'vitest'
import { axesAlong } from '../../shared/head/axes-along.ts'
import { toolVector } from '../../shared/head/kinematics.ts'
import { headSpec, startingMotion } from '../../shared/head/schema.ts'
import { MoveKind, type JetPath } from '../../shared/passes/types.ts'
import { radians } from '../../shared/units/angle.ts'

/**
 * Source: rows of the C-A tool vector (sin C sin A, −cos C sin A, cos A), by our own algebra from axes named as in ISO 841:
 * A, B and C about X, Y and Z, positive counter-clockwise seen from the positive end.
 */
const rows = [
  [30, 90, [0.5, 0, 0.866025]],
  [45, -120, [-0.612372, 0.353553, 0.707107]],
  [10, 200, [-0.059391, 0.163176, 0.984808]],
] as const

/** The rows are rounded to six places. */
const HALF_A_DIGIT = 5.1e-7

test.each(rows)('A %d°, C %d° to the tool vector', (a, c, vector) => {
  const { x, y, z } = toolVector('C-A', { outer: radians(c), inner: radians(a) })
  for (const [k, told] of [x, y, z].entries())
    expect(Math.abs(told - vector[k]!)).toBeLessThanOrEqual(HALF_A_DIGIT)
})

test.each(rows)('a jet along that vector needs A %d°, C %d°', (a, c, [x, y, z]) => {
  // The axis seen downward: its slope per mm of depth is −(x, y)/z.
  const column = (value: number) => new Float64Array([value])
  const path: JetPath = {
    count: 1,
    x: column(0),
    y: column(0),
    p: column(-x / z),
    q: column(-y / z),
    move: new Uint8Array([MoveKind.end]),
    edge: new Int32Array([-1]),
    facet: new Uint8Array(1),
    sweep: column(0),
    cx: column(0),
    cy: column(0),
  }
  const pass = { loop: 0, first: 0, last: 0, closed: false, level: 0, reasons: [] }
  const { outer, inner } = axesAlong(path, [pass], headSpec(startingMotion['C-A']))
  // Six places of a vector that is short sideways (sin 10°) are 3e-6 of an angle.
  expect(Math.abs(inner[0]! - radians(a))).toBeLessThan(3e-6)
  const turns = (outer[0]! - radians(c)) / (2 * Math.PI)
  expect(Math.abs(turns - Math.round(turns)) * 2 * Math.PI).toBeLessThan(6e-6)
})
