import { createSign, generateKeyPairSync, type KeyObject } from 'node:crypto'
import express, { Router, json, type Request, type Response } from 'express'
import { closeServer, listenOnLoopback } from '../listen'
import { keepState, readKept } from '../kept-state'
import { mailboxPage, messagePage } from './mailbox-pages'

export interface KeptMail {
  id: string
  to: string
  fromEmail: string
  fromName: string
  subject: string
  text: string
  html: string
  attachments: { filename: string; type: string; content: string }[]
  at: string
}

export interface MailFakeOptions {
  port?: number
  apiKey: string
  webhookUrl?: string
  now?: () => Date
  stateFile?: string
}

export interface MailFake {
  url: string
  port: number
  /** What an event webhook's signature is checked with. */
  webhookPublicKey: string
  messages: KeptMail[]
  /** The messages to an address, oldest first. */
  messagesTo(address: string): KeptMail[]
  failNext(given: { status: number; count: number }): void
  /** Resolves when no event webhook is on its way. */
  flush(): Promise<void>
  close(): Promise<void>
}

/** Addresses that get no mail in life either, and what is told of them. */
const SENTINELS: Record<string, string> = { bounce: 'bounce', drop: 'dropped', spam: 'spamreport' }
const MOST_KEPT = 2_000

interface Sent {
  personalizations?: { to?: { email?: string }[]; subject?: string }[]
  from?: { email?: string; name?: string }
  subject?: string
  content?: { type?: string; value?: string }[]
  attachments?: { filename?: string; type?: string; content?: string }[]
}

/** Starts the mail provider's stand-in on loopback: it keeps what is sent and shows it. */
export async function startMailFake(options: MailFakeOptions): Promise<MailFake> {
  const now = options.now ?? (() => new Date())
  const keys = readOrMakeKeys(options.stateFile)
  const kept = keepState(options.stateFile, () => ({ messages, pem: keys.pem }))
  const had = readKept(options.stateFile) as { messages?: KeptMail[] } | undefined
  const messages: KeptMail[] = had?.messages ?? []
  const failures: number[] = []
  const onTheirWay = new Set<Promise<void>>()
  let count = messages.length

  const send = (request: Request, response: Response) => {
    const refuse = (status: number, message: string) =>
      response.status(status).json({ errors: [{ message, field: null }] })
    const failure = failures.shift()
    if (failure) return refuse(failure, 'Asked to fail.')
    if (request.get('authorization') !== `Bearer ${options.apiKey}`) {
      return refuse(401, 'The provided authorization grant is invalid.')
    }
    const body = request.body as Sent
    const to = body.personalizations?.[0]?.to?.[0]?.email
    const subject = body.personalizations?.[0]?.subject ?? body.subject
    const wrong = whatIsWrong({ body, to, subject })
    if (wrong) return refuse(400, wrong)
    count += 1
    const id = `fake-${count.toString(36).padStart(8, '0')}`
    messages.push(
      toKept(body, { id, to: to ?? '', subject: subject ?? '', at: now().toISOString() }),
    )
    if (messages.length > MOST_KEPT) messages.shift()
    kept.keep()
    response.status(202).set('x-message-id', id).end()
    const sentinel = SENTINELS[(to ?? '').split('@')[0] ?? '']
    if (sentinel && options.webhookUrl) {
      const telling: Promise<void> = tell({
        url: options.webhookUrl,
        key: keys.privateKey,
        at: now(),
        event: {
          sg_event_id: `event-${id}`,
          event: sentinel,
          email: to ?? '',
          timestamp: Math.floor(now().getTime() / 1000),
        },
      }).finally(() => onTheirWay.delete(telling))
      onTheirWay.add(telling)
    }
  }

  const app = express()
  app.disable('x-powered-by')
  app.post(
    '/v3/mail/send',
    json({ limit: '5mb' }),
    (request, response) => void send(request, response),
  )
  app.use(mailboxRoutes(messages))
  app.use(
    '/_control',
    controlRoutes({ messages, failures, publicKey: keys.publicKey, keep: kept.keep }),
  )
  const listening = await listenOnLoopback(app, options)

  return {
    url: listening.url,
    port: listening.port,
    webhookPublicKey: keys.publicKey,
    messages,
    messagesTo: (address) => messages.filter(({ to }) => to === address),
    failNext: ({ status, count: times }) =>
      void failures.push(...Array<number>(times).fill(status)),
    async flush() {
      while (onTheirWay.size > 0) await Promise.all(onTheirWay)
    },
    async close() {
      kept.flush()
      await closeServer(listening.server)
    },
  }
}

