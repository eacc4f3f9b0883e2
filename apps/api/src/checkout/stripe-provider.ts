import Stripe from 'stripe'
import type { Config } from '../platform/config'
import { Problem } from '../platform/errors'
import type {
  Checkout,
  NewCheckout,
  PaymentsProvider,
  ProviderPayment,
  ProviderRefund,
} from './provider'

const WEBHOOK_TOLERANCE_SECONDS = 300

/** The payment provider, through its own SDK; the only file that knows it. */
export function makeStripeProvider(config: Config['payments']): PaymentsProvider {
  const stripe = new Stripe(config.secretKey, {
    telemetry: false,
    maxNetworkRetries: 0,
    timeout: 15_000,
    ...(config.url ? localAddress(config.url) : {}),
  })
  const on = (account: string) => ({ stripeAccount: account })

  return {
    async createAccount({ academyId, name, email }) {
      const account = await asked(() =>
        stripe.accounts.create(
          {
            email,
            business_profile: { name },
            metadata: { academy_id: academyId },
            controller: {
              losses: { payments: 'stripe' },
              fees: { payer: 'account' },
              stripe_dashboard: { type: 'full' },
            },
          },
          { idempotencyKey: `academy:${academyId}:account:1` },
        ),
      )
      return account.id
    },
    async createOnboarding({ account, returnUrl, refreshUrl }) {
      const link = await asked(() =>
        stripe.accountLinks.create({
          account,
          type: 'account_onboarding',
          return_url: returnUrl,
          refresh_url: refreshUrl,
        }),
      )
      return link.url
    },
    async isAccountReady(account) {
      const { charges_enabled } = await asked(() => stripe.accounts.retrieve(account))
      return charges_enabled
    },
    async createCheckout(checkout) {
      const session = await asked(() =>
        stripe.checkout.sessions.create(checkoutParams(checkout), {
          ...on(checkout.account),
          idempotencyKey: `order:${checkout.orderId}:checkout:${checkout.attempt}`,
        }),
      )
      if (!session.url) throw new Error('the provider gave a checkout without an address')
      return { id: session.id, url: session.url }
    },
    readCheckout: async (account, id) =>
      toCheckout(await asked(() => stripe.checkout.sessions.retrieve(id, {}, on(account)))),
    async expireCheckout(account, id) {
      try {
        return toCheckout(await stripe.checkout.sessions.expire(id, {}, on(account)))
      } catch (error) {
        // Only an open checkout can be ended; what became of this one is asked for instead.
        if (!(error instanceof Stripe.errors.StripeInvalidRequestError)) throw unavailable(error)
        return toCheckout(await asked(() => stripe.checkout.sessions.retrieve(id, {}, on(account))))
      }
    },
    async readPayment(account, id) {
      const expand = ['latest_charge.balance_transaction']
      return toPayment(
        await asked(() => stripe.paymentIntents.retrieve(id, { expand }, on(account))),
      )
    },
    async refund({ account, payment, amountMinor, refundId, orderId }) {
      const metadata = { refund_id: refundId, order_id: orderId }
      const idempotencyKey = `order:${orderId}:refund-${refundId}:1`
      try {
        const refund = await stripe.refunds.create(
          { payment_intent: payment, amount: amountMinor, metadata },
          { ...on(account), idempotencyKey },
        )
        return toRefund(refund)
      } catch (error) {
        // Charged back, or given back in the provider's own pages: asking again changes nothing.
        if (!(error instanceof Stripe.errors.StripeInvalidRequestError)) throw unavailable(error)
        return { id: null, refundId, state: 'failed' }
      }
    },
    readRefund: async (account, id) =>
      toRefund(await asked(() => stripe.refunds.retrieve(id, {}, on(account)))),
    readWebhook({ body, signature, now }) {
      const age = ageSeconds(signature, now)
      if (age === null || Math.abs(age) > WEBHOOK_TOLERANCE_SECONDS) return null
      try {
        // The age was checked above, both ways; the SDK's own check only looks back, in milliseconds.
        const event = stripe.webhooks.constructEvent(
          body,
          signature,
          config.webhookSecret,
          WEBHOOK_TOLERANCE_SECONDS,
          undefined,
          now.getTime(),
        )
        const { id: objectId } = event.data.object as { id?: string }
        const { id, type, account = null } = event
        return { id, type, account, objectId: objectId ?? '' }
      } catch {
        return null
      }
    },
  }
}

