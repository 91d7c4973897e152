import { checkReading } from './check-reading.ts'
import { malformedDrawing } from './mutate-dxf.ts'

/**
 * Malformed drawings by the thousand: `npx tsx tests/fuzz/drawing.ts [count] [first seed]`. Prints how they ended
 * and the longest time of one; a fault stops it with its seed.
 */
const count = Number(process.argv[2] ?? 10_000)
const first = Number(process.argv[3] ?? 1)
const outcomes = new Map<string, number>()
let longest = { ms: 0, seed: first }

for (let seed = first; seed < first + count; seed++) {
  const bytes = malformedDrawing(seed)
  const started = performance.now()
  try {
    const outcome = checkReading(bytes)
    outcomes.set(outcome, (outcomes.get(outcome) ?? 0) + 1)
  } catch (error) {
    console.error(`seed ${seed}:`, error)
    process.exit(1)
  }
  const ms = performance.now() - started
  if (ms > longest.ms) longest = { ms, seed }
}
console.log(Object.fromEntries([...outcomes].sort((a, b) => b[1] - a[1])))
console.log(`${count} drawings; longest ${longest.ms.toFixed(0)} ms (seed ${longest.seed})`)
