import type { PaymentsFake } from '@marram/fakes'
import type Stripe from 'stripe'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { control } from '../support/control'
import {
  checkoutParams,
  connectAccount,
  movableClock,
  payFor,
  startPayments,
} from '../support/payments'

const clock = movableClock('2027-04-06T10:00:00Z')
const DAY_SECONDS = 24 * 3_600

let fake: PaymentsFake
let stripe: Stripe
let stripeAccount: string

beforeEach(async () => {
  ;({ fake, stripe } = await startPayments({ now: clock.now }))
  stripeAccount = await connectAccount(stripe, fake)
})
afterEach(() => fake.close())

type Wishes = Parameters<typeof checkoutParams>[1]
const pay = (wishes?: Wishes, card?: string) =>
  payFor({ fake, stripe, stripeAccount }, checkoutParams(fakeSeconds(), wishes), card)
const fakeSeconds = () => clock.seconds() + fake.state.clockOffsetSeconds
const payOut = async (body: object = {}) => {
  const id = await control(fake, 'payout', { account: stripeAccount, currency: 'eur', ...body })
  return stripe.payouts.retrieve(id as string, {}, { stripeAccount })
}
const movedBy = (payout: string) =>
  stripe.balanceTransactions.list({ payout }, { stripeAccount }).autoPagingToArray({ limit: 1_000 })
const netsOf = (moved: Stripe.BalanceTransaction[]) => moved.reduce((sum, { net }) => sum + net, 0)
const balance = async () => {
  const { available, pending } = await stripe.balance.retrieve({}, { stripeAccount })
  return { available: available[0]?.amount ?? 0, pending: pending[0]?.amount ?? 0 }
}

describe('a payout', () => {
  it('takes what was earned net of fees, and lists what it took and itself', async () => {
    const first = await pay({ amount: 12_000, applicationFee: 120 })
    await pay({ amount: 8_000, applicationFee: 0 })
    const refund = await stripe.refunds.create(
      { payment_intent: first.id, amount: 2_000 },
      { stripeAccount },
    )
    const payout = await payOut()
    // 12000 − 205 − 120, 8000 − 145, −2000.
    expect(payout).toMatchObject({
      object: 'payout',
      amount: 17_530,
      currency: 'eur',
      status: 'paid',
      automatic: true,
      reconciliation_status: 'completed',
    })
    const moved = await movedBy(payout.id)
    expect(moved.map(({ type }) => type).sort()).toEqual(['charge', 'charge', 'payout', 'refund'])
    expect(moved.map(({ source }) => source)).toContain(refund.id)
    expect(netsOf(moved.filter(({ type }) => type !== 'payout'))).toBe(payout.amount)
    expect(netsOf(moved)).toBe(0)
    const own = await stripe.payouts.retrieve(
      payout.id,
      { expand: ['balance_transaction'] },
      { stripeAccount },
    )
    expect(own.balance_transaction).toMatchObject({ type: 'payout', net: -17_530 })
    const types = fake.state.events.filter(({ objectId }) => objectId === payout.id)
    expect(types.map(({ type }) => type)).toEqual([
      'payout.created',
      'payout.paid',
      'payout.reconciliation_completed',
    ])
  })

  it('takes nothing twice, and nothing where there is nothing', async () => {
    await pay()
    await payOut()
    await expect(payOut()).rejects.toThrow('nothing to pay out')
    await pay({ amount: 5_000, applicationFee: 0 })
    expect(await payOut()).toMatchObject({ amount: 4_900 })
  })

  it('takes one currency, one account, and what came by a time', async () => {
    await pay({ amount: 5_000, applicationFee: 0 })
    const until = fakeSeconds()
    fake.advanceClock(1)
    await pay({ amount: 7_000, applicationFee: 0 })
    await pay({ amount: 9_000, applicationFee: 0, currency: 'usd' })
    const other = await connectAccount(stripe, fake)
    const theirs = { fake, stripe, stripeAccount: other }
    await payFor(theirs, checkoutParams(fakeSeconds(), { amount: 6_000, applicationFee: 0 }))
    expect(await payOut({ until })).toMatchObject({ amount: 4_900 })
    expect(await payOut({ currency: 'usd' })).toMatchObject({ amount: 8_840, currency: 'usd' })
    expect(await payOut({ account: stripeAccount })).toMatchObject({ amount: 6_870 })
  })

  it('that fails brings the money back, for the next one to take', async () => {
    await pay({ amount: 5_000, applicationFee: 0 })
    const sent = await payOut({ outcome: 'in_transit' })
    expect(sent).toMatchObject({ status: 'in_transit', reconciliation_status: 'in_progress' })
    await control(fake, 'settle-payout', { payout: sent.id, outcome: 'failed' })
    const failed = await stripe.payouts.retrieve(sent.id, {}, { stripeAccount })
    expect(failed).toMatchObject({ status: 'failed', failure_code: 'account_closed' })
    const next = await payOut()
    expect(next.amount).toBe(4_900)
    expect((await movedBy(next.id)).map(({ type }) => type)).toEqual(['payout', 'payout_failure'])
    await expect(
      control(fake, 'settle-payout', { payout: sent.id, outcome: 'paid' }),
    ).rejects.toThrow('failed already')
    const failures = await stripe.payouts.list({ status: 'failed' }, { stripeAccount })
    expect(failures.data.map(({ id }) => id)).toEqual([sent.id])
  })
})

