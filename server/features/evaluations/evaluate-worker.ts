import { parentPort, workerData } from 'node:worker_threads'
import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import { STARTED } from '../../workers/run-in-worker.ts'
import { answerTo } from './answer.ts'

/** Evaluates one large set-up and ends. */

parentPort?.postMessage(STARTED)
parentPort?.postMessage(answerTo(workerData as EvaluationRequest))
