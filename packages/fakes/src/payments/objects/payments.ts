import type Stripe from 'stripe'
import type { FakeApplicationFee, FakePayment, FakeRefund, FakeState } from '../state'
import type { Shown } from './shape'

export function showPayment(payment: FakePayment) {
  const isPaid = payment.status === 'succeeded'
  const { refusal } = payment
  return {
    id: payment.id,
    object: 'payment_intent',
    status: payment.status,
    amount: payment.amount,
    amount_received: isPaid ? payment.amount : 0,
    currency: payment.currency,
    metadata: payment.metadata,
    application_fee_amount: payment.applicationFee || null,
    latest_charge: isPaid ? payment.charge : null,
    last_payment_error: refusal && {
      type: 'card_error',
      code: refusal.code,
      message: refusal.sentence,
      ...(refusal.declineCode ? { decline_code: refusal.declineCode } : {}),
    },
    created: payment.created,
    livemode: false,
  } satisfies Shown<Stripe.PaymentIntent>
}

export function showCharge(payment: FakePayment) {
  return {
    id: payment.charge,
    object: 'charge',
    amount: payment.amount,
    amount_captured: payment.amount,
    amount_refunded: payment.refunded,
    currency: payment.currency,
    status: 'succeeded',
    paid: true,
    captured: true,
    refunded: payment.refunded === payment.amount,
    disputed: payment.isDisputed,
    payment_intent: payment.id,
    application_fee: payment.applicationFeeId,
    application_fee_amount: payment.applicationFee || null,
    balance_transaction: payment.balanceTransaction,
    metadata: payment.metadata,
    created: payment.created,
    livemode: false,
  } satisfies Shown<Stripe.Charge>
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
    balance_transaction: refund.balanceTransaction,
    metadata: refund.metadata,
    created: refund.created,
    ...(refund.failureBalanceTransaction
      ? {
          failure_balance_transaction: refund.failureBalanceTransaction,
          failure_reason: 'expired_or_canceled_card',
        }
      : {}),
  } satisfies Shown<Stripe.Refund>
}

export function showApplicationFee(fee: FakeApplicationFee) {
  return {
    id: fee.id,
    object: 'application_fee',
    account: fee.payer,
    amount: fee.amount,
    amount_refunded: 0,
    refunded: false,
    balance_transaction: fee.balanceTransaction,
    charge: fee.charge,
    originating_transaction: null,
    currency: fee.currency,
    created: fee.created,
    livemode: false,
  } satisfies Shown<Stripe.ApplicationFee>
}
