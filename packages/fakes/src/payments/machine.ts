import {
  CARDS,
  REFUSALS,
  emptyState,
  feeOf,
  type FakeAccount,
  type FakeCheckout,
  type FakePayment,
  type FakeRefund,
  type FakeState,
} from './state'

/** A refusal as the provider's API words it. */
export class ProviderError extends Error {
  readonly status: number
  readonly type: string
  readonly code: string | undefined

  constructor(status: number, message: string, options: { type?: string; code?: string } = {}) {
    super(message)
    this.status = status
    this.type = options.type ?? 'invalid_request_error'
    this.code = options.code
  }
}

const HALF_HOUR_SECONDS = 30 * 60
const DAY_SECONDS = 24 * 3600

export interface Machine {
  state: FakeState
  now(): number
  advance(seconds: number): void
  createAccount(wanted: Pick<FakeAccount, 'email' | 'name' | 'metadata'>): FakeAccount
  finishOnboarding(id: string): void
  createCheckout(
    wanted: Omit<
      FakeCheckout,
      'id' | 'status' | 'paymentStatus' | 'created' | 'payment' | 'lastRefusal'
    >,
  ): FakeCheckout
  findCheckout(id: string, account?: string): FakeCheckout
  expireCheckout(checkout: FakeCheckout): FakeCheckout
  /** Pays by a card number; resolves to the sentence of a refusal, or null when it went through. */
  pay(checkout: FakeCheckout, given: { card: string; created?: number | undefined }): string | null
  findPayment(id: string, account?: string): FakePayment
  refund(
    payment: FakePayment,
    wanted: { amount: number | undefined; metadata: Record<string, string> },
  ): FakeRefund
  findRefund(id: string, account?: string): FakeRefund
}

