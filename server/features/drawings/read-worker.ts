import { parentPort, workerData } from 'node:worker_threads'
import { DrawingError } from '../../../shared/drawing/errors.ts'
import { readDrawing } from '../../../shared/drawing/read.ts'
import type { ReadingOptions } from '../../../shared/drawing/schema.ts'
import { STARTED } from '../../workers/run-in-worker.ts'
import type { DrawingAnswer } from './reader.ts'

/** Reads one drawing and ends. */

const { bytes, options } = workerData as { bytes: Uint8Array; options: ReadingOptions }

function answer(): DrawingAnswer {
  try {
    return { value: readDrawing(bytes, options) }
  } catch (error) {
    if (!(error instanceof DrawingError)) throw error
    return { failure: { code: error.code, message: error.message, line: error.line } }
  }
}

parentPort?.postMessage(STARTED)
parentPort?.postMessage(answer())