/** Which methods are offered (cards, at first) is set in the provider's own settings. */
function checkoutParams(checkout: NewCheckout): Stripe.Checkout.SessionCreateParams {
  const { orderId, academyId, enrolmentId, currency } = checkout
  const metadata = { order_id: orderId, academy_id: academyId, enrolment_id: enrolmentId }
  return {
    mode: 'payment',
    client_reference_id: orderId,
    metadata,
    ...(checkout.email ? { customer_email: checkout.email } : {}),
    line_items: [
      {
        quantity: 1,
        price_data: {
          currency: currency.toLowerCase(),
          unit_amount: checkout.amountMinor,
          product_data: { name: checkout.title },
        },
      },
    ],
    payment_intent_data: {
      metadata,
      ...(checkout.applicationFeeMinor > 0
        ? { application_fee_amount: checkout.applicationFeeMinor }
        : {}),
    },
    success_url: checkout.successUrl,
    cancel_url: checkout.cancelUrl,
    expires_at: Math.floor(checkout.expiresAt.getTime() / 1000),
  }
}

function localAddress(url: string) {
  const { hostname: host, port, protocol } = new URL(url)
  return { host, port, protocol: protocol === 'https:' ? 'https' : 'http' } as const
}

function toCheckout(session: Stripe.Checkout.Session): Checkout {
  const isPaid = session.status === 'complete' && session.payment_status === 'paid'
  return {
    id: session.id,
    state: isPaid ? 'paid' : session.status === 'expired' ? 'expired' : 'open',
    orderId: session.client_reference_id,
    payment: idOf(session.payment_intent),
  }
}

function toPayment(intent: Stripe.PaymentIntent): ProviderPayment {
  const charge = typeof intent.latest_charge === 'object' ? intent.latest_charge : null
  const balance =
    typeof charge?.balance_transaction === 'object' ? charge.balance_transaction : null
  const feesOf = (type: string) =>
    (balance?.fee_details ?? [])
      .filter((detail) => (detail.type === 'application_fee') === (type === 'application_fee'))
      .reduce((sum, { amount }) => sum + amount, 0)
  return {
    id: intent.id,
    orderId: intent.metadata['order_id'] ?? null,
    isSucceeded: intent.status === 'succeeded',
    amountMinor: intent.amount_received,
    providerFeeMinor: feesOf('provider'),
    platformFeeMinor: feesOf('application_fee'),
    refusal: intent.last_payment_error?.decline_code ?? intent.last_payment_error?.code ?? null,
  }
}

function toRefund(refund: Stripe.Refund): ProviderRefund {
  const state =
    refund.status === 'succeeded'
      ? 'done'
      : refund.status === 'failed' || refund.status === 'canceled'
        ? 'failed'
        : 'asked'
  return { id: refund.id, refundId: refund.metadata?.['refund_id'] ?? null, state }
}

const idOf = (reference: string | { id: string } | null): string | null =>
  typeof reference === 'object' ? (reference?.id ?? null) : reference

function ageSeconds(signature: string, now: Date): number | null {
  const stamp = /(?:^|,)t=(\d+)/.exec(signature)?.[1]
  return stamp ? now.getTime() / 1000 - Number(stamp) : null
}

async function asked<T>(call: () => Promise<T>): Promise<T> {
  try {
    return await call()
  } catch (error) {
    throw isTooLittle(error) ? TOO_LITTLE : unavailable(error)
  }
}

const TOO_LITTLE = new Problem(
  'not-on-sale',
  'This is less than a card can pay. Please pay it at the desk instead.',
)

const isTooLittle = (error: unknown): boolean =>
  error instanceof Stripe.errors.StripeError && error.code === 'amount_too_small'

/** What reaches a person when the provider cannot be asked; the cause is kept for the log. */
function unavailable(cause: unknown): Problem {
  const problem = new Problem(
    'provider-unavailable',
    'The payment provider does not answer just now. Nothing was taken; please try again.',
  )
  return Object.assign(problem, { cause })
}
