import type Stripe from 'stripe'
import type { FakeAccount, FakeCheckout } from '../state'
import type { Shown } from './shape'

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
    created: account.created,
  } satisfies Shown<Stripe.Account>
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
  } satisfies Shown<Stripe.Checkout.Session>
}