/** The provider as a state machine. `tell` is called for everything that a webhook speaks of. */
export function makeMachine(
  tell: (event: { type: string; account: string | null; objectId: string }) => void,
  given: { state?: FakeState | undefined; now?: (() => Date) | undefined },
): Machine {
  const state = given.state ?? emptyState()
  const clock = given.now ?? (() => new Date())
  const now = () => Math.floor(clock().getTime() / 1000) + state.clockOffsetSeconds
  const newId = (prefix: string) => {
    state.next += 1
    return `${prefix}_fake${state.next.toString(36).padStart(10, '0')}`
  }
  const owned = <T extends { account: string }>(
    found: T | undefined,
    account: string | undefined,
    what: string,
  ): T => {
    if (!found || (account !== undefined && found.account !== account)) {
      throw new ProviderError(404, `No such ${what}.`, { code: 'resource_missing' })
    }
    return found
  }
  const expireDue = (checkout: FakeCheckout) => {
    if (checkout.status === 'open' && checkout.expiresAt <= now()) expire(checkout)
    return checkout
  }
  const expire = (checkout: FakeCheckout) => {
    checkout.status = 'expired'
    const { account, id: objectId } = checkout
    tell({ type: 'checkout.session.expired', account, objectId })
  }

  const machine: Machine = {
    state,
    now,
    advance(seconds) {
      state.clockOffsetSeconds += seconds
      for (const checkout of Object.values(state.checkouts)) expireDue(checkout)
    },
    createAccount(wanted) {
      const account = { id: newId('acct'), chargesEnabled: false, ...wanted }
      state.accounts[account.id] = account
      return account
    },
    finishOnboarding(id) {
      const account = state.accounts[id]
      if (!account) throw new ProviderError(404, 'No such account.')
      account.chargesEnabled = true
      tell({ type: 'account.updated', account: id, objectId: id })
    },
    createCheckout(wanted) {
      if (!state.accounts[wanted.account]?.chargesEnabled) {
        throw new ProviderError(400, 'This account cannot take charges yet.')
      }
      const lifetime = wanted.expiresAt - now()
      // The provider's bounds, with a minute's grace for the way here.
      if (lifetime < HALF_HOUR_SECONDS - 60 || lifetime > DAY_SECONDS + 60) {
        throw new ProviderError(400, 'expires_at must be 30 minutes to 24 hours from now.')
      }
      const checkout: FakeCheckout = {
        id: newId('cs_test'),
        status: 'open',
        paymentStatus: 'unpaid',
        created: now(),
        payment: null,
        lastRefusal: null,
        ...wanted,
      }
      state.checkouts[checkout.id] = checkout
      return checkout
    },
    findCheckout: (id, account) =>
      expireDue(owned(state.checkouts[id], account, 'checkout session')),
    expireCheckout(checkout) {
      if (checkout.status !== 'open') {
        throw new ProviderError(
          400,
          `Only open checkout sessions can be expired; this one is ${checkout.status}.`,
        )
      }
      expire(checkout)
      return checkout
    },
    pay(checkout, { card, created }) {
      if (expireDue(checkout).status !== 'open') return 'This payment page is no longer open.'
      const number = card.replace(/\s/g, '')
      const at = created ?? now()
      const payment = paymentOf(machine, checkout, { newId, at })
      payment.card = number
      const refusal = REFUSALS[number]
      const isKnown = Object.values(CARDS).some((known) => known === number)
      const { account } = checkout
      if (refusal || !isKnown) {
        const { code, sentence } = refusal ?? {
          code: 'incorrect_number',
          sentence: 'This is not one of the test card numbers.',
        }
        payment.refusal = code
        checkout.lastRefusal = sentence
        tell({ type: 'payment_intent.payment_failed', account, objectId: payment.id })
        return sentence
      }
      Object.assign(payment, {
        status: 'succeeded',
        refusal: null,
        created: at,
        fee: feeOf(payment.amount),
      })
      Object.assign(checkout, { status: 'complete', paymentStatus: 'paid', lastRefusal: null })
      tell({ type: 'payment_intent.succeeded', account, objectId: payment.id })
      tell({ type: 'charge.succeeded', account, objectId: payment.charge })
      tell({ type: 'checkout.session.completed', account, objectId: checkout.id })
      return null
    },
    findPayment: (id, account) => owned(state.payments[id], account, 'payment intent'),
    refund(payment, { amount = payment.amount - payment.refunded, metadata }) {
      if (payment.status !== 'succeeded')
        throw new ProviderError(400, 'This payment has not succeeded.')
      if (amount <= 0 || amount > payment.amount - payment.refunded) {
        throw new ProviderError(400, 'The refund is more than what is left of the charge.', {
          code: 'charge_already_refunded',
        })
      }
      const { account, currency } = payment
      const isSlow = payment.card === CARDS.refundPends || payment.card === CARDS.refundFails
      const refund: FakeRefund = {
        id: newId('re'),
        account,
        payment: payment.id,
        amount,
        currency,
        status: isSlow ? 'pending' : 'succeeded',
        metadata,
        created: now(),
      }
      state.refunds[refund.id] = refund
      payment.refunded += amount
      tell({ type: 'refund.created', account, objectId: refund.id })
      if (isSlow) settleLater(refund, payment)
      return refund
    },
    findRefund: (id, account) => owned(state.refunds[id], account, 'refund'),
  }

  const settleLater = (refund: FakeRefund, payment: FakePayment) => {
    const fails = payment.card === CARDS.refundFails
    setTimeout(() => {
      refund.status = fails ? 'failed' : 'succeeded'
      if (fails) payment.refunded -= refund.amount
      const type = fails ? 'refund.failed' : 'refund.updated'
      tell({ type, account: refund.account, objectId: refund.id })
    }, 50).unref()
  }
  return machine
}

function paymentOf(
  machine: Machine,
  checkout: FakeCheckout,
  { newId, at }: { newId: (prefix: string) => string; at: number },
): FakePayment {
  const had = checkout.payment ? machine.state.payments[checkout.payment] : undefined
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
    balanceTransaction: newId('txn'),
    fee: 0,
    applicationFee: checkout.applicationFee,
    refunded: 0,
    refusal: null,
    card: '',
    created: at,
  }
  machine.state.payments[payment.id] = payment
  checkout.payment = payment.id
  return payment
}
