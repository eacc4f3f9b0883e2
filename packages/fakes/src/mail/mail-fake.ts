import type { Router } from 'express'
import { deliveryControls, failureOf, makeControls } from '../control'
import { makeDeliveries, type DeliveryControls } from '../deliveries'
import { keepState, readKept } from '../kept-state'
import { closeServer, listenOnLoopback, makeApp } from '../listen'
import { requireLoopback, requireNoLiveKey } from '../safety'
import type { MailEvent, MailEventName } from './events'
import { makeSigningKeys, signDelivery, type SigningKeys } from './keys'
import { mailboxRoutes } from './mailbox-routes'
import type { KeptMail } from './message'
import { sendRoute, type Mailbox } from './send-route'

export interface MailFakeOptions {
  host?: string
  port?: number
  apiKey: string
  webhookUrl?: string
  /** What the webhook is set up to hear of; left out, what keeps mail from an address. */
  webhookEvents?: readonly MailEventName[]
  now?: () => Date
  /** Where the mailbox is kept between starts; left out, it is forgotten. */
  stateFile?: string
}

export interface MailFake extends DeliveryControls {
  url: string
  port: number
  /** What an event webhook's signature is checked with. */
  webhookPublicKey: string
  messages: KeptMail[]
  /** The messages to an address, oldest first. */
  messagesTo: (address: string) => KeptMail[]
  failNext: (given: { status: number; count: number }) => void
  close: () => Promise<void>
}

interface Kept {
  mailbox: Mailbox
  keys: SigningKeys
}

/** Starts the mail provider's stand-in on loopback: it keeps what is sent and shows it. */
export async function startMailFake(options: MailFakeOptions): Promise<MailFake> {
  requireNoLiveKey(options.apiKey, 'mail key')
  if (options.webhookUrl) requireLoopback(options.webhookUrl, 'a webhook')
  const now = options.now ?? (() => new Date())
  // What was kept was written by this stand-in, or by an older one that kept less.
  const { mailbox, keys }: Kept = {
    mailbox: { messages: [], suppressed: {}, accepted: 0 },
    keys: makeSigningKeys(),
    ...(readKept(options.stateFile) as Partial<Kept> | undefined),
  }
  const kept = keepState(options.stateFile, () => ({ mailbox, keys }) satisfies Kept)
  const deliveries = makeDeliveries({
    url: options.webhookUrl,
    sign: (body) => signDelivery(keys, { body, at: now() }),
  })
  const failures: number[] = []
  const failNext: MailFake['failNext'] = ({ status, count }) =>
    void failures.push(...Array<number>(count).fill(status))

  const app = makeApp()
  const { apiKey } = options
  const wanted: readonly string[] = options.webhookEvents ?? ['bounce', 'dropped', 'spamreport']
  const tell = (events: MailEvent[]) => {
    const heard = events.filter(({ event }) => wanted.includes(event))
    if (heard.length > 0) deliveries.send(heard)
  }
  app.use(sendRoute({ mailbox, apiKey, now, failures, tell, onChange: kept.keep }))
  app.use(mailboxRoutes(mailbox.messages))
  const publicKey = keys.publicKey
  app.use(
    '/_control',
    controlRoutes({ mailbox, publicKey, deliveries, failNext, onChange: kept.keep }),
  )
  const listening = await listenOnLoopback(app, options)

  return {
    ...deliveries,
    url: listening.url,
    port: listening.port,
    webhookPublicKey: publicKey,
    messages: mailbox.messages,
    messagesTo: (address) => mailbox.messages.filter(({ to }) => to === address),
    failNext,
    async close() {
      deliveries.stop()
      kept.flush()
      await closeServer(listening.server)
    },
  }
}

function controlRoutes(given: {
  mailbox: Mailbox
  publicKey: string
  deliveries: DeliveryControls
  failNext: MailFake['failNext']
  onChange: () => void
}): Router {
  const { mailbox, publicKey, deliveries, failNext, onChange } = given
  const { router, act } = makeControls(onChange)
  deliveryControls(act, deliveries)
  act('fail-next', (body) => failNext(failureOf(body)))
  act('reset', () => {
    mailbox.messages.length = 0
    mailbox.suppressed = {}
  })
  router.get('/messages', (request, response) => {
    const { to } = request.query
    response.json(mailbox.messages.filter((message) => to === undefined || message.to === to))
  })
  router.get('/public-key', (_request, response) => response.json({ publicKey }))
  return router
}
