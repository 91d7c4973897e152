import { describe, expect, it } from 'vitest'
import type { Answer, Ask } from '../../../src/evaluation/messages.ts'
import {
  GIVE_WAY_AFTER_MS,
  LatestQueue,
  type Delivery,
  type WorkerLike,
} from '../../../src/evaluation/queue.ts'

class FakeWorker implements WorkerLike<string, string> {
  readonly asked: Ask<string>[] = []
  ended = false
  onmessage: ((event: { data: Answer<string> }) => void) | null = null
  onerror: ((event: { message?: string }) => void) | null = null
  postMessage(message: Ask<string>) {
    this.asked.push(message)
  }
  terminate() {
    this.ended = true
  }
  loaded() {
    this.onmessage?.({ data: { kind: 'ready' } })
  }
  answer(at = this.asked.length - 1) {
    const { id, request } = this.asked[at]!
    this.onmessage?.({ data: { kind: 'answer', id, outcome: { ok: true, result: request.toUpperCase() } } })
  }
}

function bench() {
  const workers: FakeWorker[] = []
  const deliveries: Delivery<string, string>[] = []
  const clock = { now: 0 }
  const queue = new LatestQueue<string, string>(
    () => {
      workers.push(new FakeWorker())
      return workers.at(-1)!
    },
    (delivery) => deliveries.push(delivery),
    () => clock.now,
  )
  return { workers, deliveries, clock, queue }
}

describe('the latest-wins queue', () => {
  it('computes the first and the newest, and drops what was typed in between', () => {
    const { workers, deliveries, queue } = bench()
    for (const text of ['a', 'b', 'c', 'd']) queue.ask(text)
    const [worker] = workers as [FakeWorker]
    worker.answer()
    worker.answer()
    expect(worker.asked.map(({ request }) => request)).toEqual(['a', 'd'])
    expect(deliveries.map(({ request, outcome }) => [request, outcome.ok && outcome.result])).toEqual([
      ['a', 'A'],
      ['d', 'D'],
    ])
  })

  it('ends a job that takes long when a newer one comes, and ignores its late answer', () => {
    const { workers, deliveries, clock, queue } = bench()
    queue.ask('slow')
    workers[0]!.loaded()
    queue.ask('between')
    clock.now = GIVE_WAY_AFTER_MS + 1
    queue.ask('new')
    expect(workers.map(({ ended }) => ended)).toEqual([true, false])
    workers[0]!.answer()
    expect(deliveries).toEqual([])
    workers[1]!.answer()
    expect(deliveries.map(({ request }) => request)).toEqual(['new'])
    // what waited behind the slow job is older than the new one and must not follow it
    expect(workers[1]!.asked).toHaveLength(1)
  })

  it('does not count the time in which the worker itself loads', () => {
    const { workers, deliveries, clock, queue } = bench()
    queue.ask('first')
    clock.now = 10 * GIVE_WAY_AFTER_MS
    queue.ask('second')
    expect(workers).toHaveLength(1)
    workers[0]!.loaded()
    workers[0]!.answer()
    workers[0]!.answer()
    expect(deliveries.map(({ request }) => request)).toEqual(['first', 'second'])
  })

  it('gives a crash as a value and goes on with a new worker', () => {
    const { workers, deliveries, queue } = bench()
    queue.ask('a')
    queue.ask('b')
    workers[0]!.onerror?.({ message: 'out of memory' })
    expect(deliveries[0]).toMatchObject({ request: 'a', outcome: { ok: false, code: 'worker-failed' } })
    expect(workers).toHaveLength(2)
    workers[1]!.answer()
    expect(deliveries[1]).toMatchObject({ request: 'b', outcome: { ok: true, result: 'B' } })
  })

  it('is quiet once closed or dropped', () => {
    const { workers, deliveries, queue } = bench()
    queue.ask('a')
    queue.drop()
    workers[0]!.answer()
    queue.ask('b')
    queue.close()
    workers[1]!.answer()
    queue.ask('c')
    expect(deliveries).toEqual([])
    expect(workers).toHaveLength(2)
    expect(workers.every(({ ended }) => ended)).toBe(true)
  })
})
