import { createHmac } from 'node:crypto'
import { makeDeliveries, type DeliveryControls } from '../deliveries'
import { keepState, readKept } from '../kept-state'
import { closeServer, listenOnLoopback, makeApp } from '../listen'
import { requireLoopback, requireNoLiveKey } from '../safety'
import { paymentsApi } from './api/api'
import { makeTrouble, type TroubleControls } from './api/trouble'
import { CARDS } from './cards'
import { controlRoutes } from './control'
import type { Told } from './machine/core'
import { makeMachine, type Machine } from './machine/machine'
import { showEvent, type View } from './objects/objects'
import { hostedPages } from './pages/hosted-pages'
import { missing } from './provider-error'
import { emptyState, type FakeState } from './state'

export interface PaymentsFakeOptions {
  host?: string
  port?: number
  secretKey: string
  webhookSecret: string
  webhookUrl?: string
  now?: () => Date
  /** Where the state is kept between starts; left out, it is forgotten. */
  stateFile?: string
}

export interface PaymentsFake extends DeliveryControls, TroubleControls {
  url: string
  port: number
  state: FakeState
  /** Pays a checkout without a browser; gives the sentence of a refusal, or null. */
  pay: (checkoutId: string, card?: string) => string | null
  finishOnboarding: (account: string) => void
  openDispute: Machine['openDispute']
  decideDispute: Machine['decideDispute']
  makePayout: Machine['makePayout']
  settlePayout: Machine['settlePayout']
  advanceClock: (seconds: number) => void
  close: () => Promise<void>
}

const EVENTS_KEPT = 5_000
const TICK_MS = 500

/** Starts the payment provider's stand-in on loopback. Refuses a live key. */
export async function startPaymentsFake(options: PaymentsFakeOptions): Promise<PaymentsFake> {
  requireNoLiveKey(options.secretKey, 'payments key')
  if (options.webhookUrl) requireLoopback(options.webhookUrl, 'a webhook')
  let url = ''
  // What was kept was written by this stand-in.
  const state = {
    ...emptyState(),
    ...(readKept(options.stateFile) as Partial<FakeState> | undefined),
  }
  const kept = keepState(options.stateFile, () => state)
  const trouble = makeTrouble()
  const machine = makeMachine({
    state,
    now: options.now ?? (() => new Date()),
    tell: (told) => tell(told),
  })
  const deliveries = makeDeliveries({ url: options.webhookUrl, sign })
  const view: View = { state, now: machine.now, baseUrl: () => url }

  const app = makeApp()
  app.use('/_control', controlRoutes({ machine, deliveries, trouble, onChange: kept.keep }))
  app.use('/v1', trouble.intercept)
  app.use(hostedPages(machine, kept.keep))
  const { secretKey } = options
  app.use(paymentsApi(machine, { secretKey, view, trouble, onChange: kept.keep }))
  const listening = await listenOnLoopback(app, options)
  url = listening.url
  const ticking = setInterval(machine.tick, TICK_MS)
  ticking.unref()

  return {
    ...deliveries,
    ...trouble,
    url,
    port: listening.port,
    state,
    pay: (id, card = CARDS.good) => {
      const checkout = state.checkouts[id]
      if (!checkout) throw missing('checkout.session', id)
      machine.tick()
      return machine.pay(checkout, { card })
    },
    finishOnboarding: machine.finishOnboarding,
    openDispute: machine.openDispute,
    decideDispute: machine.decideDispute,
    makePayout: machine.makePayout,
    settlePayout: machine.settlePayout,
    advanceClock: machine.advance,
    async close() {
      clearInterval(ticking)
      deliveries.stop()
      kept.flush()
      await closeServer(listening.server)
    },
  }

  function tell({ type, account, objectId }: Told): void {
    const id = `evt_fake${(state.next += 1).toString(36).padStart(10, '0')}`
    const event = { id, account, type, created: machine.now(), objectId }
    state.events.push(event)
    if (state.events.length > EVENTS_KEPT) state.events.shift()
    // The webhook hears of connected accounts, as one that is set up for them does.
    if (account !== null) deliveries.send(showEvent(event, view))
  }

  function sign(body: string): Record<string, string> {
    const t = machine.now()
    const v1 = createHmac('sha256', options.webhookSecret).update(`${t}.${body}`).digest('hex')
    return { 'stripe-signature': `t=${t},v1=${v1}` }
  }
}
