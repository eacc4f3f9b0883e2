import type { PaymentsFake } from '@marram/fakes'
import Stripe from 'stripe'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  checkoutParams,
  connectAccount,
  movableClock,
  payByForm,
  sdkFor,
  startPayments,
} from '../support/payments'

const clock = movableClock('2027-04-06T10:00:00Z')

let fake: PaymentsFake
let stripe: Stripe
let stripeAccount: string

beforeAll(async () => {
  ;({ fake, stripe } = await startPayments({ now: clock.now }))
  stripeAccount = await connectAccount(stripe, fake)
})
afterAll(() => fake.close())

type Wishes = Parameters<typeof checkoutParams>[1]
const create = (wishes?: Wishes) =>
  stripe.checkout.sessions.create(checkoutParams(clock.seconds(), wishes), { stripeAccount })
const retrieve = (id: string) => stripe.checkout.sessions.retrieve(id, {}, { stripeAccount })

describe('a connected account', () => {
  it('takes charges once its owner has been through the onboarding page', async () => {
    const account = await stripe.accounts.create({
      email: 'owner@juniper.example',
      business_profile: { name: 'Juniper Flats <Golf> School' },
      metadata: { academy_id: 'academy-2' },
    })
    expect(account).toMatchObject({
      charges_enabled: false,
      details_submitted: false,
      metadata: { academy_id: 'academy-2' },
    })
    expect(account.requirements?.currently_due).not.toEqual([])
    const link = await stripe.accountLinks.create({
      account: account.id,
      type: 'account_onboarding',
      return_url: 'http://127.0.0.1:9/connected?from=provider',
      refresh_url: 'http://127.0.0.1:9/again',
    })
    const html = await (await fetch(link.url)).text()
    expect(html).toContain('Connect Juniper Flats &lt;Golf&gt; School')
    const done = await fetch(link.url, { method: 'POST', redirect: 'manual' })
    expect(done.status).toBe(303)
    expect(done.headers.get('location')).toBe('http://127.0.0.1:9/connected?from=provider')
    const after = await stripe.accounts.retrieve(account.id)
    expect(after).toMatchObject({ charges_enabled: true, requirements: { currently_due: [] } })
  })

  it('takes no charges before', async () => {
    const { id } = await stripe.accounts.create({ email: 'new@mail.example' })
    const early = stripe.checkout.sessions.create(checkoutParams(clock.seconds()), {
      stripeAccount: id,
    })
    await expect(early).rejects.toThrow(Stripe.errors.StripeInvalidRequestError)
  })
})

describe('a checkout', () => {
  it('has the address of its page while it is open', async () => {
    const session = await create()
    expect(session).toMatchObject({
      object: 'checkout.session',
      status: 'open',
      payment_status: 'unpaid',
      amount_total: 12_000,
      currency: 'eur',
      client_reference_id: 'order-1',
      customer_email: 'golfer@mail.example',
      metadata: { order_id: 'order-1' },
      expires_at: clock.seconds() + 3_600,
      payment_intent: null,
      url: `${fake.url}/pay/${session.id}`,
    })
    expect(await retrieve(session.id)).toMatchObject({ id: session.id, status: 'open' })
  })

  it('adds its lines up', async () => {
    const params = checkoutParams(clock.seconds())
    const [line] = params.line_items ?? []
    const session = await stripe.checkout.sessions.create(
      { ...params, line_items: [line!, { ...line!, quantity: 2 }] },
      { stripeAccount },
    )
    expect(session.amount_total).toBe(36_000)
  })

  it('ends by a call, once', async () => {
    const { id } = await create()
    const expired = await stripe.checkout.sessions.expire(id, {}, { stripeAccount })
    expect(expired).toMatchObject({ status: 'expired', payment_status: 'unpaid', url: null })
    const again = stripe.checkout.sessions.expire(id, {}, { stripeAccount })
    await expect(again).rejects.toThrow('this one is expired')
  })

  it('cannot be ended once it is paid', async () => {
    const { id } = await create()
    expect(fake.pay(id)).toBeNull()
    const late = stripe.checkout.sessions.expire(id, {}, { stripeAccount })
    await expect(late).rejects.toThrow(Stripe.errors.StripeInvalidRequestError)
    expect(await retrieve(id)).toMatchObject({ status: 'complete', payment_status: 'paid' })
  })

  it('ends by itself at its time, and not a second before', async () => {
    const { id } = await create({ lastsSeconds: 1_800 })
    clock.moveBy(1_799)
    expect(await retrieve(id)).toMatchObject({ status: 'open' })
    clock.moveBy(1)
    expect(await retrieve(id)).toMatchObject({ status: 'expired' })
    expect(fake.pay(id)).toBe('This payment page is no longer open.')
  })

  it('lasts from half an hour to a day', async () => {
    await expect(create({ lastsSeconds: 600 })).rejects.toMatchObject({ param: 'expires_at' })
    await expect(create({ lastsSeconds: 90_000 })).rejects.toMatchObject({ param: 'expires_at' })
    const { expires_at: _, ...params } = checkoutParams(clock.seconds())
    const session = await stripe.checkout.sessions.create(params, { stripeAccount })
    expect(session.expires_at).toBe(clock.seconds() + 24 * 3_600)
  })
})

