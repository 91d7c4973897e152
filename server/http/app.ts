import express, { type Express } from 'express'
import session from 'express-session'
import { passwordSignIn } from '../features/session/strategy.ts'
import type { Services } from '../services.ts'
import { errorAnswer, noSuchRoute } from './error-answer.ts'
import { handlers } from './handlers.ts'
import { neverStored, securityHeaders } from './headers.ts'
import { serveHealth } from './health.ts'
import { overloadGuard } from './overload.ts'
import { mountRoutes } from './pipeline.ts'
import { requestLog } from './request-log.ts'
import { sameSiteWrites } from './same-site.ts'
import { SESSION_COOKIE } from './session-control.ts'
import { SESSION_LIFE, SessionStore } from './session-store.ts'
import { serveWeb } from './web.ts'

/** The whole application, ready to listen. */
export function createApp(services: Services, webDir: string | null): Express {
  const { config, log, dataSource } = services
  const app = express()
  app.disable('x-powered-by')
  app.set('etag', false)
  app.set('query parser', 'simple')
  if (config.trustProxy > 0) app.set('trust proxy', config.trustProxy)

  app.use(requestLog(log), securityHeaders)
  serveHealth(app, services)

  const authenticator = passwordSignIn(services)
  app.use(
    '/api',
    neverStored,
    overloadGuard(config.maxInFlight),
    sameSiteWrites,
    session({
      name: SESSION_COOKIE,
      secret: config.sessionSecret,
      store: new SessionStore(dataSource),
      resave: false,
      saveUninitialized: false,
      cookie: { httpOnly: true, sameSite: 'lax', secure: 'auto', path: '/', maxAge: SESSION_LIFE },
    }),
    authenticator.session(),
  )
  mountRoutes(app, services, handlers, authenticator)
  app.use('/api', noSuchRoute)

  if (webDir !== null) serveWeb(app, webDir)
  app.use(noSuchRoute)
  app.use(errorAnswer(log))
  return app
}
