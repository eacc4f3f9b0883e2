import express, { type Express } from 'express'
import { academyHandlers } from './academies/routes'
import { accountHandlers } from './accounts/routes'
import { makePassport, providerRoutes } from './accounts/strategies'
import type { PaymentsProvider } from './checkout/provider'
import { readCreditOfAccount } from './checkout/queries'
import { checkoutHandlers } from './checkout/routes'
import { showEnrolments } from './checkout/views'
import { paymentsWebhook } from './checkout/webhooks'
import { readBooks } from './clinics/books'
import { describePages } from './clinics/page-head'
import { clinicHandlers } from './clinics/routes'
import { coachHandlers } from './coaches/routes'
import { coachingHandlers } from './coaching/routes'
import { demoHandlers } from './demo/routes'
import { enrolmentHandlers } from './enrolments/routes'
import { golferHandlers } from './golfers/routes'
import { ledgerHandlers } from './ledger/routes'
import { mailWebhook } from './messaging/webhooks'
import { answerProblems, noSuchRoute } from './platform/http/answers'
import { healthRoutes } from './platform/http/health'
import { readJsonBody } from './platform/http/json-body'
import { observeRequests } from './platform/http/observe'
import { openApiRoute } from './platform/http/openapi'
import { checkOriginAndToken } from './platform/http/request-token'
import { makeApiRouter } from './platform/http/router'
import { securityHeaders } from './platform/http/security-headers'
import { signInSessions } from './platform/http/sign-in-session'
import type { Services } from './platform/services'
import { webApp } from './platform/web/web-app'
import { registerHandlers } from './register/routes'
import { venueHandlers } from './venues/routes'

export interface AppOptions {
  payments: PaymentsProvider
  isStopping?: () => boolean
  /** Left out where only the API is served, as in its tests. */
  hasPages?: boolean
}

/** The web process, in order. */
export function makeApp(services: Services, options: AppOptions): Express {
  const { payments, isStopping = () => false, hasPages = true } = options
  const passport = makePassport(services)
  const app = express()
  app.locals['config'] = services.config
  app.disable('x-powered-by')
  app.set('trust proxy', services.config.mode === 'production' ? 1 : false)
  app.set('query parser', 'simple')

  app.use(observeRequests(services))
  app.use(securityHeaders(services.config))
  app.use(healthRoutes(services, isStopping))
  app.use(openApiRoute(services))
  app.use(paymentsWebhook(services, payments))
  app.use(mailWebhook(services))

  app.use(['/api', '/auth'], signInSessions(services))
  app.use(providerRoutes(services, passport))
  app.use('/api', checkOriginAndToken(services))
  app.use('/api', readJsonBody)
  app.use(
    makeApiRouter(services, {
      ...accountHandlers(services, passport),
      ...academyHandlers(services),
      ...venueHandlers(services),
      ...coachHandlers(services),
      ...golferHandlers(services),
      ...clinicHandlers(services),
      ...enrolmentHandlers(services, { show: showEnrolments, readCredit: readCreditOfAccount }),
      ...registerHandlers(services),
      ...coachingHandlers(services),
      ...checkoutHandlers(services, payments),
      ...ledgerHandlers(services, readBooks(services)),
      ...demoHandlers(services),
    }),
  )
  app.use('/api', noSuchRoute)
  if (hasPages) app.use(webApp(services, describePages(services)))
  app.use(answerProblems(services))
  return app
}
