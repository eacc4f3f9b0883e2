import { DISPUTES, refusalOf } from '../cards'
import { feeOf } from '../currencies'
import type { FakeCheckout, FakePayment } from '../state'
import type { Core } from './core'

export interface Charges {
  /** Pays by a card number; gives the sentence of a refusal, or null when it went through. */
  pay: (
    checkout: FakeCheckout,
    given: { card: string; created?: number | undefined },
  ) => string | null
}

export function makeCharges(core: Core): Charges {
  const { now, tell } = core
  return {
    pay(checkout, { card, created }) {
      if (checkout.status !== 'open') return 'This payment page is no longer open.'
      const at = created ?? now()
      const payment = paymentOf(core, checkout, at)
      const { account } = checkout
      payment.card = card.replace(/\s/g, '')
      payment.refusal = refusalOf(payment.card)
      if (payment.refusal) {
        tell({ type: 'payment_intent.payment_failed', account, objectId: payment.id })
        return payment.refusal.sentence
      }
      takeMoney(core, payment, at)
      Object.assign(checkout, { status: 'complete', paymentStatus: 'paid' })
      tell({ type: 'charge.succeeded', account, objectId: payment.charge })
      tell({ type: 'payment_intent.succeeded', account, objectId: payment.id })
      tell({ type: 'checkout.session.completed', account, objectId: checkout.id })
      if (DISPUTES[payment.card]) core.later('open-dispute', payment.id)
      return null
    },
  }
}

/** A checkout has one payment intent, made at the first try and kept for the next ones. */
function paymentOf({ state, newId }: Core, checkout: FakeCheckout, at: number): FakePayment {
  const had = checkout.payment ? state.payments[checkout.payment] : undefined
  if (had) return had
  const payment: FakePayment = {
    id: newId('pi'),
    account: checkout.account,
    checkout: checkout.id,
    status: 'requires_payment_method',
    amount: checkout.amount,
    currency: checkout.currency,
    metadata: checkout.paymentMetadata,
    charge: newId('ch'),
    balanceTransaction: null,
    applicationFee: checkout.applicationFee,
    applicationFeeId: null,
    refunded: 0,
    isDisputed: false,
    refusal: null,
    card: '',
    created: at,
  }
  state.payments[payment.id] = payment
  checkout.payment = payment.id
  return payment
}

/** A direct charge: the academy's balance bears both fees, the platform's gets its own. */
function takeMoney(core: Core, payment: FakePayment, created: number): void {
  const { account, amount, currency, charge, applicationFee } = payment
  payment.status = 'succeeded'
  payment.created = created
  payment.balanceTransaction = core.book({
    account,
    amount,
    currency,
    type: 'charge',
    category: 'charge',
    source: charge,
    description: 'Charge',
    providerFee: feeOf(amount, currency),
    applicationFee,
    created,
  })
  if (applicationFee === 0) return
  const id = core.newId('fee')
  const balanceTransaction = core.book({
    account: null,
    amount: applicationFee,
    currency,
    type: 'application_fee',
    category: 'platform_earning',
    source: id,
    description: 'Application fee',
    created,
  })
  const fee = { id, payer: account, charge, amount: applicationFee, currency }
  core.state.applicationFees[id] = { ...fee, balanceTransaction, created }
  payment.applicationFeeId = id
  core.tell({ type: 'application_fee.created', account: null, objectId: id })
}