describe('a control', () => {
  it.each<[string, object, string]>([
    ['payout', { currency: 'eur' }, 'account is missing'],
    ['payout', { account: 'acct', currency: 'eur', until: 'soon' }, 'until is no number'],
    ['payout', { account: 'acct', currency: 'eur', outcome: 'lost' }, 'outcome is one of paid'],
    ['settle-payout', { payout: 'po_nothing' }, 'No such record'],
    ['finish-onboarding', { url: 'nowhere' }, 'url is no address'],
    ['pay', { session: 'cs_nothing' }, 'No such record'],
  ])('%s says what it does not understand of %j', async (name, body, sentence) => {
    await expect(control(fake, name, body)).rejects.toThrow(sentence)
  })
})

describe('the balance', () => {
  it('is what came in less fees, refunds, disputes and payouts', async () => {
    await pay({ amount: 12_000, applicationFee: 120 })
    const disputed = await pay({ amount: 8_000, applicationFee: 80 })
    const refunded = await pay({ amount: 5_000, applicationFee: 0 }, '4000000000005126')
    await stripe.refunds.create({ payment_intent: refunded.id }, { stripeAccount })
    await payOut()
    await control(fake, 'dispute', { payment: disputed.id })
    fake.advanceClock(5)
    await pay({ amount: 30_000, applicationFee: 300 })
    const all = await stripe.balanceTransactions
      .list({ limit: 3 }, { stripeAccount })
      .autoPagingToArray({ limit: 1_000 })
    expect(new Set(all.map(({ type }) => type))).toEqual(
      new Set(['charge', 'refund', 'refund_failure', 'payout', 'adjustment']),
    )
    for (const { amount, fee, net } of all) expect(net).toBe(amount - fee)
    const { available, pending } = await balance()
    expect(available + pending).toBe(netsOf(all))
  })

  it('has what came in available after two days', async () => {
    await pay({ amount: 5_000, applicationFee: 0 })
    expect(await balance()).toEqual({ available: 0, pending: 4_900 })
    fake.advanceClock(2 * DAY_SECONDS - 1)
    expect(await balance()).toEqual({ available: 0, pending: 4_900 })
    fake.advanceClock(1)
    expect(await balance()).toEqual({ available: 4_900, pending: 0 })
  })

  it('of the platform is what its application fees add up to', async () => {
    await pay({ applicationFee: 120 })
    await pay({ applicationFee: 80 })
    const moved = await stripe.balanceTransactions.list({ type: 'application_fee' })
    expect(netsOf(moved.data)).toBe(200)
    const theirs = await stripe.applicationFees.list({}, { stripeAccount })
    expect(theirs.data).toEqual([])
  })
})
