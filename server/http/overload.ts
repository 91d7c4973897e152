import type { RequestHandler } from 'express'
import { Refusal } from './refusal.ts'

/** Turns requests away at once when too many are in work, so that those accepted are still answered. */
export function overloadGuard(maxInFlight: number): RequestHandler {
  let inFlight = 0
  return (_req, res, next) => {
    if (inFlight >= maxInFlight) {
      throw new Refusal('too-many-requests', 'The server is busy. Try again in a moment.', {
        retryAfterSeconds: 1,
      })
    }
    inFlight += 1
    res.once('close', () => {
      inFlight -= 1
    })
    next()
  }
}
