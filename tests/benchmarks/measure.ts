/** Measuring by turns within one process, so that whatever slows the machine slows both sides. Milliseconds. */

export interface Spread {
  readonly median: number
  /** The middle half: first and third quartile. */
  readonly low: number
  readonly high: number
}

export function spreadOf(values: readonly number[]): Spread {
  const sorted = values.filter((value) => !Number.isNaN(value)).sort((a, b) => a - b)
  const at = (share: number) => sorted[Math.round(share * (sorted.length - 1))]!
  return { median: at(0.5), low: at(0.25), high: at(0.75) }
}

/** What the jobs answer ends up here and is printed, so that no work can be left out. */
let sink = 0

export function consumed(): number {
  return sink
}

export function timed(job: () => number): number {
  const start = performance.now()
  sink = (sink + job()) % 1e9
  return performance.now() - start
}

export interface Job {
  readonly run: () => number
  /** No further run of this job once it has taken so long in all, ms; it has one at least. */
  readonly budget: number
}

/** Enough to have the code compiled, for jobs that are quick; slow ones warm up in their first run. */
const WARM_UP_MS = 400
const WARM_UP_RUNS = 200
const LEAST_RUNS = 1

/**
 * Every job once a round, in an order that turns; the times of each by round, NaN where it sat a round out because its
 * budget was used up. The rounds end when all budgets are, or after `most`.
 */
export function interleaved(jobs: readonly Job[], most: number): number[][] {
  for (const { run } of jobs) {
    const start = performance.now()
    for (let i = 0; i < WARM_UP_RUNS && performance.now() - start < WARM_UP_MS; i++) timed(run)
  }
  const spent = jobs.map(() => 0)
  const times: number[][] = jobs.map(() => [])
  for (let round = 0; round < most; round++) {
    const waiting = jobs.map(({ budget }, i) => round < LEAST_RUNS || spent[i]! < budget)
    if (!waiting.includes(true)) break
    for (let i = 0; i < jobs.length; i++) {
      const at = (i + round) % jobs.length
      const time = waiting[at] ? timed(jobs[at]!.run) : NaN
      times[at]!.push(time)
      if (waiting[at]) spent[at]! += time
    }
  }
  return times
}

/** Slope of log(time) over log(edges), least squares: 1 is linear. */
export function growthExponent(edges: readonly number[], times: readonly number[]): number {
  const xs = edges.map(Math.log)
  const ys = times.map(Math.log)
  const mean = (v: readonly number[]) => v.reduce((sum, a) => sum + a, 0) / v.length
  const [mx, my] = [mean(xs), mean(ys)]
  const over = xs.reduce((sum, x, i) => sum + (x - mx) * (ys[i]! - my), 0)
  return over / xs.reduce((sum, x) => sum + (x - mx) ** 2, 0)
}
