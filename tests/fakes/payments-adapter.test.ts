import type { PaymentsFake } from '@marram/fakes'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { NewCheckout, PaymentsProvider } from '../../apps/api/src/checkout/provider'
import { makeStripeProvider } from '../../apps/api/src/checkout/stripe-provider'
import { SECRET_KEY, WEBHOOK_SECRET, movableClock, startPayments } from '../support/payments'
import { startReceiver, type WebhookReceiver } from '../support/webhooks'

const clock = movableClock('2027-04-06T10:00:00Z')

let receiver: WebhookReceiver
let fake: PaymentsFake
let provider: PaymentsProvider
let account: string

beforeAll(async () => {
  receiver = await startReceiver()
  ;({ fake } = await startPayments({ now: clock.now, webhookUrl: receiver.url }))
  provider = makeStripeProvider({
    secretKey: SECRET_KEY,
    webhookSecret: WEBHOOK_SECRET,
    url: fake.url,
    platformFeeBasisPoints: 100,
  })
  const academy = { academyId: 'academy-1', name: 'Kittiwake', email: 'owner@mail.example' }
  account = await provider.createAccount(academy)
})
afterAll(async () => {
  await fake.close()
  await receiver.close()
})

const open = (wishes: Partial<NewCheckout> = {}) =>
  provider.createCheckout({
    account,
    orderId: 'order-1',
    academyId: 'academy-1',
    enrolmentId: 'enrolment-1',
    attempt: 1,
    title: 'Tuesday wedges',
    amountMinor: 12_000,
    currency: 'EUR',
    applicationFeeMinor: 120,
    email: null,
    successUrl: 'http://127.0.0.1:9/paid',
    cancelUrl: 'http://127.0.0.1:9/back',
    expiresAt: new Date(clock.now().getTime() + 35 * 60_000),
    ...wishes,
  })
const payFor = async (orderId: string, card?: string) => {
  const { id } = await open({ orderId })
  fake.pay(id, card)
  const { payment } = await provider.readCheckout(account, id)
  return { checkout: id, payment: payment ?? '' }
}

describe('the product’s payments adapter', () => {
  it('connects an academy through the onboarding page', async () => {
    expect(await provider.isAccountReady(account)).toBe(false)
    const url = await provider.createOnboarding({
      account,
      returnUrl: 'http://127.0.0.1:9/connected',
      refreshUrl: 'http://127.0.0.1:9/again',
    })
    await fetch(url, { method: 'POST', redirect: 'manual' })
    expect(await provider.isAccountReady(account)).toBe(true)
  })

  it('gives one checkout for one attempt, and another for the next', async () => {
    const first = await open({ orderId: 'order-2' })
    expect(await open({ orderId: 'order-2' })).toEqual(first)
    expect(await open({ orderId: 'order-2', attempt: 2 })).not.toEqual(first)
    expect(await provider.readCheckout(account, first.id)).toEqual({
      id: first.id,
      state: 'open',
      orderId: 'order-2',
      payment: null,
    })
  })

  it('says of an amount that no card pays where it can be paid', async () => {
    const wishes = { orderId: 'order-little', amountMinor: 20, applicationFeeMinor: 0 }
    await expect(open(wishes)).rejects.toMatchObject({
      code: 'not-on-sale',
      message: expect.stringContaining('desk') as string,
    })
  })

  it('reads what was paid, and what both took of it', async () => {
    const { checkout, payment } = await payFor('order-3')
    expect(await provider.readCheckout(account, checkout)).toMatchObject({ state: 'paid' })
    expect(await provider.readPayment(account, payment)).toEqual({
      id: payment,
      orderId: 'order-3',
      isSucceeded: true,
      amountMinor: 12_000,
      providerFeeMinor: 205,
      platformFeeMinor: 120,
      refusal: null,
    })
  })

  it.each([
    ['4000000000009995', 'insufficient_funds'],
    ['4000000000000069', 'expired_card'],
  ])('reads why %s was refused', async (card, refusal) => {
    const { payment } = await payFor(`order-${refusal}`, card)
    expect(await provider.readPayment(account, payment)).toMatchObject({
      isSucceeded: false,
      amountMinor: 0,
      refusal,
    })
  })

  it('ends a checkout, or says what became of it', async () => {
    const { id } = await open({ orderId: 'order-4' })
    expect(await provider.expireCheckout(account, id)).toMatchObject({ state: 'expired' })
    expect(await provider.expireCheckout(account, id)).toMatchObject({ state: 'expired' })
    const { checkout } = await payFor('order-5')
    expect(await provider.expireCheckout(account, checkout)).toMatchObject({ state: 'paid' })
  })

  it.each([
    ['4242424242424242', 'done', 'done'],
    ['4000000000007726', 'asked', 'done'],
    ['4000000000005126', 'done', 'failed'],
  ])('follows a refund of %s from %s to %s', async (card, first, last) => {
    const { payment } = await payFor(`order-of-${card}`, card)
    const orderId = `order-of-${card}`
    const wanted = { account, payment, orderId, amountMinor: 5_000, currency: 'EUR' }
    const asked = await provider.refund({ ...wanted, refundId: 'refund-1' })
    expect(asked).toMatchObject({ refundId: 'refund-1', state: first })
    expect(await provider.refund({ ...wanted, refundId: 'refund-1' })).toEqual(asked)
    fake.advanceClock(2)
    expect(await provider.readRefund(account, asked.id!)).toMatchObject({ state: last })
    // Back to the test's own time, which deliveries are dated by.
    fake.advanceClock(-2)
  })

  it('reads a delivery that is signed and fresh, and no other', async () => {
    receiver.received.length = 0
    const { id: objectId } = await open({ orderId: 'order-6' })
    await provider.expireCheckout(account, objectId)
    await fake.flush()
    const [{ body, headers }] = receiver.received as [WebhookReceiver['received'][number]]
    const signature = headers['stripe-signature'] as string
    const read = (secondsLater: number, text = body) =>
      provider.readWebhook({
        body: Buffer.from(text),
        signature,
        now: new Date(clock.now().getTime() + secondsLater * 1000),
      })
    const told = { type: 'checkout.session.expired', account, objectId }
    expect(read(0)).toMatchObject(told)
    expect(read(300)).toMatchObject(told)
    expect(read(-300)).toMatchObject(told)
    expect(read(301)).toBeNull()
    expect(read(-301)).toBeNull()
    expect(read(0, `${body} `)).toBeNull()
  })
})
