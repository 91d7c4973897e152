import type { Answer, Ask, Outcome } from './messages.ts'

/** What the queue needs of a worker; the browser's `Worker` fits. */
export interface WorkerLike<Request, Result> {
  postMessage(message: Ask<Request>): void
  terminate(): void
  onmessage: ((event: { data: Answer<Result> }) => void) | null
  onerror: ((event: { message?: string }) => void) | null
}

export interface Delivery<Request, Result> {
  readonly request: Request
  readonly outcome: Outcome<Result>
}

/** A job older than this gives way at once when a newer one arrives: its worker is ended and replaced. */
export const GIVE_WAY_AFTER_MS = 1_500

/**
 * One job runs, one waits, and the one that waits is always the newest: what a person typed in between is
 * never computed. Each delivery names its request, so that a picture is never shown beside other numbers.
 */
export class LatestQueue<Request, Result> {
  readonly #spawn: () => WorkerLike<Request, Result>
  readonly #deliver: (delivery: Delivery<Request, Result>) => void
  readonly #now: () => number
  #worker: WorkerLike<Request, Result> | null = null
  /** `since` is null while the worker itself is still loading. */
  #running: { id: number; request: Request; since: number | null } | null = null
  #loaded = false
  #waiting: Request | null = null
  #lastId = 0
  #closed = false

  constructor(
    spawn: () => WorkerLike<Request, Result>,
    deliver: (delivery: Delivery<Request, Result>) => void,
    now: () => number = () => performance.now(),
  ) {
    this.#spawn = spawn
    this.#deliver = deliver
    this.#now = now
  }

  ask(request: Request): void {
    if (this.#closed) return
    if (this.#running === null) {
      this.#start(request)
    } else if (this.#running.since !== null && this.#now() - this.#running.since > GIVE_WAY_AFTER_MS) {
      this.drop()
      this.#start(request)
    } else {
      this.#waiting = request
    }
  }

  /** Forgets what waits and what runs; the worker lives on unless it is busy. */
  drop(): void {
    this.#waiting = null
    if (this.#running !== null) this.#endWorker()
  }

  close(): void {
    this.#closed = true
    this.#waiting = null
    this.#endWorker()
  }

  #start(request: Request): void {
    const worker = (this.#worker ??= this.#connect())
    this.#running = { id: ++this.#lastId, request, since: this.#loaded ? this.#now() : null }
    worker.postMessage({ id: this.#running.id, request })
  }

  #connect(): WorkerLike<Request, Result> {
    const worker = this.#spawn()
    worker.onmessage = ({ data }) => {
      if (worker !== this.#worker) return
      if (data.kind === 'ready') this.#ready()
      else if (data.id === this.#running?.id) this.#finish(data.outcome)
    }
    worker.onerror = ({ message }) => {
      if (worker !== this.#worker) return
      this.#dropWorker()
      this.#finish({
        ok: false,
        code: 'worker-failed',
        message: `The calculation stopped: ${message ?? 'no reason given'}. Change a number to try again.`,
      })
    }
    return worker
  }

  #ready(): void {
    this.#loaded = true
    if (this.#running !== null) this.#running.since = this.#now()
  }

  #finish(outcome: Outcome<Result>): void {
    const finished = this.#running
    const next = this.#waiting
    this.#running = null
    this.#waiting = null
    if (finished !== null) this.#deliver({ request: finished.request, outcome })
    if (next !== null) this.ask(next)
  }

  #endWorker(): void {
    this.#dropWorker()
    this.#running = null
  }

  #dropWorker(): void {
    this.#worker?.terminate()
    this.#worker = null
    this.#loaded = false
  }
}
