export { useEvaluation, type EvaluationError, type EvaluationState } from './use-evaluation.ts'
