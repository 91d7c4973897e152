/** Measuring by turns within one process, so that whatever slows the machine slows both sides. Milliseconds. */

export interface Spread {
  readonly median: number
  /** The middle half: first and third quartile. */
  readonly low: number
  readonly high: number
}

export function spreadOf(values: readonly number[]): Spread {
  const sorted = [...values].sort((a, b) => a - b)
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

export interface Rounds {
  readonly warmup: number
  readonly least: number
  readonly most: number
  /** No further round once so long has gone by, ms. */
  readonly budget: number
}

/** Every job once a round, in an order that turns; the times of each, one a round. */
export function interleaved(jobs: readonly (() => number)[], rounds: Rounds): number[][] {
  for (let i = 0; i < rounds.warmup; i++) for (const job of jobs) timed(job)
  const times: number[][] = jobs.map(() => [])
  const start = performance.now()
  for (let round = 0; round < rounds.most; round++) {
    if (round >= rounds.least && performance.now() - start > rounds.budget) break
    for (let i = 0; i < jobs.length; i++) {
      const at = (i + round) % jobs.length
      times[at]!.push(timed(jobs[at]!))
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