function whatIsWrong(given: {
  body: Sent
  to: string | undefined
  subject: string | undefined
}): string | null {
  const { body, to, subject } = given
  if (!to?.includes('@')) return 'The to address is missing or not valid.'
  if (!body.from?.email) return 'The from address is missing.'
  if (!subject) return 'The subject is required.'
  if (!body.content?.length) return 'At least one content block is required.'
  return null
}

function toKept(
  body: Sent,
  head: { id: string; to: string; subject: string; at: string },
): KeptMail {
  const contentOf = (type: string) => body.content?.find((part) => part.type === type)?.value ?? ''
  return {
    ...head,
    fromEmail: body.from?.email ?? '',
    fromName: body.from?.name ?? '',
    text: contentOf('text/plain'),
    html: contentOf('text/html'),
    attachments: (body.attachments ?? []).map(({ filename = '', type = '', content = '' }) => ({
      filename,
      type,
      content,
    })),
  }
}

function readOrMakeKeys(stateFile: string | undefined) {
  const had = readKept(stateFile) as { pem?: { privateKey: string; publicKey: string } } | undefined
  const made = had?.pem ?? makeKeys()
  return { pem: made, privateKey: made.privateKey, publicKey: made.publicKey }
}

function makeKeys(): { privateKey: string; publicKey: string } {
  const { privateKey, publicKey } = generateKeyPairSync('ec', { namedCurve: 'prime256v1' })
  const asText = (key: KeyObject, type: 'pkcs8' | 'spki') =>
    key.export({ type: type as 'pkcs8', format: 'pem' }).toString()
  const spki = publicKey.export({ type: 'spki', format: 'der' }).toString('base64')
  return { privateKey: asText(privateKey, 'pkcs8'), publicKey: spki }
}

/** Tells of a bounce as the provider does: signed over the timestamp and the bytes. */
async function tell(given: { url: string; key: string; at: Date; event: object }): Promise<void> {
  const body = JSON.stringify([given.event])
  const timestamp = String(Math.floor(given.at.getTime() / 1000))
  const signature = createSign('sha256')
    .update(timestamp + body)
    .sign(given.key, 'base64')
  await fetch(given.url, {
    method: 'POST',
    headers: {
      'content-type': 'application/json',
      'x-twilio-email-event-webhook-signature': signature,
      'x-twilio-email-event-webhook-timestamp': timestamp,
    },
    body,
  }).catch(() => {})
}

function mailboxRoutes(messages: readonly KeptMail[]): Router {
  const router = Router()
  const find = (id: string) => messages.find((message) => message.id === id)
  router.get('/', (request, response) => {
    const { to } = request.query
    const shown =
      typeof to === 'string' && to
        ? messages.filter((message) => message.to.includes(to))
        : messages
    response.send(mailboxPage([...shown].reverse().slice(0, 200), typeof to === 'string' ? to : ''))
  })
  router.get('/messages/:id', (request, response) => {
    const message = find(request.params.id)
    if (!message) return void response.status(404).send('No such message.')
    response.send(messagePage(message))
  })
  router.get('/messages/:id/attachments/:index', (request, response) => {
    const part = find(request.params.id)?.attachments[Number(request.params.index)]
    if (!part) return void response.status(404).send('No such part.')
    response.set(
      'content-disposition',
      `attachment; filename="${part.filename.replace(/[^\w.-]/g, '_')}"`,
    )
    response.type(part.type).send(Buffer.from(part.content, 'base64'))
  })
  return router
}

function controlRoutes(given: {
  messages: KeptMail[]
  failures: number[]
  publicKey: string
  keep: () => void
}): Router {
  const { messages, failures, publicKey, keep } = given
  const router = Router()
  router.use(json())
  router.get('/messages', (request, response) => {
    const { to } = request.query
    response.json(
      typeof to === 'string' ? messages.filter((message) => message.to === to) : messages,
    )
  })
  router.get('/public-key', (_request, response) => response.json({ publicKey }))
  router.post('/reset', (_request, response) => {
    messages.length = 0
    keep()
    response.json({})
  })
  router.post('/fail-next', (request, response) => {
    const { status = 500, count = 1 } = Object(request.body) as { status?: number; count?: number }
    failures.push(...Array<number>(count).fill(status))
    response.json({})
  })
  return router
}
