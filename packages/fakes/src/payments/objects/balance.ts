import type Stripe from 'stripe'
import { netOf } from '../machine/payouts'
import type { FakeBalanceTransaction, FakeDispute, FakePayout, FakeState } from '../state'
import type { Shown } from './shape'

export function showBalanceTransaction(moved: FakeBalanceTransaction, now: number) {
  const detail = (amount: number, type: string, description: string) =>
    amount === 0 ? [] : [{ amount, currency: moved.currency, type, description, application: null }]
  return {
    id: moved.id,
    object: 'balance_transaction',
    amount: moved.amount,
    currency: moved.currency,
    fee: moved.providerFee + moved.applicationFee,
    net: netOf(moved),
    fee_details: [
      ...detail(moved.providerFee, 'stripe_fee', 'Processing fee'),
      ...detail(moved.applicationFee, 'application_fee', 'Application fee'),
    ],
    type: moved.type,
    reporting_category: moved.category,
    description: moved.description,
    source: moved.source,
    status: isAvailable(moved, now) ? 'available' : 'pending',
    available_on: moved.availableOn,
    created: moved.created,
  } satisfies Shown<Stripe.BalanceTransaction>
}

/** What an account has now, by currency: what a payout may take, and what still waits. */
export function showBalance(state: FakeState, account: string | null, now: number) {
  const own = Object.values(state.balance).filter((moved) => moved.account === account)
  const sums = (wanted: boolean) =>
    [...new Set(own.map(({ currency }) => currency))].sort().map((currency) => ({
      currency,
      amount: own
        .filter((moved) => moved.currency === currency && isAvailable(moved, now) === wanted)
        .reduce((sum, moved) => sum + netOf(moved), 0),
    }))
  return {
    object: 'balance',
    available: sums(true),
    pending: sums(false),
    livemode: false,
  } satisfies Shown<Stripe.Balance>
}

const isAvailable = ({ payout, availableOn }: FakeBalanceTransaction, now: number): boolean =>
  payout !== null || availableOn <= now

export function showDispute(dispute: FakeDispute, state: FakeState, now: number) {
  const moved = dispute.balanceTransactions.flatMap((id) => state.balance[id] ?? [])
  return {
    id: dispute.id,
    object: 'dispute',
    amount: dispute.amount,
    currency: dispute.currency,
    reason: dispute.reason,
    status: dispute.status,
    payment_intent: dispute.payment,
    charge: state.payments[dispute.payment]?.charge ?? '',
    balance_transactions: moved.map((one) => showBalanceTransaction(one, now)),
    evidence: dispute.evidence,
    evidence_details: {
      due_by: dispute.dueBy,
      has_evidence: Object.keys(dispute.evidence).length > 0,
      past_due: dispute.dueBy < now,
      submission_count: dispute.submissions,
    },
    is_charge_refundable: false,
    metadata: dispute.metadata,
    created: dispute.created,
    livemode: false,
  } satisfies Shown<Stripe.Dispute>
}

export function showPayout(payout: FakePayout) {
  const isFailed = payout.status === 'failed'
  return {
    id: payout.id,
    object: 'payout',
    amount: payout.amount,
    currency: payout.currency,
    status: payout.status,
    automatic: true,
    type: 'bank_account',
    method: 'standard',
    arrival_date: payout.arrivesOn,
    balance_transaction: payout.balanceTransaction,
    failure_balance_transaction: payout.failureBalanceTransaction,
    failure_code: isFailed ? 'account_closed' : null,
    failure_message: isFailed ? 'The bank account has been closed.' : null,
    reconciliation_status: payout.status === 'paid' ? 'completed' : 'in_progress',
    created: payout.created,
    livemode: false,
  } satisfies Shown<Stripe.Payout>
}
