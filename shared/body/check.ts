import { signedArea } from '../geometry/loop.ts'
import { profileProblems, type ProfileProblem } from '../geometry/problems.ts'
import type { Body, BodyMesh, Contour } from './types.ts'

/** Checkers that go with the algorithms: they say whether a result is sound, not whether it is the right one. */

/** What is wrong with a contour as an outline: open, crossing, turned over; empty when it is sound. */
export function contourProblems(contour: Contour): ProfileProblem[] {
  return profileProblems(contour.loops)
}

/** Area of a contour, holes taken off, mm². */
export function contourArea(contour: Contour): number {
  return contour.loops.reduce((sum, loop) => sum + signedArea(loop), 0)
}

export type BodyProblemCode =
  'thickness' | 'walls-missing' | 'facets-not-rising' | 'facets-end-elsewhere' | 'tilt'

/** What is wrong with the walls of a body; the profile has its own checker. */
export interface BodyProblem {
  readonly code: BodyProblemCode
  readonly loop: number | null
  readonly edge: number | null
}

export function bodyProblems({ thickness, loops, walls }: Body): BodyProblem[] {
  const problems: BodyProblem[] = []
  const add = (code: BodyProblemCode, loop: number | null, edge: number | null) =>
    problems.push({ code, loop, edge })
  if (!(thickness > 0 && thickness < Infinity)) add('thickness', null, null)
  for (const [l, loop] of loops.entries()) {
    if (walls[l]?.length !== loop.length) add('walls-missing', l, null)
    for (const [e, { facets }] of (walls[l] ?? []).entries()) {
      if (facets.some((f, i) => !(f.depth > (facets[i - 1]?.depth ?? 0)))) add('facets-not-rising', l, e)
      if (facets.at(-1)?.depth !== thickness) add('facets-end-elsewhere', l, e)
      if (facets.some((f) => !(Math.abs(f.tilt) < Math.PI / 2))) add('tilt', l, e)
    }
  }
  return problems
}

export interface MeshCheck {
  /** Directed edges whose opposite does not occur as often, positions told apart bit by bit; 0 when watertight. */
  readonly unmatched: number
  /** Directed edges that occur more than once: only where the body touches itself, at an event. */
  readonly repeated: number
  /** Enclosed volume, mm³; positive when triangles face outward. */
  readonly volume: number
}

export function checkMesh({ positions, indices }: BodyMesh): MeshCheck {
  const spots = new Map<string, number>()
  const spotOf = Array.from({ length: positions.length / 3 }, (_, v) => {
    const key = `${positions[3 * v]},${positions[3 * v + 1]},${positions[3 * v + 2]}`
    const spot = spots.get(key) ?? spots.size
    spots.set(key, spot)
    return spot
  })
  const edges = new Map<number, number>()
  const keyOf = (a: number, b: number) => a * spots.size + b
  let volume = 0
  for (let t = 0; t < indices.length; t += 3) {
    const corners = [indices[t]!, indices[t + 1]!, indices[t + 2]!] as const
    for (let k = 0; k < 3; k++) {
      const key = keyOf(spotOf[corners[k]!]!, spotOf[corners[(k + 1) % 3]!]!)
      edges.set(key, (edges.get(key) ?? 0) + 1)
    }
    // Told from the first vertex, so that a part far from the origin loses no digits.
    const at = (v: number, axis: number) => positions[3 * v + axis]! - positions[axis]!
    const [a, b, c] = corners
    volume +=
      (at(a, 0) * (at(b, 1) * at(c, 2) - at(b, 2) * at(c, 1)) -
        at(a, 1) * (at(b, 0) * at(c, 2) - at(b, 2) * at(c, 0)) +
        at(a, 2) * (at(b, 0) * at(c, 1) - at(b, 1) * at(c, 0))) /
      6
  }
  let unmatched = 0
  let repeated = 0
  for (const [key, times] of edges) {
    const opposite = keyOf(key % spots.size, Math.floor(key / spots.size))
    unmatched += Math.max(0, times - (edges.get(opposite) ?? 0))
    if (times > 1) repeated++
  }
  return { unmatched, repeated, volume }
}
