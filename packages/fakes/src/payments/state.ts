/** What the payments stand-in remembers. Times are Unix seconds, amounts minor units. */
export interface FakeAccount {
  id: string
  email: string
  name: string
  chargesEnabled: boolean
  metadata: Record<string, string>
  created: number
}

export interface FakeCheckout {
  id: string
  account: string
  status: 'open' | 'complete' | 'expired'
  paymentStatus: 'unpaid' | 'paid'
  amount: number
  currency: string
  title: string
  clientReference: string | null
  metadata: Record<string, string>
  paymentMetadata: Record<string, string>
  applicationFee: number
  email: string | null
  successUrl: string
  cancelUrl: string | null
  expiresAt: number
  created: number
  payment: string | null
}

/** A payment intent and its one charge; a try that was refused leaves no charge here. */
export interface FakePayment {
  id: string
  account: string
  checkout: string
  status: 'requires_payment_method' | 'succeeded'
  amount: number
  currency: string
  metadata: Record<string, string>
  charge: string
  balanceTransaction: string | null
  applicationFee: number
  /** The platform's record of its fee; null until paid, or where none was asked. */
  applicationFeeId: string | null
  refunded: number
  isDisputed: boolean
  refusal: Refusal | null
  card: string
  created: number
}

/** Why a card was refused: the provider's codes, and the sentence that its page shows. */
export interface Refusal {
  code: string
  declineCode: string | null
  sentence: string
}

export interface FakeApplicationFee {
  id: string
  /** The connected account that paid it; the record itself is the platform's. */
  payer: string
  charge: string
  amount: number
  currency: string
  balanceTransaction: string
  created: number
}

export interface FakeRefund {
  id: string
  account: string
  payment: string
  amount: number
  currency: string
  status: 'pending' | 'succeeded' | 'failed'
  balanceTransaction: string | null
  failureBalanceTransaction: string | null
  metadata: Record<string, string>
  created: number
}

export interface FakeDispute {
  id: string
  account: string
  payment: string
  amount: number
  currency: string
  reason: string
  status: 'needs_response' | 'under_review' | 'won' | 'lost'
  evidence: Record<string, string>
  submissions: number
  /** The money going out, and where the dispute was won, coming back. */
  balanceTransactions: string[]
  metadata: Record<string, string>
  dueBy: number
  created: number
}

export interface FakePayout {
  id: string
  account: string
  amount: number
  currency: string
  status: 'in_transit' | 'paid' | 'failed'
  balanceTransaction: string
  failureBalanceTransaction: string | null
  arrivesOn: number
  created: number
}

/** One movement of a balance. Net of fees it is what the balance changes by. */
export interface FakeBalanceTransaction {
  id: string
  /** Whose balance; null is the platform's own. */
  account: string | null
  amount: number
  currency: string
  type:
    | 'charge'
    | 'application_fee'
    | 'refund'
    | 'refund_failure'
    | 'adjustment'
    | 'payout'
    | 'payout_failure'
  category: string
  description: string
  /** What moved it: a charge, a refund, a dispute, a payout. */
  source: string
  providerFee: number
  applicationFee: number
  /** The payout that took it to the bank. */
  payout: string | null
  availableOn: number
  created: number
}

export interface FakeEvent {
  id: string
  account: string | null
  type: string
  created: number
  objectId: string
}

/** What happens by itself, once the provider's clock has come so far. */
export interface FakeDue {
  at: number
  kind: 'open-dispute' | 'decide-dispute' | 'settle-refund'
  id: string
}

export interface FakeState {
  accounts: Record<string, FakeAccount>
  checkouts: Record<string, FakeCheckout>
  payments: Record<string, FakePayment>
  applicationFees: Record<string, FakeApplicationFee>
  refunds: Record<string, FakeRefund>
  disputes: Record<string, FakeDispute>
  payouts: Record<string, FakePayout>
  balance: Record<string, FakeBalanceTransaction>
  events: FakeEvent[]
  due: FakeDue[]
  /** Idempotency keys: what was asked, when, and what was answered. */
  answers: Record<string, { asked: string; at: number; status: number; body: string }>
  clockOffsetSeconds: number
  next: number
}

export const emptyState = (): FakeState => ({
  accounts: {},
  checkouts: {},
  payments: {},
  applicationFees: {},
  refunds: {},
  disputes: {},
  payouts: {},
  balance: {},
  events: [],
  due: [],
  answers: {},
  clockOffsetSeconds: 0,
  next: 1,
})
