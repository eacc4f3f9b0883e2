import { EventWebhook } from '@sendgrid/eventwebhook'
import express, { Router } from 'express'
import { z } from 'zod'
import { Problem } from '../platform/errors'
import type { Services } from '../platform/services'
import { inPlain } from '../platform/tenancy/transaction'
import { insertMailEvents } from './queries'

const MAX_AGE_SECONDS = 600
/** What ends later mail to an address. */
const SILENCING = new Set(['bounce', 'dropped', 'spamreport'])

const deliveries = z
  .array(z.object({ sg_event_id: z.string(), event: z.string(), email: z.string() }))
  .max(1_000)

/** Takes what the mail provider tells us of bounces and complaints: verified, fresh, and once. */
export function mailWebhook(services: Services): Router {
  const router = Router()
  const rawBody = express.raw({ type: 'application/json', limit: '1mb' })
  router.post('/webhooks/mail', rawBody, async (request, response) => {
    const body = Buffer.isBuffer(request.body) ? request.body : Buffer.alloc(0)
    const signature = request.get('x-twilio-email-event-webhook-signature') ?? ''
    const timestamp = request.get('x-twilio-email-event-webhook-timestamp') ?? ''
    if (!isGenuine(services, { body, signature, timestamp })) {
      throw new Problem('bad-request', 'The signature is missing, wrong or too old.')
    }
    const read = deliveries.safeParse(JSON.parse(body.toString('utf8')))
    if (!read.success) throw new Problem('bad-request', 'This is not a list of events.')
    await inPlain(services.db, async (trx) => {
      const receivedAt = services.clock.now()
      const telling = read.data.filter(({ event }) => SILENCING.has(event))
      const rows = telling.map(({ sg_event_id: eventId, event: type }) => {
        return { eventId, type, receivedAt }
      })
      const fresh = new Set(await insertMailEvents(trx, rows))
      for (const { sg_event_id: eventId, event: type, email } of telling) {
        if (!fresh.has(eventId)) continue
        await services.outbox.emit(trx, 'mail.told', { eventId, type, email: email.toLowerCase() })
      }
    })
    response.status(204).end()
  })
  return router
}

function isGenuine(
  { config, clock }: Services,
  given: { body: Buffer; signature: string; timestamp: string },
): boolean {
  const { webhookPublicKey } = config.mail
  const age = clock.now().getTime() / 1000 - Number(given.timestamp)
  if (!webhookPublicKey || !(Math.abs(age) <= MAX_AGE_SECONDS)) return false
  try {
    const verifier = new EventWebhook()
    const key = verifier.convertPublicKeyToECDSA(webhookPublicKey)
    return verifier.verifySignature(key, given.body, given.signature, given.timestamp)
  } catch {
    return false
  }
}
