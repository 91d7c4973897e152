import type { ArcSegment, Loop, Point } from './types.ts'
import { pointAt } from './segment.ts'

/**
 * Chords needed for an arc so that none departs from it by more than `chordTolerance` (mm): a chord of turn a
 * on radius r has a sagitta of r(1 − cos(a/2)). At least one chord for every quarter turn, so that a small
 * circle still looks like one.
 */
export function chordCount(radius: number, sweep: number, chordTolerance: number): number {
  const quarters = Math.max(1, Math.ceil(Math.abs(sweep) / (Math.PI / 2) - 1e-9))
  if (!(chordTolerance > 0) || radius <= chordTolerance) return quarters
  const widest = 2 * Math.acos(1 - chordTolerance / radius)
  return Math.max(quarters, Math.ceil(Math.abs(sweep) / widest - 1e-9))
}

/** The arc's points from start to end, both included exactly. */
export function sampleArc(arc: ArcSegment, chordTolerance: number): Point[] {
  const count = chordCount(arc.radius, arc.sweep, chordTolerance)
  return Array.from({ length: count + 1 }, (_, i) => pointAt(arc, i / count))
}

/** A polygon for the loop; every corner is kept, the last point does not repeat the first. */
export function sampleLoop(loop: Loop, chordTolerance: number): Point[] {
  return loop.flatMap((segment) =>
    segment.kind === 'line' ? [segment.from] : sampleArc(segment, chordTolerance).slice(0, -1),
  )
}
