/**
 * Undo and redo over immutable values. One change is one step, however many edges it touched; changes that
 * carry the same `run` (keystrokes in one field) fold into the step that they began.
 */
export interface History<T> {
  readonly past: readonly T[]
  readonly present: T
  readonly future: readonly T[]
  /** The run that the present step belongs to; null once it is settled. */
  readonly run: string | null
}

/** Steps kept; values share structure, so a step costs little. */
export const HISTORY_STEPS = 200

export function startHistory<T>(present: T): History<T> {
  return { past: [], present, future: [], run: null }
}

export function record<T>(history: History<T>, next: T, run: string | null = null): History<T> {
  if (next === history.present) return history
  if (run !== null && run === history.run) return { ...history, present: next, future: [] }
  const past = [...history.past, history.present].slice(-HISTORY_STEPS)
  return { past, present: next, future: [], run }
}

/** Ends a run of keystrokes: the next change is a step of its own. */
export function settle<T>(history: History<T>): History<T> {
  return history.run === null ? history : { ...history, run: null }
}

export function undo<T>(history: History<T>): History<T> {
  const previous = history.past.at(-1)
  if (previous === undefined) return history
  return {
    past: history.past.slice(0, -1),
    present: previous,
    future: [history.present, ...history.future],
    run: null,
  }
}

export function redo<T>(history: History<T>): History<T> {
  const [next, ...future] = history.future
  if (next === undefined) return history
  return { past: [...history.past, history.present], present: next, future, run: null }
}