describe('the payment page', () => {
  it('shows what is paid for, and takes the documented card', async () => {
    const { id, url } = await create({ orderId: 'order-7' })
    const html = await (await fetch(url!)).text()
    expect(html).toContain('<h1>Tuesday wedges: EUR 120.00</h1>')
    const paid = await payByForm(url!, '4242 4242 4242 4242')
    expect(paid.status).toBe(303)
    expect(paid.headers.get('location')).toBe(`http://127.0.0.1:9/paid?checkout=${id}`)
    const session = await retrieve(id)
    expect(session).toMatchObject({ status: 'complete', payment_status: 'paid', url: null })
    expect(await (await fetch(url!)).text()).toContain('This payment page is closed')
  })

  it.each([
    ['4000000000000002', 'card_declined', 'generic_decline'],
    ['4000000000009995', 'card_declined', 'insufficient_funds'],
    ['4000000000009987', 'card_declined', 'lost_card'],
    ['4000000000009979', 'card_declined', 'stolen_card'],
    ['4000000000000069', 'expired_card', undefined],
    ['4000000000000127', 'incorrect_cvc', undefined],
    ['4000000000000119', 'processing_error', undefined],
    ['1234', 'incorrect_number', undefined],
  ])('says why %s is refused, and lets another card pay', async (card, code, declineCode) => {
    const { id, url } = await create()
    const refused = await payByForm(url!, card)
    expect(refused.status).toBe(402)
    expect(await refused.text()).toContain('role="alert"')
    const session = await retrieve(id)
    expect(session).toMatchObject({ status: 'open', payment_status: 'unpaid' })
    const intentId = session.payment_intent as string
    const intent = await stripe.paymentIntents.retrieve(intentId, {}, { stripeAccount })
    expect(intent).toMatchObject({
      status: 'requires_payment_method',
      amount_received: 0,
      latest_charge: null,
      last_payment_error: { type: 'card_error', code },
    })
    expect(intent.last_payment_error?.decline_code).toBe(declineCode)

    await payByForm(url!, '4242424242424242')
    expect(await retrieve(id)).toMatchObject({ status: 'complete', payment_intent: intentId })
    const paid = await stripe.paymentIntents.retrieve(intentId, {}, { stripeAccount })
    expect(paid).toMatchObject({ status: 'succeeded', last_payment_error: null })
  })

  it('is not found under another id', async () => {
    expect((await fetch(`${fake.url}/pay/cs_test_nothing`)).status).toBe(404)
    expect((await payByForm(`${fake.url}/pay/cs_test_nothing`, '4242424242424242')).status).toBe(
      404,
    )
    expect((await fetch(`${fake.url}/onboarding/acct_nothing`)).status).toBe(404)
  })
})

describe('the errors of the API are the typed ones of the SDK', () => {
  it('for a wrong key, which is not repeated', async () => {
    const wrong = sdkFor(fake, 'sk_test_another_one').accounts.retrieve(stripeAccount)
    await expect(wrong).rejects.toThrow(Stripe.errors.StripeAuthenticationError)
    await expect(wrong).rejects.not.toThrow('sk_test_another_one')
  })

  it('for an account that the platform is not connected to', async () => {
    const stranger = stripe.checkout.sessions.create(checkoutParams(clock.seconds()), {
      stripeAccount: 'acct_stranger',
    })
    await expect(stranger).rejects.toThrow(Stripe.errors.StripePermissionError)
    await expect(stranger).rejects.toMatchObject({ statusCode: 403, code: 'account_invalid' })
  })

  it('for what is not there, or is another account’s', async () => {
    const { id } = await create()
    const notMine = { statusCode: 404, code: 'resource_missing' }
    await expect(retrieve('cs_test_nothing')).rejects.toMatchObject(notMine)
    await expect(stripe.checkout.sessions.retrieve(id)).rejects.toMatchObject(notMine)
    const other = await connectAccount(stripe, fake)
    const theirs = stripe.checkout.sessions.retrieve(id, {}, { stripeAccount: other })
    await expect(theirs).rejects.toMatchObject(notMine)
    await expect(theirs).rejects.toThrow(Stripe.errors.StripeInvalidRequestError)
  })

  it.each<[string, Partial<Stripe.Checkout.SessionCreateParams>, object]>([
    ['a mode that is missing', { mode: undefined! }, { code: 'parameter_missing', param: 'mode' }],
    ['a mode it does not know', { mode: 'subscription' }, { param: 'mode' }],
    ['no lines', { line_items: [] }, { param: 'line_items' }],
    ['an address that is none', { success_url: 'paid' }, { code: 'url_invalid' }],
    ['a mail address that is none', { customer_email: 'golfer' }, { code: 'email_invalid' }],
    ['a parameter it does not know', { customer: 'cus_1' }, { code: 'parameter_unknown' }],
    ['an expiry that is no number', { expires_at: 1.5 }, { code: 'parameter_invalid_integer' }],
  ])('for %s', async (_what, change, expected) => {
    const params = { ...checkoutParams(clock.seconds()), ...change }
    const wrong = stripe.checkout.sessions.create(params, { stripeAccount })
    await expect(wrong).rejects.toThrow(Stripe.errors.StripeInvalidRequestError)
    await expect(wrong).rejects.toMatchObject({ statusCode: 400, ...expected })
  })

  it('for an address that it does not know', async () => {
    await expect(stripe.customers.list()).rejects.toMatchObject({ statusCode: 404 })
  })

  it('for a provider that is down, and says so before it does anything', async () => {
    fake.failNext({ status: 503, count: 1 })
    await expect(create({ orderId: 'order-down' })).rejects.toThrow(Stripe.errors.StripeAPIError)
    const made = Object.values(fake.state.checkouts).map(({ clientReference }) => clientReference)
    expect(made).not.toContain('order-down')
    await expect(create({ orderId: 'order-down' })).resolves.toMatchObject({ status: 'open' })
  })
})
