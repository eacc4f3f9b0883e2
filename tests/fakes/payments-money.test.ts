import type { PaymentsFake } from '@marram/fakes'
import Stripe from 'stripe'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  checkoutParams,
  connectAccount,
  movableClock,
  payFor,
  startPayments,
} from '../support/payments'

const clock = movableClock('2027-04-06T10:00:00Z')
const REFUND_PENDS = '4000000000007726'
const REFUND_FAILS = '4000000000005126'

let fake: PaymentsFake
let stripe: Stripe
let stripeAccount: string

beforeAll(async () => {
  ;({ fake, stripe } = await startPayments({ now: clock.now }))
  stripeAccount = await connectAccount(stripe, fake)
})
afterAll(() => fake.close())

type Wishes = Parameters<typeof checkoutParams>[1]
const params = (wishes?: Wishes) => checkoutParams(clock.seconds(), wishes)
const pay = (wishes?: Wishes, card?: string) =>
  payFor({ fake, stripe, stripeAccount }, params(wishes), card)
const create = (wishes?: Wishes) =>
  stripe.checkout.sessions.create(params(wishes), { stripeAccount })
const refund = (wanted: Stripe.RefundCreateParams) =>
  stripe.refunds.create(wanted, { stripeAccount })
const transaction = (id: unknown) =>
  stripe.balanceTransactions.retrieve(id as string, {}, { stripeAccount })
const chargeOf = async (intent: Stripe.PaymentIntent) => {
  const { latest_charge } = await stripe.paymentIntents.retrieve(intent.id, {}, { stripeAccount })
  return stripe.charges.retrieve(latest_charge as string, {}, { stripeAccount })
}

describe('a payment', () => {
  it('opens down to its charge and what both took of it', async () => {
    const intent = await pay({ amount: 12_000, applicationFee: 120, orderId: 'order-9' })
    expect(intent).toMatchObject({
      status: 'succeeded',
      amount: 12_000,
      amount_received: 12_000,
      metadata: { order_id: 'order-9' },
      latest_charge: {
        object: 'charge',
        amount: 12_000,
        paid: true,
        refunded: false,
        application_fee_amount: 120,
        balance_transaction: {
          object: 'balance_transaction',
          amount: 12_000,
          fee: 325,
          net: 11_675,
          type: 'charge',
          reporting_category: 'charge',
        },
      },
    })
    const { balance_transaction: moved } = intent.latest_charge as Stripe.Charge
    expect((moved as Stripe.BalanceTransaction).fee_details).toMatchObject([
      { amount: 205, type: 'stripe_fee' },
      { amount: 120, type: 'application_fee' },
    ])
  })

  it('gives the platform its fee, in the platform’s own books', async () => {
    const intent = await pay({ applicationFee: 150 })
    const charge = intent.latest_charge as Stripe.Charge
    const fee = await stripe.applicationFees.retrieve(charge.application_fee as string, {
      expand: ['balance_transaction'],
    })
    expect(fee).toMatchObject({ account: stripeAccount, charge: charge.id, amount: 150 })
    expect(fee.balance_transaction).toMatchObject({ amount: 150, net: 150, source: fee.id })
    const listed = await stripe.applicationFees.list({ charge: charge.id })
    expect(listed.data.map(({ id }) => id)).toEqual([fee.id])
    const unpaid = await pay({ applicationFee: 0 })
    expect((unpaid.latest_charge as Stripe.Charge).application_fee).toBeNull()
  })

  it('is not found by the platform or another account', async () => {
    const { id } = await pay()
    await expect(stripe.paymentIntents.retrieve(id)).rejects.toMatchObject({ statusCode: 404 })
  })

  it.each(['amount', 'currency', 'nothing', 'latest_charge.currency'])(
    'opens no %s, which leads to no other object',
    async (path) => {
      const { id } = await pay()
      const wrong = stripe.paymentIntents.retrieve(id, { expand: [path] }, { stripeAccount })
      await expect(wrong).rejects.toMatchObject({ statusCode: 400, param: 'expand' })
    },
  )

  it('takes no application fee above its amount', async () => {
    await expect(create({ amount: 1_000, applicationFee: 1_001 })).rejects.toMatchObject({
      param: 'payment_intent_data[application_fee_amount]',
    })
    await expect(create({ amount: 1_000, applicationFee: 1_000 })).resolves.toBeDefined()
  })
})

