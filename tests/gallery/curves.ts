import { loopFromVertices } from '../../shared/geometry/bulge.ts'
import { pointAt } from '../../shared/geometry/segment.ts'
import type { Point, Vertex } from '../../shared/geometry/types.ts'
import { jetAt, type JetLine } from '../../shared/passes/jet-at.ts'
import type { JetPath } from '../../shared/passes/types.ts'

/** Curves as runs of points, a chord for every degree of turn. */

const CHORD = Math.PI / 180

/** A closed run: the first point stands again at the end. */
export function pointsOf(loop: readonly Vertex[]): Point[] {
  const all = loopFromVertices(loop).flatMap((segment) => {
    const chords = segment.kind === 'arc' ? Math.ceil(Math.abs(segment.sweep) / CHORD) : 1
    return Array.from({ length: chords }, (_, k) => pointAt(segment, k / chords))
  })
  return all.length > 0 ? [...all, all[0]!] : []
}

/** The jets along the move from station i, both ends included. */
export function jetsAlong(path: JetPath, i: number): JetLine[] {
  const steps = Math.max(1, Math.ceil(Math.abs(path.sweep[i]!) / CHORD))
  return Array.from({ length: steps + 1 }, (_, k) => jetAt(path, i, k / steps))
}

/** Where a jet's axis stands at a depth. */
export function axisAt({ x, y, p, q }: JetLine, depth: number): Point {
  return { x: x + depth * p, y: y + depth * q }
}
