import type { RequestHandler } from 'express'
import helmet from 'helmet'

/** Content security and its neighbours. `upgrade-insecure-requests` would break plain loopback, so it is left out. */
export const securityHeaders: RequestHandler = helmet({
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: ["'self'"],
      scriptSrc: ["'self'"],
      scriptSrcAttr: ["'none'"],
      workerSrc: ["'self'", 'blob:'],
      imgSrc: ["'self'", 'data:', 'blob:'],
      styleSrc: ["'self'"],
      // The drawing library positions its labels by style attributes.
      styleSrcAttr: ["'unsafe-inline'"],
      fontSrc: ["'self'"],
      connectSrc: ["'self'"],
      objectSrc: ["'none'"],
      baseUri: ["'self'"],
      formAction: ["'self'"],
      frameAncestors: ["'none'"],
    },
  },
  // Meaningful behind TLS only; browsers ignore it on plain HTTP.
  strictTransportSecurity: { maxAge: 31_536_000, includeSubDomains: false },
})

export const neverStored: RequestHandler = (_req, res, next) => {
  res.setHeader('Cache-Control', 'no-store')
  next()
}
