import { startPaymentsFake, type PaymentsFake, type PaymentsFakeOptions } from '@marram/fakes'
import Stripe from 'stripe'

export const SECRET_KEY = 'sk_test_marram'
export const WEBHOOK_SECRET = 'whsec_marram'

/** The payments stand-in and the vendor's own SDK pointed at it, as the product points it. */
export async function startPayments(
  options: Partial<PaymentsFakeOptions> = {},
): Promise<{ fake: PaymentsFake; stripe: Stripe }> {
  const fake = await startPaymentsFake({
    secretKey: SECRET_KEY,
    webhookSecret: WEBHOOK_SECRET,
    ...options,
  })
  return { fake, stripe: sdkFor(fake) }
}

export function sdkFor(fake: { port: number }, key = SECRET_KEY): Stripe {
  return new Stripe(key, {
    host: '127.0.0.1',
    port: fake.port,
    protocol: 'http',
    telemetry: false,
    maxNetworkRetries: 0,
    timeout: 15_000,
  })
}

/** A connected account that has been through the onboarding page and can take charges. */
export async function connectAccount(stripe: Stripe, fake: PaymentsFake): Promise<string> {
  const account = await stripe.accounts.create({
    email: 'owner@kittiwake.example',
    business_profile: { name: 'Kittiwake Links Academy' },
  })
  fake.finishOnboarding(account.id)
  return account.id
}

type CheckoutWishes = Partial<{
  currency: string
  amount: number
  applicationFee: number
  orderId: string
  lastsSeconds: number
}>

/** What the product asks for when somebody takes a place, with the test's own wishes. */
export function checkoutParams(
  nowSeconds: number,
  wishes: CheckoutWishes = {},
): Stripe.Checkout.SessionCreateParams {
  const { currency = 'eur', amount = 12_000, applicationFee = 120 } = wishes
  const orderId = wishes.orderId ?? 'order-1'
  return {
    mode: 'payment',
    client_reference_id: orderId,
    metadata: { order_id: orderId },
    customer_email: 'golfer@mail.example',
    line_items: [
      {
        quantity: 1,
        price_data: {
          currency,
          unit_amount: amount,
          product_data: { name: 'Tuesday wedges' },
        },
      },
    ],
    payment_intent_data: {
      metadata: { order_id: orderId },
      ...(applicationFee > 0 ? { application_fee_amount: applicationFee } : {}),
    },
    success_url: 'http://127.0.0.1:9/paid?checkout={CHECKOUT_SESSION_ID}',
    cancel_url: 'http://127.0.0.1:9/back',
    expires_at: nowSeconds + (wishes.lastsSeconds ?? 3_600),
  }
}

/** A clock that stands still until it is moved. */
export function movableClock(start: string) {
  let at = Date.parse(start)
  return {
    now: () => new Date(at),
    seconds: () => Math.floor(at / 1000),
    moveBy: (seconds: number) => void (at += seconds * 1000),
  }
}

/** Sends the form of a payment page, as a browser does. */
export function payByForm(url: string, card: string): Promise<Response> {
  const body = new URLSearchParams({ card, expiry: '12 / 34', cvc: '123', name: 'Test Card' })
  return fetch(url, { method: 'POST', body, redirect: 'manual' })
}

/** Pays a new checkout by a card, and gives what its payment intent is now. */
export async function payFor(
  { fake, stripe, stripeAccount }: { fake: PaymentsFake; stripe: Stripe; stripeAccount: string },
  params: Stripe.Checkout.SessionCreateParams,
  card?: string,
): Promise<Stripe.PaymentIntent> {
  const { id } = await stripe.checkout.sessions.create(params, { stripeAccount })
  const refusal = fake.pay(id, card)
  if (refusal) throw new Error(refusal)
  const expand = ['payment_intent.latest_charge.balance_transaction']
  const paid = await stripe.checkout.sessions.retrieve(id, { expand }, { stripeAccount })
  // It was asked for with the object in place of its id.
  return paid.payment_intent as Stripe.PaymentIntent
}
