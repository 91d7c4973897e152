import type { HeadKind } from './types.ts'

/** From angles to the nozzle's direction and back. Radians. */

export interface Vector {
  readonly x: number
  readonly y: number
  readonly z: number
}

export interface AxisAngles {
  readonly outer: number
  readonly inner: number
}

/** Unit vector up along the nozzle. */
export function toolVector(kind: HeadKind, { outer, inner }: AxisAngles): Vector {
  const [so, co, si, ci] = [Math.sin(outer), Math.cos(outer), Math.sin(inner), Math.cos(inner)]
  return kind === 'C-A' ? { x: so * si, y: -co * si, z: ci } : { x: si, y: -so * ci, z: co * ci }
}

/** Unit vector up along a jet of the given slope: (−p, −q, 1), as the slope is told per mm of depth. */
export function upOfSlope(p: number, q: number): Vector {
  const size = Math.sqrt(1 + p * p + q * q)
  return { x: -p / size, y: -q / size, z: 1 / size }
}

/**
 * Both answers for a jet's slope. The first is the usual one, C-A: A from 0 to 90°, C in (−180°, 180°]; A-B: both within
 * ±90°. The second of a C-A head is (C + 180°, −A). The second of an A-B head is (A + 180°, 180° − B): it puts the head
 * upside down and no plate on a table has a use for it. C of a vertical jet is free; 0 is told.
 */
export function axesOf(kind: HeadKind, p: number, q: number): readonly [AxisAngles, AxisAngles] {
  if (kind === 'C-A') {
    const inner = tiltOf(p, q)
    const outer = inner === 0 ? 0 : headingOf(p, q)
    return [
      { outer, inner },
      { outer: outer + Math.PI, inner: -inner },
    ]
  }
  const outer = Math.atan(q)
  const inner = secondTiltOf(p, q)
  return [
    { outer, inner },
    { outer: outer + Math.PI, inner: Math.PI - inner },
  ]
}

/** Whole tilt: A of a C-A head, positive. */
export function tiltOf(p: number, q: number): number {
  return Math.atan(Math.sqrt(p * p + q * q))
}

/** C of a C-A head with A ≥ 0; the slope's own heading less a quarter turn. */
export function headingOf(p: number, q: number): number {
  return Math.atan2(-p, q)
}

/** B of an A-B head; its A is atan q. */
export function secondTiltOf(p: number, q: number): number {
  return Math.atan(-p / Math.sqrt(1 + q * q))
}

/**
 * A that comes nearest to the wanted jet when C is given: the foot of the wanted direction on the plane in which A
 * tilts, tan A = −p sin C + q cos C. Negative on the other branch. What is left is the angle of the wanted direction from that plane.
 */
export function nearestTilt(p: number, q: number, c: number): number {
  if (p === 0 && q === 0) return 0
  return Math.atan(q * Math.cos(c) - p * Math.sin(c))
}

/** Nozzle tip, on the axis at the stand-off above the top face, and the pivot, for a jet at (x, y). mm. */
export function tipAndPivot(
  x: number,
  y: number,
  up: Vector,
  standoff: number,
  pivotLength: number,
): { readonly tip: Vector; readonly pivot: Vector } {
  const along = (length: number) => ({ x: x + length * up.x, y: y + length * up.y, z: length * up.z })
  return { tip: along(standoff), pivot: along(standoff + pivotLength) }
}

/** The angle less whole turns, within ±π. */
export function lessTurns(angle: number): number {
  return angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI))
}
