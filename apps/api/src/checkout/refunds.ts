import { readAcademy } from '../academies/academies'
import { post } from '../ledger/ledger'
import { refundFailed, unplacedRefund } from '../ledger/postings'
import { invariant } from '../platform/invariant'
import { localDayOf } from '../platform/local-day'
import type { Services } from '../platform/services'
import { inAcademy } from '../platform/tenancy/transaction'
import type { PaymentsProvider, ProviderRefund } from './provider'
import { findPayment, lockRefund, updateRefund } from './queries'

/**
 * Carries a refund out at the provider. One that the provider has taken on is only asked after: what
 * it once knew as the same request it forgets in time, and would pay again.
 */
export async function carryOutRefund(
  services: Services,
  provider: PaymentsProvider,
  { academyId, refundId }: { academyId: string; refundId: string },
): Promise<void> {
  const asked = await inAcademy(services.db, academyId, async (trx) => {
    const refund = await lockRefund(trx, refundId)
    if (refund?.state !== 'asked' || !refund.paymentId) return null
    const payment = await findPayment(trx, refund.paymentId)
    const { paymentsAccount } = await readAcademy(trx)
    invariant(payment?.providerPayment && paymentsAccount, 'a card refund has a card payment')
    await updateRefund(trx, refundId, { askedAt: services.clock.now() })
    return { refund, payment: payment.providerPayment, account: paymentsAccount }
  })
  if (!asked) return
  const { refund, payment, account } = asked
  const answer = refund.providerRefund
    ? await provider.readRefund(account, refund.providerRefund)
    : await provider.refund({
        account,
        payment,
        amountMinor: refund.amountMinor,
        currency: refund.currency,
        refundId,
        orderId: refund.orderId,
      })
  await settleRefund(services, { academyId, answer: { ...answer, refundId } })
}

/** What the provider says of a refund; it only moves forward, and a failure after success counts. */
export async function settleRefund(
  services: Services,
  { academyId, answer }: { academyId: string; answer: ProviderRefund },
): Promise<void> {
  const { refundId } = answer
  if (!refundId) return
  await inAcademy(services.db, academyId, async (trx) => {
    const refund = await lockRefund(trx, refundId)
    if (!refund || refund.state === 'failed') return
    const now = services.clock.now()
    const { zone } = await readAcademy(trx)
    const about = { sourceId: refundId, happenedOn: localDayOf(now, zone) }
    const { amountMinor, currency } = refund
    // A late payment is owed back until the provider takes the refund on; others left the books
    // when they were asked for.
    const isToPost = refund.reason === 'late-payment' && refund.providerRefund === null
    if (answer.state === 'failed') {
      await updateRefund(trx, refundId, { state: 'failed', providerRefund: answer.id })
      if (!isToPost) {
        const what = 'Refund failed at the provider'
        const posting = refundFailed({ ...about, what, amountMinor })
        await post(services, trx, { posting, currency })
      }
      services.log.warn({ refundId, academyId }, 'a refund failed at the provider')
      return
    }
    if (isToPost) {
      const what = 'Late payment given back'
      await post(services, trx, {
        posting: unplacedRefund({ ...about, what, amountMinor }),
        currency,
      })
    }
    const isDone = answer.state === 'done'
    await updateRefund(trx, refundId, {
      providerRefund: answer.id,
      ...(isDone ? { state: 'done', doneAt: now } : {}),
    })
  })
}
