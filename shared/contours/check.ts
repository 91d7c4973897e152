import { signedArea } from '../geometry/loop.ts'
import { profileProblems, type ProfileProblem } from '../geometry/problems.ts'
import type { Contour } from './types.ts'

/** Checkers that go with the algorithms: they say whether a result is sound, not whether it is the right one. */

/** What is wrong with a contour as an outline: open, crossing, turned over; empty when it is sound. */
export function contourProblems(contour: Contour): ProfileProblem[] {
  return profileProblems(contour.loops)
}

/** Area of a contour, holes taken off, mm². */
export function contourArea(contour: Contour): number {
  return contour.loops.reduce((sum, loop) => sum + signedArea(loop), 0)
}
