/** The whole application without listening: middleware, the routes, the pages, the one error handler. */
import { randomUUID } from 'node:crypto'
import { existsSync } from 'node:fs'
import path from 'node:path'
import compression from 'compression'
import express, { type Express } from 'express'
import helmet from 'helmet'
import { pinoHttp } from 'pino-http'
import type { Deps } from './deps.ts'
import { watchAdviceInputs } from './features/advisor/inputs.ts'
import { AppError } from './http/errors.ts'
import { beforeSession, mountRoutes } from './http/mount.ts'
import { problemHandler, requestId } from './http/problem.ts'
import { sameSiteOnly } from './http/same-site.ts'
import { sessionMiddleware } from './http/session.ts'
import { routes } from './routes.ts'

/** @param clientDir folder of the built pages; null where only the API is wanted (tests) */
export function createApp(deps: Deps, clientDir: string | null): Express {
  const { config, log } = deps
  watchAdviceInputs(deps.db)
  const secure = config.PUBLIC_URL.startsWith('https:')
  const app = express()
  app.disable('x-powered-by')
  // Replies of the API are not to be stored, so a digest of each would be worked out for nothing; files have their own.
  app.disable('etag')
  app.set('trust proxy', secure ? 1 : false)
  app.use(
    pinoHttp({
      logger: log,
      genReqId: () => randomUUID(),
      // One line a request. Addresses are logged without their query: answers of a fitting are nobody's business in a log.
      serializers: {
        req: (req: { id: string; method: string; url: string }) => ({
          id: req.id,
          method: req.method,
          url: req.url.split('?')[0],
        }),
        res: (res: { statusCode: number }) => ({ status: res.statusCode }),
      },
      autoLogging: { ignore: (req) => req.url.startsWith('/api/health') },
    }),
  )
  app.use((req, res, next) => {
    res.set('X-Request-Id', requestId(req))
    next()
  })
  app.use(
    helmet({
      contentSecurityPolicy: {
        directives: {
          defaultSrc: ["'self'"],
          // The theme is set before the first paint by one file of our own; nothing is inline.
          scriptSrc: ["'self'"],
          styleSrc: ["'self'"],
          // React sets style attributes through the CSSOM, which this does not concern; SVG charts use attributes and classes.
          styleSrcAttr: ["'none'"],
          imgSrc: ["'self'", 'data:'],
          fontSrc: ["'self'"],
          connectSrc: ["'self'"],
          objectSrc: ["'none'"],
          baseUri: ["'none'"],
          frameAncestors: ["'none'"],
          formAction: ["'self'"],
          upgradeInsecureRequests: secure ? [] : null,
        },
      },
      strictTransportSecurity: secure ? { maxAge: 31_536_000, includeSubDomains: true } : false,
      referrerPolicy: { policy: 'strict-origin-when-cross-origin' },
    }),
  )
  app.use(compression())
  app.use('/api', sameSiteOnly(config.PUBLIC_URL))

  mountRoutes(
    app,
    routes.filter(({ spec }) => beforeSession(spec)),
    deps,
  )
  app.use('/api', sessionMiddleware(deps))
  mountRoutes(
    app,
    routes.filter(({ spec }) => !beforeSession(spec)),
    deps,
  )
  app.use('/api', () => {
    throw new AppError('not-found', 404)
  })

  if (clientDir !== null && existsSync(clientDir)) servePages(app, clientDir)
  app.use(problemHandler(log))
  return app
}

function servePages(app: Express, clientDir: string) {
  app.use(
    '/assets',
    express.static(path.join(clientDir, 'assets'), { immutable: true, maxAge: '365d', fallthrough: false }),
  )
  app.use(express.static(clientDir, { index: false, maxAge: '1h' }))
  app.get('/{*page}', (_req, res) => {
    res.set('Cache-Control', 'no-cache').sendFile('index.html', { root: path.resolve(clientDir) })
  })
}
