import { jetAt } from '../passes/jet-at.ts'
import { MoveKind, type JetPath, type Pass } from '../passes/types.ts'
import { TRAVEL_ROUNDING } from './half-turns.ts'
import { secondTiltOf, tiltOf } from './kinematics.ts'
import type { AxisColumns } from './turning-head.ts'
import type { AxisName, HeadKind, HeadProblem, HeadSpec, RotaryAxis } from './types.ts'

export function axisNames(kind: HeadKind): readonly [outer: AxisName, inner: AxisName] {
  return kind === 'C-A' ? ['C', 'A'] : ['A', 'B']
}

/** Stretches where the jet's whole tilt is past the mechanical limit: one per edge and stretch, at its worst. The jet is steepest at one end of a move, so stations tell all. */
export function tiltProblems(
  { p, q, edge }: JetPath,
  passes: readonly Pass[],
  { tilt }: HeadSpec,
): HeadProblem[] {
  const problems: HeadProblem[] = []
  const most = Math.tan(Math.min(tilt + TRAVEL_ROUNDING, Math.PI / 2)) ** 2
  const square = (i: number) => p[i]! * p[i]! + q[i]! * q[i]!
  for (const { first, last } of passes) {
    let worst = -1
    for (let i = first; i <= last + 1; i++) {
      const over = i <= last && square(i) > most
      if (worst >= 0 && (!over || edge[i] !== edge[worst])) {
        const value = tiltOf(p[worst]!, q[worst]!)
        const code = 'tilt-over-mechanical'
        problems.push({
          code,
          station: worst,
          edge: edge[worst]!,
          axis: null,
          value,
          limit: tilt,
          unwindAt: -1,
        })
        worst = -1
      }
      if (over && (worst < 0 || square(i) > square(worst))) worst = i
    }
  }
  return problems
}

/** Axes that leave their travel: per pass, axis and end of travel the first station and how far out the axis gets. */
export function travelProblems(
  path: JetPath,
  passes: readonly Pass[],
  head: HeadSpec,
  { outer, inner, dwell, crossing }: AxisColumns,
): HeadProblem[] {
  const problems: HeadProblem[] = []
  const [outerName, innerName] = axisNames(head.kind)
  for (const pass of passes) {
    const outerOut = makeOverrun(head.outer)
    const innerOut = makeOverrun(head.inner)
    for (let i = pass.first; i <= pass.last; i++) {
      note(outerOut, i, outer[i]!)
      if (dwell[i] !== 0) note(outerOut, i, outer[i]! - dwell[i]!)
      note(innerOut, i, inner[i]!)
      const part = crossing[i]!
      if (part !== 0) {
        note(outerOut, i, outer[i]! + path.sweep[i]! * part)
        note(outerOut, i, outer[i + 1]! - path.sweep[i]! * (1 - part))
      }
      if (head.kind === 'A-B' && i < pass.last && path.sweep[i] !== 0) noteRound(path, i, outerOut, innerOut)
    }
    report(path, pass, outerName, outerOut, problems)
    report(path, pass, innerName, innerOut, problems)
  }
  return problems
}

interface Overrun {
  readonly axis: RotaryAxis
  below: number
  lowest: number
  above: number
  highest: number
}

function makeOverrun(axis: RotaryAxis): Overrun {
  return {
    axis,
    below: -1,
    lowest: axis.from - TRAVEL_ROUNDING,
    above: -1,
    highest: axis.to + TRAVEL_ROUNDING,
  }
}

function note(overrun: Overrun, i: number, angle: number) {
  if (angle < overrun.lowest) {
    if (overrun.below < 0) overrun.below = i
    overrun.lowest = angle
  }
  if (angle > overrun.highest) {
    if (overrun.above < 0) overrun.above = i
    overrun.highest = angle
  }
}

/** Crossed tilts are largest inside a round move where the jet leans straight along X or Y: those four headings. */
function noteRound(path: JetPath, i: number, outerOut: Overrun, innerOut: Overrun) {
  const steepest = Math.max(tiltOf(path.p[i]!, path.q[i]!), tiltOf(path.p[i + 1]!, path.q[i + 1]!))
  const room = (o: Overrun) => Math.min(-o.axis.from, o.axis.to)
  if (steepest <= Math.min(room(outerOut), room(innerOut))) return
  const sweep = path.sweep[i]!
  const heading = Math.atan2(path.q[i]!, path.p[i]!)
  const [from, to] = sweep > 0 ? [heading, heading + sweep] : [heading + sweep, heading]
  for (let k = Math.ceil(from / (Math.PI / 2)); k * (Math.PI / 2) < to; k++) {
    const { p, q } = jetAt(path, i, (k * (Math.PI / 2) - heading) / sweep)
    note(outerOut, i, Math.atan(q))
    note(innerOut, i, secondTiltOf(p, q))
  }
}

function report(path: JetPath, pass: Pass, axis: AxisName, overrun: Overrun, problems: HeadProblem[]) {
  const add = (station: number, value: number, limit: number) => {
    const unwindAt = axis === 'C' ? turnBefore(path, pass, station) : -1
    const edge = path.edge[station]!
    problems.push({ code: 'travel-exceeded', station, edge, axis, value, limit, unwindAt })
  }
  if (overrun.below >= 0) add(overrun.below, overrun.lowest, overrun.axis.from)
  if (overrun.above >= 0) add(overrun.above, overrun.highest, overrun.axis.to)
}

/** The last turn through the waste that begins before a station. */
function turnBefore({ move }: JetPath, { first }: Pass, station: number): number {
  for (let i = station - 1; i >= first; i--) if (move[i] === MoveKind.turn) return i
  return -1
}
