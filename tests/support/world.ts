import { createServer, type Server } from 'node:http'
import type { OauthFakeOptions } from '@marram/fakes'
import { makeApp } from '../../apps/api/src/app'
import { checkoutListeners } from '../../apps/api/src/checkout/listeners'
import { makeStripeProvider } from '../../apps/api/src/checkout/stripe-provider'
import { messagingListeners } from '../../apps/api/src/messaging/listeners'
import { makeMessenger } from '../../apps/api/src/messaging/messaging'
import { makeSendgridProvider } from '../../apps/api/src/messaging/sendgrid-provider'
import { listen, makeServices } from '../../apps/api/src/platform/boot'
import { makeMovableClock, type MovableClock } from '../../apps/api/src/platform/clock'
import type { Config } from '../../apps/api/src/platform/config'
import { connect } from '../../apps/api/src/platform/db/connect'
import { makeDispatcher } from '../../apps/api/src/platform/outbox/dispatch'
import { sweepDue } from '../../apps/api/src/platform/outbox/sweep'
import type { Services } from '../../apps/api/src/platform/services'
import type { TestDatabase } from './copy-database'
import { watchErrors, type ErrorLine } from './error-lines'
import { startFakes, type Fakes } from './fakes'
import { Person } from './person'
import { testConfig } from './test-config'

/** A Monday morning, before any season that the tests invent. */
export const WORLD_BEGINS = new Date('2031-03-03T09:00:00.000Z')

export interface WorldOptions {
  database: TestDatabase
  /** Small on purpose: a query that strays from its transaction finds no connection left. */
  poolSize?: number
  begins?: Date
  hasPages?: boolean
  /** Who can sign in at the identity provider, instead of its own people. */
  people?: OauthFakeOptions['people']
  change?: (config: Config) => Config
}

/** The whole product in one process, with a database, stand-ins and a clock of its own. */
export interface World extends Fakes {
  url: string
  services: Services
  clock: MovableClock
  database: TestDatabase
  /** Somebody with a browser who has not been here before. */
  person(): Person
  /** Delivers webhooks and handles events, and what these cause, until nothing is left. */
  drain(): Promise<void>
  /** Finds what has become due by the clock, and handles it. */
  sweep(): Promise<void>
  /** The error lines written since the last call: for tests in which they are expected. */
  takeErrors(): ErrorLine[]
  /** Ends everything. Rejects when an error line was written that no test expected. */
  close(): Promise<void>
}

export async function makeWorld(options: WorldOptions): Promise<World> {
  const { database } = options
  const clock = makeMovableClock(options.begins ?? WORLD_BEGINS)
  // The address must be known before what answers at it can be made.
  const server = createServer()
  const url = `http://127.0.0.1:${await listen(server, { port: 0, mode: 'test' })}`
  const fakes = await startFakes({ url, clock, people: options.people })
  const config = testConfig({
    database,
    publicUrl: url,
    paymentsUrl: fakes.payments.url,
    mailUrl: fakes.mail.url,
    googleUrl: fakes.oauth.url,
    mailWebhookPublicKey: fakes.mail.webhookPublicKey,
    poolSize: options.poolSize ?? 2,
  })
  const errors = watchErrors()
  const made = makeServices(options.change?.(config) ?? config, { name: 'marram-tests', clock })
  const services: Services = { ...made, log: errors.log }
  const provider = makeStripeProvider(services.config.payments)
  const hasPages = options.hasPages ?? false
  server.on('request', makeApp(services, { payments: provider, hasPages }))
  const jobs = makeJobs(services, { database, provider, fakes })

  return {
    ...fakes,
    url,
    services,
    clock,
    database,
    person: () => new Person(url),
    drain: () => jobs.drain(),
    sweep: () => jobs.sweep(),
    takeErrors: () => errors.take(),
    async close() {
      await jobs.stop()
      await closeServer(server)
      await Promise.all([fakes.payments.close(), fakes.mail.close(), fakes.oauth.close()])
      await services.db.destroy()
      await database.drop()
      errors.expectNone()
    },
  }
}

function makeJobs(
  services: Services,
  given: {
    database: TestDatabase
    provider: ReturnType<typeof makeStripeProvider>
    fakes: Fakes
  },
) {
  const { database, provider, fakes } = given
  const { log, config } = services
  const dispatch = connect({ url: database.dispatchUrl, poolSize: 1, name: 'marram-tests' })
  const messenger = makeMessenger(services, makeSendgridProvider(config.mail))
  const dispatcher = makeDispatcher({
    url: database.dispatchUrl,
    listeners: {
      checkout: checkoutListeners(services, provider),
      messaging: messagingListeners(services, messenger),
    },
    onError: (err, queue) => log.error({ err, queue }, 'an event could not be handled'),
  })
  const drain = async () => {
    for (let handled = -1; handled !== 0;) {
      await fakes.payments.flush()
      await fakes.mail.flush()
      handled = await dispatcher.drain()
    }
  }
  return {
    drain,
    async sweep() {
      await sweepDue(services, dispatch)
      await drain()
    },
    async stop() {
      await dispatcher.stop()
      await dispatch.destroy()
    },
  }
}

function closeServer(server: Server): Promise<void> {
  return new Promise((resolve) => {
    server.close(() => resolve())
    server.closeAllConnections()
  })
}
