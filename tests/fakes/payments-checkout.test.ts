import type { PaymentsFake } from '@marram/fakes'
import type Stripe from 'stripe'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { checkoutParams, connectAccount, startPayments } from '../support/payments'

const NOW = new Date('2027-04-06T10:00:00Z')
const nowSeconds = NOW.getTime() / 1000

describe('the payments stand-in, from an account to a paid checkout', () => {
  let fake: PaymentsFake
  let stripe: Stripe
  let stripeAccount: string

  beforeAll(async () => {
    ;({ fake, stripe } = await startPayments({ now: () => NOW }))
    stripeAccount = await connectAccount(stripe, fake)
  })
  afterAll(() => fake.close())

  const create = () =>
    stripe.checkout.sessions.create(checkoutParams(nowSeconds), { stripeAccount })

  it('gives a checkout with the address of its page', async () => {
    const session = await create()
    expect(session).toMatchObject({
      object: 'checkout.session',
      status: 'open',
      payment_status: 'unpaid',
      amount_total: 12_000,
      currency: 'eur',
      client_reference_id: 'order-1',
      metadata: { order_id: 'order-1' },
      url: `${fake.url}/pay/${session.id}`,
    })
    const again = await stripe.checkout.sessions.retrieve(session.id, {}, { stripeAccount })
    expect(again.id).toBe(session.id)
  })
})
