import { jetAt } from '../passes/jet-at.ts'
import type { JetPath, Pass } from '../passes/types.ts'
import type { HeadProgram } from './program.ts'
import type { HeadAxes, HeadKind, HeadSpec, MotionTolerance } from './types.ts'

/**
 * Checkers: the head is turned by matrices, the jet laid through two points in space, and the program walked as a machine
 * walks it; none of the planning's formulas is used.
 */

export type HeadFaultCode =
  /** The nozzle points elsewhere; `value` in radians. */
  | 'off-direction'
  /** The tip is elsewhere; `value` in mm. */
  | 'off-place'
  /** The pivot is not a pivot length up the nozzle; `value` in mm. */
  | 'off-pivot'
  /** Out of travel though no problem says so; `value`: the angle. */
  | 'out-of-travel'
  /** A move is quicker than an axis; `value`: how many times. */
  | 'too-fast'
  /** A line goes back, or jumps to another station. */
  | 'out-of-order'

export interface HeadFault {
  readonly code: HeadFaultCode
  /** Station of the path, or line of the program. */
  readonly at: number
  readonly value: number
}

type Vec = readonly [number, number, number]

/** Rounding of angles and speeds in the comparison below: a part in 1e9. */
const ROUNDING = 1e-9

/** What is wrong with the angles at the stations; `direction` in radians. */
export function axesFaults(
  path: JetPath,
  passes: readonly Pass[],
  axes: HeadAxes,
  head: HeadSpec,
  direction: number,
): HeadFault[] {
  const faults: HeadFault[] = []
  const told = axes.problems.some(({ code }) => code === 'travel-exceeded')
  for (const { first, last } of passes) {
    for (let i = first; i <= last; i++) {
      const [outer, inner] = [axes.outer[i]!, axes.inner[i]!]
      const off = angleBetween(nozzle(axes.kind, outer, inner), jetUp(path.p[i]!, path.q[i]!))
      if (!(off <= direction)) faults.push({ code: 'off-direction', at: i, value: off })
      if (told) continue
      if (!inTravel(head.outer, outer)) faults.push({ code: 'out-of-travel', at: i, value: outer })
      if (!inTravel(head.inner, inner)) faults.push({ code: 'out-of-travel', at: i, value: inner })
    }
  }
  return faults
}

/** What is wrong with a program; each of its moves is looked at in `looks` places. */
export function programFaults(
  path: JetPath,
  program: HeadProgram,
  head: HeadSpec,
  standoff: number,
  tolerance: MotionTolerance,
  looks: number,
): HeadFault[] {
  const faults: HeadFault[] = []
  let begin = 0
  for (const end of program.ends) {
    for (let i = begin; i < end; i++) {
      checkPivot(program, i, head, faults)
      if (i + 1 < end) checkMove(path, program, i, head, standoff, tolerance, looks, faults)
    }
    begin = end
  }
  return faults
}

function checkPivot(program: HeadProgram, i: number, { kind, pivotLength }: HeadSpec, faults: HeadFault[]) {
  const up = nozzle(kind, program.outer[i]!, program.inner[i]!)
  const off = Math.hypot(
    program.pivotX[i]! - program.x[i]! - pivotLength * up[0],
    program.pivotY[i]! - program.y[i]! - pivotLength * up[1],
    program.pivotZ[i]! - program.z[i]! - pivotLength * up[2],
  )
  if (!(off <= ROUNDING * (1 + pivotLength))) faults.push({ code: 'off-pivot', at: i, value: off })
}

function checkMove(
  path: JetPath,
  program: HeadProgram,
  i: number,
  head: HeadSpec,
  standoff: number,
  tolerance: MotionTolerance,
  looks: number,
  faults: HeadFault[],
) {
  const j = i + 1
  const { station, part, x, y, z, outer, inner, minutes } = program
  const at = station[i]!
  const [from, to] = [part[i]!, station[j] === at ? part[j]! : 1]
  if (!(to >= from && (station[j] === at || station[j] === at + 1)))
    faults.push({ code: 'out-of-order', at: i, value: to })
  let worst = 0
  let farthest = 0
  for (let k = 0; k <= looks; k++) {
    const v = k / looks
    const mix = (column: Float64Array) => column[i]! + v * (column[j]! - column[i]!)
    const jet = jetAt(path, at, from + v * (to - from))
    const up = jetUp(jet.p, jet.q)
    worst = Math.max(worst, angleBetween(nozzle(head.kind, mix(outer), mix(inner)), up))
    const tip = [jet.x + standoff * up[0], jet.y + standoff * up[1], standoff * up[2]] as const
    farthest = Math.max(farthest, Math.hypot(mix(x) - tip[0], mix(y) - tip[1], mix(z) - tip[2]))
  }
  if (!(worst <= tolerance.direction * (1 + ROUNDING)))
    faults.push({ code: 'off-direction', at: i, value: worst })
  if (!(farthest <= tolerance.position * (1 + ROUNDING)))
    faults.push({ code: 'off-place', at: i, value: farthest })
  const turns = [
    Math.abs(outer[j]! - outer[i]!) / head.outer.speed,
    Math.abs(inner[j]! - inner[i]!) / head.inner.speed,
    (60 * Math.hypot(x[j]! - x[i]!, y[j]! - y[i]!, z[j]! - z[i]!)) / head.linearSpeed,
  ]
  const speed = Math.max(...turns) / (60 * minutes[i]!)
  if (speed > 1 + ROUNDING) faults.push({ code: 'too-fast', at: i, value: speed })
}

/** The nozzle of a standing head, carried by the inner axis and then by the outer one. */
function nozzle(kind: HeadKind, outer: number, inner: number): Vec {
  return kind === 'C-A' ? aboutZ(outer, aboutX(inner, [0, 0, 1])) : aboutX(outer, aboutY(inner, [0, 0, 1]))
}

function aboutX(a: number, [x, y, z]: Vec): Vec {
  return [x, y * Math.cos(a) - z * Math.sin(a), y * Math.sin(a) + z * Math.cos(a)]
}

function aboutY(a: number, [x, y, z]: Vec): Vec {
  return [x * Math.cos(a) + z * Math.sin(a), y, z * Math.cos(a) - x * Math.sin(a)]
}

function aboutZ(a: number, [x, y, z]: Vec): Vec {
  return [x * Math.cos(a) - y * Math.sin(a), x * Math.sin(a) + y * Math.cos(a), z]
}

/** From the jet's point a millimetre deep up to the one on the top face. */
function jetUp(p: number, q: number): Vec {
  const length = Math.hypot(p, q, 1)
  return [-p / length, -q / length, 1 / length]
}

function angleBetween(a: Vec, b: Vec): number {
  return 2 * Math.asin(Math.min(1, Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]) / 2))
}

function inTravel({ from, to }: HeadSpec['outer'], angle: number): boolean {
  return angle >= from - ROUNDING && angle <= to + ROUNDING
}
