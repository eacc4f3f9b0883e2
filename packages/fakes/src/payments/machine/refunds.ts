import { CARDS } from '../cards'
import { requireStep } from '../currencies'
import { ProviderError } from '../provider-error'
import type { FakePayment, FakeRefund } from '../state'
import type { Core } from './core'

export interface Refunds {
  refund: (
    payment: FakePayment,
    wanted: { amount: number | undefined; metadata: Record<string, string> },
  ) => FakeRefund
  /** What becomes of a refund that was not settled at once. */
  settleRefund: (refund: FakeRefund) => void
}

export function makeRefunds(core: Core): Refunds {
  const { state, newId, now, tell } = core
  return {
    refund(payment, { amount, metadata }) {
      const left = payment.amount - payment.refunded
      const wanted = amount ?? left
      requireRefundable(payment, wanted)
      const { account, currency, card } = payment
      const isPending = card === CARDS.refundPends
      const refund: FakeRefund = {
        id: newId('re'),
        account,
        payment: payment.id,
        amount: wanted,
        currency,
        status: isPending ? 'pending' : 'succeeded',
        balanceTransaction: null,
        failureBalanceTransaction: null,
        metadata,
        created: now(),
      }
      state.refunds[refund.id] = refund
      payment.refunded += wanted
      if (!isPending) refund.balanceTransaction = bookRefund(core, refund)
      tell({ type: 'refund.created', account, objectId: refund.id })
      tell({ type: 'charge.refunded', account, objectId: payment.charge })
      if (isPending || card === CARDS.refundFails) core.later('settle-refund', refund.id)
      return refund
    },
    settleRefund(refund) {
      const { account, id: objectId } = refund
      if (refund.status === 'pending') {
        refund.status = 'succeeded'
        refund.balanceTransaction = bookRefund(core, refund)
        return tell({ type: 'refund.updated', account, objectId })
      }
      const payment = state.payments[refund.payment]
      if (payment) payment.refunded -= refund.amount
      refund.status = 'failed'
      refund.failureBalanceTransaction = bookRefund(core, refund)
      tell({ type: 'refund.updated', account, objectId })
      tell({ type: 'refund.failed', account, objectId })
    },
  }
}

function requireRefundable(payment: FakePayment, wanted: number): void {
  const { charge, currency } = payment
  const left = payment.amount - payment.refunded
  if (payment.status !== 'succeeded') {
    throw new ProviderError(400, 'This payment has not succeeded; there is nothing to refund.')
  }
  if (payment.isDisputed) {
    throw new ProviderError(400, `Charge ${charge} has been charged back.`, {
      code: 'charge_disputed',
    })
  }
  if (left === 0) {
    throw new ProviderError(400, `Charge ${charge} has already been refunded.`, {
      code: 'charge_already_refunded',
    })
  }
  if (wanted <= 0 || wanted > left) {
    const message = `A refund of ${wanted} is not within what is left of the charge (${left}).`
    throw new ProviderError(400, message, { param: 'amount' })
  }
  requireStep(wanted, currency)
}

/** The money going back; of a refund that failed, the money coming back from there. */
function bookRefund(core: Core, { id, account, amount, currency, status }: FakeRefund): string {
  const isFailure = status === 'failed'
  return core.book({
    account,
    amount: isFailure ? amount : -amount,
    currency,
    type: isFailure ? 'refund_failure' : 'refund',
    category: isFailure ? 'refund_failure' : 'refund',
    source: id,
    description: isFailure ? 'Refund that failed' : 'Refund',
  })
}
