import type { PaymentsFake } from '@marram/fakes'
import type Stripe from 'stripe'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { control } from '../support/control'
import {
  WEBHOOK_SECRET,
  checkoutParams,
  connectAccount,
  movableClock,
  startPayments,
} from '../support/payments'
import { startReceiver, type WebhookReceiver } from '../support/webhooks'

const clock = movableClock('2027-04-06T10:00:00Z')
const PAID = ['charge.succeeded', 'payment_intent.succeeded', 'checkout.session.completed']

let receiver: WebhookReceiver
let fake: PaymentsFake
let stripe: Stripe
let stripeAccount: string

beforeEach(async () => {
  receiver = await startReceiver()
  ;({ fake, stripe } = await startPayments({ now: clock.now, webhookUrl: receiver.url }))
  stripeAccount = await connectAccount(stripe, fake)
  await fake.flush()
})
afterEach(async () => {
  await fake.close()
  await receiver.close()
})

/** What a delivery tells, as somebody hears it who has the secret, so many seconds from now. */
const verify = (index: number, { secret = WEBHOOK_SECRET, secondsLater = 0 } = {}) => {
  const { body, headers } = receiver.received[index]!
  const signature = headers['stripe-signature'] ?? ''
  const receivedAtMs = (clock.seconds() + secondsLater) * 1000
  return stripe.webhooks.constructEvent(body, signature, secret, 300, undefined, receivedAtMs)
}
const heard = () => receiver.received.map((_delivery, index) => verify(index))
const create = () =>
  stripe.checkout.sessions.create(checkoutParams(clock.seconds()), { stripeAccount })
const expireOne = async () => {
  const { id } = await create()
  await stripe.checkout.sessions.expire(id, {}, { stripeAccount })
  return id
}
const objectIds = () => heard().map(({ data }) => (data.object as { id: string }).id)

describe('deliveries of the payments stand-in', () => {
  it('are signed, so that the SDK accepts them and nothing else', async () => {
    const event = verify(0)
    expect(event).toMatchObject({
      object: 'event',
      type: 'account.updated',
      account: stripeAccount,
      data: { object: { id: stripeAccount, charges_enabled: true } },
    })
    expect(() => verify(0, { secret: 'whsec_another' })).toThrow('signature')
    expect(() => verify(0, { secondsLater: 301 })).toThrow('tolerance')
    receiver.received[0]!.body += ' '
    expect(() => verify(0)).toThrow('signature')
  })

  it('tell of a payment, with the account and the object', async () => {
    const { id } = await create()
    fake.pay(id, '4000000000000002')
    fake.pay(id)
    await fake.flush()
    const events = heard().slice(1)
    expect(new Set(events.map(({ type }) => type))).toEqual(
      new Set([...PAID, 'payment_intent.payment_failed']),
    )
    const completed = events.find(({ type }) => type === 'checkout.session.completed')
    expect(completed).toMatchObject({
      account: stripeAccount,
      data: { object: { id, payment_status: 'paid', client_reference_id: 'order-1' } },
    })
    const listed = await stripe.events.list(
      { type: 'checkout.session.completed' },
      { stripeAccount },
    )
    expect(listed.data.map((event) => event.id)).toEqual([completed?.id])
    const again = await stripe.events.retrieve(completed!.id, {}, { stripeAccount })
    expect(again.type).toBe('checkout.session.completed')
  })

  it('leave out what happens to the platform itself, which its own list has', async () => {
    fake.pay((await create()).id)
    await fake.flush()
    expect(heard().map(({ type }) => type)).not.toContain('application_fee.created')
    const [fee] = (await stripe.events.list()).data
    expect(fee).toMatchObject({ type: 'application_fee.created' })
    expect(fee).not.toHaveProperty('account')
  })

  it('tell of a checkout whose time has come, without anybody asking', async () => {
    const { id } = await create()
    await control(fake, 'advance-clock', { seconds: 3_600 })
    await fake.flush()
    const event = verify(1, { secondsLater: 3_600 })
    expect(() => verify(1, { secondsLater: 3_901 })).toThrow('tolerance')
    expect(event).toMatchObject({ type: 'checkout.session.expired', data: { object: { id } } })
  })

  it('come again until they are thanked for, each time with the same id', async () => {
    receiver.refuseNext(1)
    const id = await expireOne()
    await fake.flush()
    const [first, second, ...more] = heard().slice(1)
    expect(first).toMatchObject({ data: { object: { id } } })
    expect(second).toEqual(first)
    expect(more).toEqual([])
  })

  it('come twice when they are told to', async () => {
    await control(fake, 'duplicate-next', { count: 1 })
    const id = await expireOne()
    await expireOne()
    await fake.flush()
    expect(objectIds().filter((one) => one === id)).toHaveLength(2)
    expect(receiver.received).toHaveLength(4)
  })

  it('wait while they are held, and tell then how things were', async () => {
    await control(fake, 'hold-webhooks')
    const { id } = await create()
    fake.pay(id, '4000000000009995')
    fake.pay(id)
    await fake.flush()
    expect(receiver.received).toHaveLength(1)
    await control(fake, 'release-webhooks')
    await fake.flush()
    const failed = heard().find(({ type }) => type === 'payment_intent.payment_failed')
    expect(failed?.data.object).toMatchObject({ status: 'requires_payment_method' })
  })

  it('can be released in the reverse order', async () => {
    const sent: string[] = []
    await control(fake, 'hold-webhooks')
    for (let count = 0; count < 3; count += 1) sent.push(await expireOne())
    // Even one that has to come again keeps the others behind it.
    receiver.refuseNext(1)
    await control(fake, 'release-webhooks-reversed')
    await fake.flush()
    const [first, second, third] = sent
    expect(objectIds().slice(1)).toEqual([third, third, second, first])
  })

  it('get lost when they are told to, though they stay in the list', async () => {
    await control(fake, 'drop-next', { count: 1 })
    const lost = await expireOne()
    await control(fake, 'mute-webhooks')
    const unheard = await expireOne()
    await control(fake, 'unmute-webhooks')
    const id = await expireOne()
    await fake.flush()
    expect(objectIds().slice(1)).toEqual([id])
    const listed = await stripe.events.list({ type: 'checkout.session.expired' }, { stripeAccount })
    const ids = listed.data.map(({ data }) => (data.object as { id: string }).id)
    expect(ids).toEqual([id, unheard, lost])
  })
})
