import type { Body, BodyEvent } from './types.ts'

export interface EventOptions {
  /** Look beyond the plate down to this depth, the last facets prolonged; the plate's thickness when absent. */
  readonly depth?: number
}

/** The first event of the body, null when there is none within the plate. */
export function firstEvent(_body: Body, _options: EventOptions = {}): BodyEvent | null {
  return null
}
