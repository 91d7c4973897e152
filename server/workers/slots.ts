import { Refusal } from '../http/refusal.ts'

/** Lets so many jobs run at once and so many wait; refuses the rest. */
export class Slots {
  readonly #atOnce: number
  readonly #mayWait: number
  readonly #waiting: (() => void)[] = []
  #running = 0

  constructor(atOnce: number, mayWait: number) {
    this.#atOnce = atOnce
    this.#mayWait = mayWait
  }

  async run<T>(job: () => Promise<T>): Promise<T> {
    await this.#enter()
    try {
      return await job()
    } finally {
      const next = this.#waiting.shift()
      if (next) next()
      else this.#running -= 1
    }
  }

  /** A slot that is left goes straight to whoever waits longest. */
  async #enter(): Promise<void> {
    if (this.#running < this.#atOnce) {
      this.#running += 1
      return
    }
    if (this.#waiting.length >= this.#mayWait) {
      throw new Refusal('too-many-requests', 'The server is busy with other work of this kind. Try again.', {
        retryAfterSeconds: 2,
      })
    }
    await new Promise<void>((resolve) => this.#waiting.push(resolve))
  }
}
