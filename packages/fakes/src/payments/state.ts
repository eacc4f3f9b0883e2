/** What the payments stand-in remembers. Times are Unix seconds, amounts the provider's minor units. */
export interface FakeAccount {
  id: string
  email: string
  name: string
  chargesEnabled: boolean
  metadata: Record<string, string>
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
  cancelUrl: string
  expiresAt: number
  created: number
  payment: string | null
  lastRefusal: string | null
}

export interface FakePayment {
  id: string
  account: string
  checkout: string
  status: 'requires_payment_method' | 'succeeded'
  amount: number
  currency: string
  metadata: Record<string, string>
  charge: string
  balanceTransaction: string
  fee: number
  applicationFee: number
  refunded: number
  refusal: string | null
  card: string
  created: number
}

export interface FakeRefund {
  id: string
  account: string
  payment: string
  amount: number
  currency: string
  status: 'pending' | 'succeeded' | 'failed'
  metadata: Record<string, string>
  created: number
}

export interface FakeEvent {
  id: string
  account: string | null
  type: string
  created: number
  objectId: string
}

export interface FakeState {
  accounts: Record<string, FakeAccount>
  checkouts: Record<string, FakeCheckout>
  payments: Record<string, FakePayment>
  refunds: Record<string, FakeRefund>
  events: FakeEvent[]
  /** Idempotency keys: what was asked and what was answered. */
  answers: Record<string, { asked: string; status: number; body: string }>
  clockOffsetSeconds: number
  next: number
}

export const emptyState = (): FakeState => ({
  accounts: {},
  checkouts: {},
  payments: {},
  refunds: {},
  events: [],
  answers: {},
  clockOffsetSeconds: 0,
  next: 1,
})

/** The card numbers that the provider documents for tests, by what they do. */
export const CARDS = {
  good: '4242424242424242',
  declined: '4000000000000002',
  insufficient: '4000000000009995',
  refundFails: '4000000000005126',
  refundPends: '4000000000007726',
} as const

export const REFUSALS: Record<string, { code: string; sentence: string }> = {
  [CARDS.declined]: { code: 'generic_decline', sentence: 'Your card was declined.' },
  [CARDS.insufficient]: {
    code: 'insufficient_funds',
    sentence: 'Your card has too little money on it.',
  },
}

const FEE_BASIS_POINTS = 150
const FEE_FIXED = 25

/** What the provider keeps of a charge: 1.5 % and 25 minor units. */
export function feeOf(amount: number): number {
  return Math.min(amount, Math.round((amount * FEE_BASIS_POINTS) / 10_000) + FEE_FIXED)
}
