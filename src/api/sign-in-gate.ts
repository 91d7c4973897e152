/**
 * Between a call that met an ended session and the dialog that signs the person in again. Calls that fail
 * meanwhile wait at the same gate, so one sign-in lets all of them through.
 */
type Listener = (open: boolean) => void

let waiting: ((signedIn: boolean) => void)[] = []
let listener: Listener | null = null

/** Resolves true once signed in again, false when the person would rather not, or nobody can ask. */
export function askToSignIn(): Promise<boolean> {
  if (listener === null) return Promise.resolve(false)
  return new Promise((resolve) => {
    waiting.push(resolve)
    listener?.(true)
  })
}

/** The dialog's side: `answer` lets the waiting calls go on, or fail. */
export function answerGate(signedIn: boolean): void {
  const resolvers = waiting
  waiting = []
  listener?.(false)
  for (const resolve of resolvers) resolve(signedIn)
}

/** Registers who can ask; returns the function that takes it back. */
export function watchGate(next: Listener): () => void {
  listener = next
  return () => {
    if (listener === next) listener = null
  }
}
