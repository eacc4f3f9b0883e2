import type Stripe from 'stripe'
import type { FakeEvent, FakePayment, FakeState } from '../state'
import { showAccount, showCheckout } from './accounts'
import { showBalanceTransaction, showDispute, showPayout } from './balance'
import { showApplicationFee, showCharge, showPayment, showRefund } from './payments'
import type { Shown } from './shape'

/** What there is to show, from where, and when. */
export interface View {
  state: FakeState
  now: () => number
  baseUrl: () => string
}

/** By the first part of an id: the record it names, as the provider's API shows it. */
const SHOW: Readonly<Record<string, (id: string, view: View) => object | undefined>> = {
  acct: (id, { state }) => shown(state.accounts[id], showAccount),
  cs_test: (id, { state, baseUrl }) =>
    shown(state.checkouts[id], (checkout) => showCheckout(checkout, baseUrl())),
  pi: (id, { state }) => shown(state.payments[id], showPayment),
  ch: (id, { state }) => shown(findByCharge(state, id), showCharge),
  fee: (id, { state }) => shown(state.applicationFees[id], showApplicationFee),
  re: (id, { state }) => shown(state.refunds[id], (refund) => showRefund(refund, state)),
  du: (id, { state, now }) =>
    shown(state.disputes[id], (dispute) => showDispute(dispute, state, now())),
  po: (id, { state }) => shown(state.payouts[id], showPayout),
  evt: (id, view) =>
    shown(
      view.state.events.find((event) => event.id === id),
      (event) => showEvent(event, view),
    ),
  txn: (id, { state, now }) =>
    shown(state.balance[id], (moved) => showBalanceTransaction(moved, now())),
}

/** An object by its id, or undefined for an id that names nothing. */
export function showById(id: string, view: View): object | undefined {
  return SHOW[id.split('_fake')[0] ?? '']?.(id, view)
}

/** An event with its object as it is now: what a delivery carries at the time it is told. */
export function showEvent(event: FakeEvent, view: View) {
  return {
    id: event.id,
    object: 'event',
    api_version: null,
    type: event.type as Stripe.Event.Type,
    created: event.created,
    livemode: false,
    pending_webhooks: 1,
    request: null,
    ...(event.account ? { account: event.account } : {}),
    data: { object: showById(event.objectId, view) ?? {} },
  } satisfies Shown<Omit<Stripe.EventBase, 'type' | 'data'>> & { type: string; data: object }
}

export function findByCharge(state: FakeState, charge: string): FakePayment | undefined {
  return Object.values(state.payments).find(
    (payment) => payment.charge === charge && payment.status === 'succeeded',
  )
}

const shown = <Kept, As>(kept: Kept | undefined, show: (kept: Kept) => As): As | undefined =>
  kept === undefined ? undefined : show(kept)