describe('the amounts of a currency', () => {
  it.each([
    ['eur', 50],
    ['usd', 50],
    ['gbp', 30],
    ['jpy', 50],
  ])('in %s begin at %i', async (currency, least) => {
    const under = create({ currency, amount: least - 1, applicationFee: 0 })
    await expect(under).rejects.toMatchObject({ statusCode: 400, code: 'amount_too_small' })
    const session = await create({ currency, amount: least, applicationFee: 0 })
    expect(session.amount_total).toBe(least)
  })

  it('end after eight digits', async () => {
    await expect(create({ amount: 99_999_999 })).resolves.toBeDefined()
    await expect(create({ amount: 100_000_000 })).rejects.toMatchObject({
      code: 'amount_too_large',
    })
  })

  it('are whole where there are no decimals, on the page as in the API', async () => {
    const session = await create({ currency: 'jpy', amount: 6_000, applicationFee: 60 })
    expect(await (await fetch(session.url!)).text()).toContain('JPY 6000<')
  })

  it('come in tens where there are three decimals', async () => {
    const wishes = { currency: 'kwd', applicationFee: 0 }
    await expect(create({ ...wishes, amount: 12_345 })).rejects.toMatchObject({ param: 'amount' })
    const wrongFee = create({ ...wishes, amount: 12_340, applicationFee: 123 })
    await expect(wrongFee).rejects.toMatchObject({ param: 'amount' })
    const session = await create({ ...wishes, amount: 12_340 })
    expect(await (await fetch(session.url!)).text()).toContain('KWD 12.340<')
    const intent = await pay({ ...wishes, amount: 12_340 })
    const { balance_transaction: moved } = intent.latest_charge as Stripe.Charge
    expect((moved as Stripe.BalanceTransaction).fee % 10).toBe(0)
    const split = refund({ payment_intent: intent.id, amount: 1_234 })
    await expect(split).rejects.toMatchObject({ param: 'amount' })
  })

  it('are of a currency that there is, in lower case', async () => {
    await expect(create({ currency: 'xqq' })).rejects.toMatchObject({ param: 'currency' })
    await expect(create({ currency: 'EUR' })).rejects.toMatchObject({ param: 'currency' })
  })
})

describe('a refund', () => {
  it('goes back in parts, as far as the charge goes', async () => {
    const intent = await pay({ amount: 10_000 })
    const part = await refund({
      payment_intent: intent.id,
      amount: 4_000,
      metadata: { refund_id: 'refund-1' },
    })
    expect(part).toMatchObject({
      status: 'succeeded',
      amount: 4_000,
      payment_intent: intent.id,
      metadata: { refund_id: 'refund-1' },
    })
    expect(await chargeOf(intent)).toMatchObject({ amount_refunded: 4_000, refunded: false })
    expect(await transaction(part.balance_transaction)).toMatchObject({
      amount: -4_000,
      fee: 0,
      net: -4_000,
      type: 'refund',
      source: part.id,
    })
    const tooMuch = refund({ payment_intent: intent.id, amount: 6_001 })
    await expect(tooMuch).rejects.toThrow(Stripe.errors.StripeInvalidRequestError)
    await expect(tooMuch).rejects.toMatchObject({ param: 'amount' })
    // Left out, the amount is all that is left.
    expect(await refund({ payment_intent: intent.id })).toMatchObject({ amount: 6_000 })
    expect(await chargeOf(intent)).toMatchObject({ amount_refunded: 10_000, refunded: true })
    const again = refund({ payment_intent: intent.id })
    await expect(again).rejects.toMatchObject({ code: 'charge_already_refunded' })
    const listed = await stripe.refunds.list({ payment_intent: intent.id }, { stripeAccount })
    expect(listed.data.map(({ amount }) => amount)).toEqual([6_000, 4_000])
  })

  it('needs a payment that succeeded', async () => {
    const { id } = await create()
    fake.pay(id, '4000000000000002')
    const { payment_intent } = await stripe.checkout.sessions.retrieve(id, {}, { stripeAccount })
    const early = refund({ payment_intent: payment_intent as string })
    await expect(early).rejects.toThrow(Stripe.errors.StripeInvalidRequestError)
    await expect(refund({})).rejects.toMatchObject({ statusCode: 400 })
  })

  it('is pending for a while where its card is slow', async () => {
    const intent = await pay({ amount: 10_000 }, REFUND_PENDS)
    const asked = await refund({ payment_intent: intent.id })
    expect(asked).toMatchObject({ status: 'pending', balance_transaction: null })
    fake.advanceClock(1)
    expect(await stripe.refunds.retrieve(asked.id, {}, { stripeAccount })).toEqual(asked)
    fake.advanceClock(1)
    const done = await stripe.refunds.retrieve(asked.id, {}, { stripeAccount })
    expect(done.status).toBe('succeeded')
    expect(await transaction(done.balance_transaction)).toMatchObject({ amount: -10_000 })
  })

  it('succeeds at first and fails later where its card cannot be refunded', async () => {
    const intent = await pay({ amount: 10_000 }, REFUND_FAILS)
    const asked = await refund({ payment_intent: intent.id, amount: 2_500 })
    expect(asked.status).toBe('succeeded')
    expect(await chargeOf(intent)).toMatchObject({ amount_refunded: 2_500 })
    fake.advanceClock(2)
    const failed = await stripe.refunds.retrieve(asked.id, {}, { stripeAccount })
    expect(failed).toMatchObject({
      status: 'failed',
      failure_reason: 'expired_or_canceled_card',
      balance_transaction: asked.balance_transaction,
    })
    expect(await transaction(failed.failure_balance_transaction)).toMatchObject({
      amount: 2_500,
      type: 'refund_failure',
      source: asked.id,
    })
    expect(await chargeOf(intent)).toMatchObject({ amount_refunded: 0, refunded: false })
    const types = fake.state.events.filter(({ objectId }) => objectId === asked.id)
    expect(types.map(({ type }) => type)).toEqual([
      'refund.created',
      'refund.updated',
      'refund.failed',
    ])
  })
})
