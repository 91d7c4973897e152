import { parentPort, workerData } from 'node:worker_threads'
import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import { answerTo } from './answer.ts'

/** Evaluates one large set-up and ends. */

parentPort?.postMessage(answerTo(workerData as EvaluationRequest))
