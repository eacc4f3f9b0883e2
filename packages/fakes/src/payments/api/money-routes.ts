import type { Machine } from '../machine/machine'
import { showBalance, showBalanceTransaction, showDispute, showPayout } from '../objects/balance'
import { findByCharge } from '../objects/objects'
import { showApplicationFee, showCharge, showPayment, showRefund } from '../objects/payments'
import { ProviderError, missing } from '../provider-error'
import { own, ownOf, type Asked } from './asked'
import { integerAt, textAt, textsAt } from './form-body'
import type { Routes } from './routes'

/** Payments, their charges, and the money that goes back. */
export function paymentRoutes(routes: Routes, machine: Machine): void {
  const { state } = machine
  const payments = (asked: Asked) => ownOf(asked, state.payments)
  const charges = (asked: Asked) =>
    payments(asked)
      .filter(({ status }) => status === 'succeeded')
      .map(({ charge, id, created }) => ({ id: charge, payment: id, created }))

  routes.list('/v1/payment_intents', payments)
  routes.get('/v1/payment_intents/:id', (asked) => showPayment(paymentOf(asked, asked.id)))
  routes.list('/v1/charges', charges, {
    payment_intent: ({ payment }, id) => payment === id,
  })
  routes.get('/v1/charges/:id', (asked) => showCharge(chargeOf(asked, asked.id)))

  routes.list('/v1/refunds', (asked) => ownOf(asked, state.refunds), {
    payment_intent: ({ payment }, id) => payment === id,
    charge: ({ payment }, id) => state.payments[payment]?.charge === id,
  })
  routes.get('/v1/refunds/:id', (asked) =>
    showRefund(own(asked, asked.id, { records: state.refunds, what: 'refund' }), state),
  )
  routes.post(
    '/v1/refunds',
    ['amount', 'charge', 'metadata', 'payment_intent', 'reason'],
    (asked) => {
      const { form } = asked
      const intent = textAt(form, 'payment_intent')
      const charge = textAt(form, 'charge')
      if (intent === undefined && charge === undefined) {
        throw new ProviderError(400, 'A refund is of a payment_intent or of a charge.')
      }
      const payment =
        intent === undefined ? chargeOf(asked, charge ?? '') : paymentOf(asked, intent)
      const metadata = textsAt(form, 'metadata')
      return showRefund(
        machine.refund(payment, { amount: integerAt(form, 'amount'), metadata }),
        state,
      )
    },
  )

  function paymentOf(asked: Asked, id: string) {
    return own(asked, id, { records: state.payments, what: 'payment_intent' })
  }
  function chargeOf(asked: Asked, id: string) {
    const payment = findByCharge(state, id)
    if (payment?.account !== asked.account) throw missing('charge', id)
    return payment
  }
}

/** Disputes, and the answers to them. */
export function disputeRoutes(routes: Routes, machine: Machine): void {
  const { state, now } = machine
  const disputeOf = (asked: Asked) =>
    own(asked, asked.id, { records: state.disputes, what: 'dispute' })

  routes.list('/v1/disputes', (asked) => ownOf(asked, state.disputes), {
    payment_intent: ({ payment }, id) => payment === id,
    charge: ({ payment }, id) => state.payments[payment]?.charge === id,
  })
  routes.get('/v1/disputes/:id', (asked) => showDispute(disputeOf(asked), state, now()))
  routes.post('/v1/disputes/:id', ['evidence', 'metadata', 'submit'], (asked) => {
    const dispute = disputeOf(asked)
    Object.assign(dispute.metadata, textsAt(asked.form, 'metadata'))
    const evidence = textsAt(asked.form, 'evidence')
    // Sent to the bank unless it says otherwise.
    const isSubmitted = textAt(asked.form, 'submit') !== 'false'
    return showDispute(machine.addEvidence(dispute, { evidence, isSubmitted }), state, now())
  })
  routes.post('/v1/disputes/:id/close', [], (asked) =>
    showDispute(machine.decideDispute(disputeOf(asked), 'lost'), state, now()),
  )
}

/** What an account has, what moved it, and what went to its bank. */
export function balanceRoutes(routes: Routes, machine: Machine): void {
  const { state, now } = machine
  routes.get('/v1/balance', ({ account }) => showBalance(state, account, now()))
  routes.list('/v1/balance_transactions', (asked) => ownOf(asked, state.balance), {
    currency: (moved, currency) => moved.currency === currency,
    payout: (moved, id) => moved.payout === id,
    source: (moved, id) => moved.source === id,
    type: (moved, type) => moved.type === type,
  })
  routes.get('/v1/balance_transactions/:id', (asked) =>
    showBalanceTransaction(
      own(asked, asked.id, { records: state.balance, what: 'balance transaction' }),
      now(),
    ),
  )
  routes.list('/v1/payouts', (asked) => ownOf(asked, state.payouts), {
    status: (payout, status) => payout.status === status,
  })
  routes.get('/v1/payouts/:id', (asked) =>
    showPayout(own(asked, asked.id, { records: state.payouts, what: 'payout' })),
  )
  // Application fees are the platform's: a connected account sees them in its fee details.
  const fees = ({ account }: Asked) =>
    account === null ? Object.values(state.applicationFees) : []
  routes.list('/v1/application_fees', fees, { charge: (fee, id) => fee.charge === id })
  routes.get('/v1/application_fees/:id', ({ account, id }) => {
    const fee = state.applicationFees[id]
    if (!fee || account !== null) throw missing('application fee', id)
    return showApplicationFee(fee)
  })
}
