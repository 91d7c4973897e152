import * as z from 'zod'
import { radians } from '../units/angle.ts'
import { headKinds, type HeadKind, type HeadSpec } from './types.ts'

/** A head's motion as a person or a file tells it: degrees, degrees per second, mm, mm/min. */

const axisSchema = z.strictObject({
  from: z.number().min(-36_000).max(0).nullable().describe('degrees; null: turns endlessly'),
  to: z.number().min(0).max(36_000).nullable().describe('degrees; null: turns endlessly'),
  speed: z.number().gt(0).max(36_000).describe('degrees per second'),
})

export const headMotionSchema = z.strictObject({
  kind: z.enum(headKinds).describe('C-A: C about Z carries A about X; A-B: A about X carries B about Y'),
  pivotLength: z.number().min(0).max(2_000).describe('mm, nozzle tip to where the rotary axes cross'),
  outer: axisSchema.describe('C of C-A, A of A-B'),
  inner: axisSchema.describe('A of C-A, B of A-B'),
  tilt: z.number().gt(0).max(90).describe('degrees, mechanical limit of the whole tilt'),
  linearSpeed: z.number().gt(0).max(1_000_000).describe('mm/min, of tip and pivot'),
})
export type HeadMotion = z.infer<typeof headMotionSchema>

/**
 * Starting values, invented by us: no head's data sheet stands behind them. The limits of 60° are common practice (no
 * source); C winds one turn each way; a head of its length stands clear of clamps.
 */
export const startingMotion: Readonly<Record<HeadKind, HeadMotion>> = {
  'C-A': {
    kind: 'C-A',
    pivotLength: 150,
    outer: { from: -360, to: 360, speed: 180 },
    inner: { from: -60, to: 60, speed: 90 },
    tilt: 60,
    linearSpeed: 15_000,
  },
  'A-B': {
    kind: 'A-B',
    pivotLength: 150,
    outer: { from: -60, to: 60, speed: 90 },
    inner: { from: -60, to: 60, speed: 90 },
    tilt: 60,
    linearSpeed: 15_000,
  },
}

/** The same in the core's units. */
export function headSpec(motion: HeadMotion): HeadSpec {
  const axis = ({ from, to, speed }: HeadMotion['outer']) => ({
    from: from === null ? -Infinity : radians(from),
    to: to === null ? Infinity : radians(to),
    speed: radians(speed),
  })
  return {
    ...motion,
    outer: axis(motion.outer),
    inner: axis(motion.inner),
    tilt: radians(motion.tilt),
  }
}
