/** What Marram asks of a payment provider. Amounts are in the ledger's minor units. */
export interface PaymentsProvider {
  createAccount(academy: { academyId: string; name: string; email: string }): Promise<string>
  /** A page of the provider's where the owner connects the academy. */
  createOnboarding(link: {
    account: string
    returnUrl: string
    refreshUrl: string
  }): Promise<string>
  isAccountReady(account: string): Promise<boolean>
  createCheckout(checkout: NewCheckout): Promise<{ id: string; url: string }>
  readCheckout(account: string, id: string): Promise<Checkout>
  /** Ends a checkout that is still open; one that was paid says so instead. */
  expireCheckout(account: string, id: string): Promise<Checkout>
  readPayment(account: string, id: string): Promise<ProviderPayment>
  refund(refund: {
    account: string
    payment: string
    amountMinor: number
    currency: string
    refundId: string
    orderId: string
  }): Promise<ProviderRefund>
  readRefund(account: string, id: string): Promise<ProviderRefund>
  /** Checks a webhook's signature and age. Null for one that is not the provider's. */
  readWebhook(delivery: { body: Buffer; signature: string; now: Date }): ProviderEvent | null
}

export interface NewCheckout {
  account: string
  orderId: string
  attempt: number
  academyId: string
  enrolmentId: string
  title: string
  amountMinor: number
  currency: string
  applicationFeeMinor: number
  email: string | null
  successUrl: string
  cancelUrl: string
  expiresAt: Date
}

export interface Checkout {
  id: string
  state: 'open' | 'paid' | 'expired'
  orderId: string | null
  payment: string | null
}

export interface ProviderPayment {
  id: string
  orderId: string | null
  isSucceeded: boolean
  amountMinor: number
  providerFeeMinor: number
  platformFeeMinor: number
  /** Why the last try was refused, in the provider's code. */
  refusal: string | null
}

export interface ProviderRefund {
  /** Null for one that the provider would not begin. */
  id: string | null
  refundId: string | null
  state: 'asked' | 'done' | 'failed'
}

export interface ProviderEvent {
  id: string
  type: string
  account: string | null
  objectId: string
}
