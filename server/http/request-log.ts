import { randomUUID } from 'node:crypto'
import type { RequestHandler } from 'express'
import type { Logger } from '../log.ts'
import './request-types.ts'

/** Gives each request an id and writes one line when it is answered: no bodies, no cookies, no query text. */
export function requestLog(log: Logger): RequestHandler {
  return (req, res, next) => {
    const started = performance.now()
    req.requestId = randomUUID()
    res.setHeader('X-Request-Id', req.requestId)
    res.on('close', () => {
      log.info(
        {
          requestId: req.requestId,
          method: req.method,
          route: req.routeName ?? req.path.slice(0, 200),
          status: res.writableFinished ? res.statusCode : 'aborted',
          ms: Math.round((performance.now() - started) * 10) / 10,
          userId: req.user?.id,
        },
        'request',
      )
    })
    next()
  }
}
