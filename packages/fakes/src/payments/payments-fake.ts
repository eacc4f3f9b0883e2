import express, { Router, json } from 'express'
import { keepState } from '../kept-state'
import { closeServer, listenOnLoopback } from '../listen'
import { paymentsApi } from './api'
import { hostedPages } from './hosted-pages'
import { ProviderError, makeMachine, type Machine } from './machine'
import { showEvent } from './objects'
import type { FakeState } from './state'
import { makeDeliveries, type Deliveries, type DeliveryControls } from './webhooks'

export interface PaymentsFakeOptions {
  port?: number
  secretKey: string
  webhookSecret: string
  webhookUrl?: string
  now?: () => Date
  /** Where the state is kept between starts; left out, it is forgotten. */
  stateFile?: string
}

export interface PaymentsFake extends DeliveryControls {
  url: string
  port: number
  state: FakeState
  /** Pays a checkout without a browser; resolves to the sentence of a refusal, or null. */
  pay(checkoutId: string, card?: string): string | null
  finishOnboarding(account: string): void
  advanceClock(seconds: number): void
  /** The next calls of the API are answered with this status. */
  failNext(given: { status: number; count: number }): void
  close(): Promise<void>
}

const EVENTS_KEPT = 5_000

/** Starts the payment provider's stand-in on loopback. Refuses a live key. */
export async function startPaymentsFake(options: PaymentsFakeOptions): Promise<PaymentsFake> {
  if (options.secretKey.startsWith('sk_live_')) {
    throw new Error('The payments stand-in refuses a live key.')
  }
  let url = ''
  const failures: number[] = []
  const kept = keepState(options.stateFile, () => machine.state)
  // The state was written by this stand-in.
  const state = kept.read() as FakeState | undefined
  const machine = makeMachine(
    ({ type, account, objectId }) => {
      const id = `evt_fake${(machine.state.next += 1).toString(36).padStart(10, '0')}`
      const event = { id, account, type, created: machine.now(), objectId }
      machine.state.events.push(event)
      if (machine.state.events.length > EVENTS_KEPT) machine.state.events.shift()
      deliveries.send(showEvent(event, machine.state, url))
    },
    { state, now: options.now },
  )
  const deliveries = makeDeliveries({
    url: options.webhookUrl,
    secret: options.webhookSecret,
    nowSeconds: machine.now,
  })
  const controls = {
    pay: (checkoutId: string, card = '4242424242424242', created?: number) =>
      machine.pay(machine.findCheckout(checkoutId), { card, created }),
    failNext: ({ status, count }: { status: number; count: number }) => {
      failures.push(...Array<number>(count).fill(status))
    },
  }

  const app = express()
  app.disable('x-powered-by')
  app.use('/_control', controlRoutes({ machine, deliveries, controls, keep: kept.keep }))
  app.use('/v1', (_request, response, next) => {
    const status = failures.shift()
    if (status === undefined) return next()
    response.status(status).json({ error: { type: 'api_error', message: 'Asked to fail.' } })
  })
  const { secretKey } = options
  app.use(hostedPages(machine, kept.keep))
  app.use(paymentsApi(machine, { secretKey, baseUrl: () => url, onChange: kept.keep }))
  const listening = await listenOnLoopback(app, options.port)
  url = listening.url

  return {
    ...deliveries,
    url,
    port: listening.port,
    state: machine.state,
    pay: (checkoutId, card) => controls.pay(checkoutId, card),
    finishOnboarding: machine.finishOnboarding,
    advanceClock: machine.advance,
    failNext: controls.failNext,
    async close() {
      kept.flush()
      await closeServer(listening.server)
    },
  }
}

/** The controls over HTTP, for tests and loaders in other processes. */
function controlRoutes(given: {
  machine: Machine
  deliveries: Deliveries
  controls: {
    pay(id: string, card?: string, created?: number): string | null
    failNext(wanted: { status: number; count: number }): void
  }
  keep: () => void
}): Router {
  const { machine, deliveries, controls, keep } = given
  const router = Router()
  router.use(json())
  const act = (name: string, action: (body: Record<string, unknown>) => unknown) =>
    router.post(`/${name}`, (request, response) => {
      try {
        const outcome = action(Object(request.body) as Record<string, unknown>)
        keep()
        response.json({ outcome: outcome ?? null })
      } catch (error) {
        const status = error instanceof ProviderError ? error.status : 400
        response.status(status).json({ error: String(error) })
      }
    })
  const count = (body: Record<string, unknown>) => Number(body['count'] ?? 1)
  act('pay', (body) => {
    const card = body['card'] === undefined ? undefined : String(body['card'])
    const created = body['created'] === undefined ? undefined : Number(body['created'])
    return controls.pay(String(body['session']), card, created)
  })
  act('finish-onboarding', (body) =>
    machine.finishOnboarding(new URL(String(body['url'])).pathname.split('/').at(-1) ?? ''),
  )
  act('mute-webhooks', () => deliveries.mute(true))
  act('unmute-webhooks', () => deliveries.mute(false))
  act('hold-webhooks', () => deliveries.hold())
  act('release-webhooks', () => deliveries.release())
  act('release-webhooks-reversed', () => deliveries.releaseReversed())
  act('duplicate-next', (body) => deliveries.duplicateNext(count(body)))
  act('drop-next', (body) => deliveries.dropNext(count(body)))
  act('advance-clock', (body) => machine.advance(Number(body['seconds'] ?? 0)))
  act('fail-next', (body) =>
    controls.failNext({ status: Number(body['status'] ?? 500), count: count(body) }),
  )
  router.get('/state', (_request, response) => response.json(machine.state))
  return router
}
