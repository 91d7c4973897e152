/** What passes between the page and the evaluation worker: an expected failure is a value. */
export type Outcome<Result> =
  | { readonly ok: true; readonly result: Result }
  | { readonly ok: false; readonly code: string; readonly message: string }

export interface Ask<Request> {
  readonly id: number
  readonly request: Request
}

/** The worker says once that it is loaded, then answers what it is asked. */
export type Answer<Result> =
  | { readonly kind: 'ready' }
  | { readonly kind: 'answer'; readonly id: number; readonly outcome: Outcome<Result> }
