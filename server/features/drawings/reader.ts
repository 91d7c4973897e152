import { DrawingError, type DrawingErrorCode } from '../../../shared/drawing/errors.ts'
import type { Reading, ReadingOptions } from '../../../shared/drawing/schema.ts'
import { runInWorker, type WorkerAnswer, workerFile } from '../../workers/run-in-worker.ts'
import { Slots } from '../../workers/slots.ts'

interface DrawingFailure {
  readonly code: DrawingErrorCode
  readonly message: string
  readonly line: number | undefined
}

export type DrawingAnswer = WorkerAnswer<Reading, DrawingFailure>

const AT_ONCE = 2
const MAY_WAIT = 20
const MEMORY_MB = 512

/** Reads drawings in threads, two at a time, none longer than the deadline: files come from strangers. */
export class DrawingReader {
  readonly #slots = new Slots(AT_ONCE, MAY_WAIT)
  readonly #deadline: number

  constructor(deadline: number) {
    this.#deadline = deadline
  }

  /** Throws `DrawingError` when the file cannot be read. */
  async read(bytes: Uint8Array, options: ReadingOptions): Promise<Reading> {
    const outcome = await this.#slots.run(() =>
      runInWorker<Reading, DrawingFailure>(
        workerFile('read-worker', import.meta.url),
        { bytes, options },
        { deadline: this.#deadline, memoryMb: MEMORY_MB },
      ),
    )
    if ('value' in outcome) return outcome.value
    if ('failure' in outcome) {
      const { code, message, line } = outcome.failure
      throw new DrawingError(code, message, line)
    }
    if (outcome.broken === 'late') {
      throw new DrawingError(
        'drawing-too-slow',
        'Reading this drawing takes too long. Save only the part you need, as a plain DXF, and try again.',
      )
    }
    throw new DrawingError(
      'drawing-too-large',
      'Reading this drawing takes too much memory. Save only the part you need and try again.',
    )
  }
}
