import express from 'express'
import type { Express } from 'express'
import helmet from 'helmet'
import type { Config } from './config'
import type { AppContext } from './context'
import { problemHandler, unknownEndpoint } from './middleware/problem-handler'
import { sameOrigin } from './middleware/same-origin'
import { attachmentRoutes } from './routes/attachments'
import { calendarRoutes } from './routes/calendar'
import { healthRoutes } from './routes/health'
import { ledgerRoutes } from './routes/ledgers'
import { instrumentRoutes } from './routes/instruments'
import { invitationRoutes } from './routes/invitations'
import { mailRoutes } from './routes/mail'
import { peopleRoutes } from './routes/people'
import { pressReadRoutes } from './routes/presses-read'
import { proofTestReadRoutes } from './routes/proof-tests-read'
import { protocolRoutes } from './routes/protocols'
import { recordRoutes } from './routes/records'
import { sessionRoutes } from './routes/session'
import { shopRoutes } from './routes/shops'
import { streamRoutes } from './routes/stream'
import { tagRoutes } from './routes/tags'
import { todayReadRoutes } from './routes/today-read'
import { toolingRoutes } from './routes/tooling'
import { verificationRoutes } from './routes/verification'

/** A batch of entries fits; a file doesn't belong in JSON. */
const longestBody = '2mb'

function securityHeaders(config: Config) {
  const { isHttps } = config
  return helmet({
    // In development Vite puts a script of its own into the page.
    contentSecurityPolicy:
      config.environment === 'development'
        ? false
        : {
            useDefaults: false,
            directives: {
              defaultSrc: ["'self'"],
              baseUri: ["'self'"],
              formAction: ["'self'"],
              frameAncestors: ["'none'"],
              objectSrc: ["'none'"],
              scriptSrc: ["'self'"],
              scriptSrcAttr: ["'none'"],
              styleSrc: ["'self'"],
              // Charts and drawings place their parts by style attributes.
              styleSrcAttr: ["'unsafe-inline'"],
              imgSrc: ["'self'", 'data:', 'blob:'],
              fontSrc: ["'self'", 'data:'],
              workerSrc: ["'self'"],
              manifestSrc: ["'self'"],
              ...(isHttps ? { upgradeInsecureRequests: [] } : {}),
            },
          },
    strictTransportSecurity: isHttps,
  })
}

function api(context: AppContext) {
  const router = express.Router()
  router.use((_request, response, next) => {
    response.set('Cache-Control', 'no-store')
    next()
  })
  router.use(sameOrigin(context.config))
  router.use(express.json({ limit: longestBody }))
  router.use(healthRoutes(context))
  router.use(verificationRoutes(context))
  router.use(sessionRoutes(context))
  router.use(shopRoutes(context))
  router.use(invitationRoutes(context))
  router.use(mailRoutes(context))
  router.use(peopleRoutes(context))
  router.use(attachmentRoutes(context))
  router.use(instrumentRoutes(context))
  router.use(protocolRoutes(context))
  router.use(pressReadRoutes(context))
  router.use(proofTestReadRoutes(context))
  router.use(todayReadRoutes(context))
  router.use(toolingRoutes(context))
  router.use(tagRoutes(context))
  router.use(calendarRoutes(context))
  router.use(recordRoutes(context))
  router.use(ledgerRoutes(context))
  router.use(streamRoutes(context))
  router.use(unknownEndpoint)
  return router
}

/** The whole server but its socket; `client` adds the pages. */
export function createApp(context: AppContext, client?: (app: Express) => void): Express {
  const app = express()
  app.disable('x-powered-by')
  app.set('trust proxy', context.config.trustProxy)
  app.use(securityHeaders(context.config))
  // A tag's code is for whoever stands at the press, not for a search engine.
  app.use(['/tag', '/api/tags'], (_request, response, next) => {
    response.set('X-Robots-Tag', 'noindex, nofollow')
    next()
  })
  app.use('/api', api(context))
  client?.(app)
  app.use(unknownEndpoint)
  app.use(problemHandler(context.logger))
  return app
}
