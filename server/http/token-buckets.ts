/** Token buckets by key, in memory: how often a person may ask. Full buckets are forgotten. */
export class TokenBuckets {
  readonly #perSecond: number
  readonly #burst: number
  readonly #buckets = new Map<string, { tokens: number; at: number }>()

  constructor(rate: { readonly perSecond: number; readonly burst: number }) {
    this.#perSecond = rate.perSecond
    this.#burst = rate.burst
  }

  /** Takes one token; the seconds to wait when there is none, else 0. `now` in ms. */
  take(key: string, now: number): number {
    if (this.#buckets.size > 10_000) this.#forgetFull(now)
    const bucket = this.#buckets.get(key) ?? { tokens: this.#burst, at: now }
    bucket.tokens = this.#refilled(bucket, now)
    bucket.at = now
    this.#buckets.set(key, bucket)
    if (bucket.tokens < 1) return (1 - bucket.tokens) / this.#perSecond
    bucket.tokens -= 1
    return 0
  }

  #refilled(bucket: { tokens: number; at: number }, now: number): number {
    return Math.min(this.#burst, bucket.tokens + ((now - bucket.at) / 1000) * this.#perSecond)
  }

  #forgetFull(now: number): void {
    for (const [key, bucket] of this.#buckets) {
      if (this.#refilled(bucket, now) >= this.#burst) this.#buckets.delete(key)
    }
  }
}
