import express, { Router } from 'express'
import { Problem } from '../platform/errors'
import type { Services } from '../platform/services'
import { findAcademyByPaymentsAccount } from '../platform/tenancy/look-ups'
import { inPlain } from '../platform/tenancy/transaction'
import type { OutboxEvents } from '../platform/outbox/events'
import { refreshPaymentsState } from './payments-account'
import type { PaymentsProvider } from './provider'
import { insertProviderEvent } from './queries'
import { settleRefund } from './refunds'
import { noteRefusal, settlePaidCheckout } from './settle'

/** Takes deliveries: checked, written down with their job in one transaction, then thanked for. */
export function paymentsWebhook(services: Services, provider: PaymentsProvider): Router {
  const router = Router()
  const rawBody = express.raw({ type: 'application/json', limit: '512kb' })
  router.post('/webhooks/payments', rawBody, async (request, response) => {
    const event = provider.readWebhook({
      body: Buffer.isBuffer(request.body) ? request.body : Buffer.alloc(0),
      signature: request.get('stripe-signature') ?? '',
      now: services.clock.now(),
    })
    if (!event) throw new Problem('bad-request', 'The signature is missing, wrong or too old.')
    const { id: eventId, type, account, objectId } = event
    await inPlain(services.db, async (trx) => {
      const receivedAt = services.clock.now()
      const row = { eventId, type, accountRef: account, receivedAt }
      if (!(await insertProviderEvent(trx, row))) return
      await services.outbox.emit(trx, 'payments.told', { eventId, account, type, objectId })
    })
    response.status(204).end()
  })
  return router
}

/**
 * Acts on what the provider told us: the object is fetched again, so that an old or reordered
 * delivery brings today's truth. The academy comes from the event's account.
 */
export async function hearProvider(
  services: Services,
  provider: PaymentsProvider,
  { account, type, objectId }: OutboxEvents['payments.told'],
): Promise<void> {
  const academyId = account ? await findAcademyByPaymentsAccount(services.db, account) : null
  if (!account || !academyId) return
  switch (type) {
    case 'checkout.session.completed':
    case 'checkout.session.async_payment_succeeded': {
      const checkout = await provider.readCheckout(account, objectId)
      await settlePaidCheckout(services, provider, { academyId, account, checkout })
      return
    }
    case 'payment_intent.payment_failed': {
      const payment = await provider.readPayment(account, objectId)
      await noteRefusal(services, { academyId, payment })
      return
    }
    case 'refund.updated':
    case 'refund.failed': {
      const answer = await provider.readRefund(account, objectId)
      await settleRefund(services, { academyId, answer })
      return
    }
    case 'account.updated':
      await refreshPaymentsState(services, provider, academyId)
  }
}
