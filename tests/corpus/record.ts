import { evaluate } from '../../shared/evaluate/evaluate.ts'
import { figuresOf, worstDrift } from './drift.ts'
import { corpus } from './parts.ts'

/**
 * Prints `recorded.ts` anew: for a part that has come in, or for answers that were changed on purpose. Look at
 * every line that differs before it is kept.
 */
const entries = corpus.map(({ name, request }) => {
  const figures = figuresOf(evaluate(request))
  // Twice what is seen, in one digit; never less than a few hundred roundings.
  const bound = (seen: number) => Number(Math.max(1e-13, seen * 2).toExponential(0))
  const { walls, passes } = worstDrift(request)
  const drift = { walls: bound(walls), passes: bound(passes) }
  return `  ${JSON.stringify(name)}: ${JSON.stringify({ ...figures, drift })},`
})
console.log(`import type { Recorded } from './drift.ts'

/** What each part of the corpus answered when it came in (printed by record.ts); \`drift\` may only be made less. */
export const recorded: Readonly<Record<string, Recorded>> = {
${entries.join('\n')}
}`)
