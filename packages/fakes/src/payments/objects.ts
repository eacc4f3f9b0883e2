import type {
  FakeAccount,
  FakeCheckout,
  FakeEvent,
  FakePayment,
  FakeRefund,
  FakeState,
} from './state'

/** The stand-in's records as the provider's API shows them. */

export function showAccount(account: FakeAccount) {
  const due = account.chargesEnabled ? [] : ['external_account', 'tos_acceptance.date']
  return {
    id: account.id,
    object: 'account',
    email: account.email,
    business_profile: { name: account.name },
    charges_enabled: account.chargesEnabled,
    payouts_enabled: account.chargesEnabled,
    details_submitted: account.chargesEnabled,
    requirements: { currently_due: due, eventually_due: due, past_due: [], disabled_reason: null },
    metadata: account.metadata,
  }
}

export function showCheckout(checkout: FakeCheckout, baseUrl: string) {
  return {
    id: checkout.id,
    object: 'checkout.session',
    mode: 'payment',
    status: checkout.status,
    payment_status: checkout.paymentStatus,
    amount_total: checkout.amount,
    amount_subtotal: checkout.amount,
    currency: checkout.currency,
    client_reference_id: checkout.clientReference,
    customer_email: checkout.email,
    metadata: checkout.metadata,
    payment_intent: checkout.payment,
    success_url: checkout.successUrl,
    cancel_url: checkout.cancelUrl,
    expires_at: checkout.expiresAt,
    created: checkout.created,
    livemode: false,
    url: checkout.status === 'open' ? `${baseUrl}/pay/${checkout.id}` : null,
  }
}

export function showBalanceTransaction(payment: FakePayment) {
  const total = payment.fee + payment.applicationFee
  const detail = (amount: number, type: string, description: string) => ({
    amount,
    currency: payment.currency,
    type,
    description,
    application: null,
  })
  return {
    id: payment.balanceTransaction,
    object: 'balance_transaction',
    amount: payment.amount,
    currency: payment.currency,
    fee: total,
    net: payment.amount - total,
    fee_details: [
      detail(payment.fee, 'stripe_fee', 'Processing fee'),
      ...(payment.applicationFee > 0
        ? [detail(payment.applicationFee, 'application_fee', 'Application fee')]
        : []),
    ],
    source: payment.charge,
    type: 'charge',
    status: 'available',
    created: payment.created,
  }
}

export function showCharge(payment: FakePayment, isExpanded: boolean) {
  return {
    id: payment.charge,
    object: 'charge',
    amount: payment.amount,
    amount_refunded: payment.refunded,
    currency: payment.currency,
    paid: payment.status === 'succeeded',
    refunded: payment.refunded === payment.amount,
    payment_intent: payment.id,
    application_fee_amount: payment.applicationFee || null,
    balance_transaction: isExpanded ? showBalanceTransaction(payment) : payment.balanceTransaction,
    metadata: payment.metadata,
    created: payment.created,
  }
}

export function showPayment(payment: FakePayment, expand: readonly string[]) {
  const isPaid = payment.status === 'succeeded'
  const isChargeOpen = expand.some((path) => path.startsWith('latest_charge'))
  const isBalanceOpen = expand.includes('latest_charge.balance_transaction')
  return {
    id: payment.id,
    object: 'payment_intent',
    status: payment.status,
    amount: payment.amount,
    amount_received: isPaid ? payment.amount : 0,
    currency: payment.currency,
    metadata: payment.metadata,
    application_fee_amount: payment.applicationFee || null,
    latest_charge: !isPaid
      ? null
      : isChargeOpen
        ? showCharge(payment, isBalanceOpen)
        : payment.charge,
    last_payment_error: payment.refusal
      ? { type: 'card_error', code: 'card_declined', decline_code: payment.refusal }
      : null,
    created: payment.created,
    livemode: false,
  }
}

export function showRefund(refund: FakeRefund, state: FakeState) {
  return {
    id: refund.id,
    object: 'refund',
    amount: refund.amount,
    currency: refund.currency,
    status: refund.status,
    payment_intent: refund.payment,
    charge: state.payments[refund.payment]?.charge ?? null,
    metadata: refund.metadata,
    failure_reason: refund.status === 'failed' ? 'expired_or_canceled_card' : undefined,
    created: refund.created,
  }
}

/** An event with its object as it is now: what a delivery carries, and the events list shows. */
export function showEvent(event: FakeEvent, state: FakeState, baseUrl: string) {
  const { objectId } = event
  const { accounts, checkouts, payments, refunds } = state
  const charged = Object.values(payments).find(({ charge }) => charge === objectId)
  const object =
    (checkouts[objectId] && showCheckout(checkouts[objectId], baseUrl)) ??
    (payments[objectId] && showPayment(payments[objectId], [])) ??
    (refunds[objectId] && showRefund(refunds[objectId], state)) ??
    (accounts[objectId] && showAccount(accounts[objectId])) ??
    (charged && showCharge(charged, false))
  return {
    id: event.id,
    object: 'event',
    api_version: null,
    type: event.type,
    created: event.created,
    livemode: false,
    pending_webhooks: 1,
    request: null,
    ...(event.account ? { account: event.account } : {}),
    data: { object },
  }
}
