import type { Body } from './types.ts'

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
      if (facets.some((f) => !isTilt(f.tilt) || !isTilt(f.endTilt ?? f.tilt))) add('tilt', l, e)
    }
  }
  return problems
}

function isTilt(angle: number): boolean {
  return Math.abs(angle) < Math.PI / 2
}
