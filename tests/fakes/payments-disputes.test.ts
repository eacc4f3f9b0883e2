import type { PaymentsFake } from '@marram/fakes'
import Stripe from 'stripe'
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
const FRAUDULENT = '4000000000000259'
const NOT_RECEIVED = '4000000000002685'
/** More than the provider takes over what it does not do at once. */
const A_WHILE_SECONDS = 5

let fake: PaymentsFake
let stripe: Stripe
let stripeAccount: string

beforeEach(async () => {
  ;({ fake, stripe } = await startPayments({ now: clock.now }))
  stripeAccount = await connectAccount(stripe, fake)
})
afterEach(() => fake.close())

const pay = (card?: string) =>
  payFor({ fake, stripe, stripeAccount }, checkoutParams(clock.seconds()), card)
const disputesOf = async ({ id }: Stripe.PaymentIntent) =>
  (await stripe.disputes.list({ payment_intent: id }, { stripeAccount })).data
const disputed = async (card = FRAUDULENT) => {
  const intent = await pay(card)
  fake.advanceClock(A_WHILE_SECONDS)
  const [dispute] = await disputesOf(intent)
  return { intent, dispute: dispute! }
}
const retrieve = (id: string) => stripe.disputes.retrieve(id, {}, { stripeAccount })
const told = (id: string) =>
  fake.state.events.filter(({ objectId }) => objectId === id).map(({ type }) => type)
const netOf = ({ balance_transactions }: Stripe.Dispute) =>
  balance_transactions.reduce((sum, { net }) => sum + net, 0)

describe('a dispute', () => {
  it.each([
    [FRAUDULENT, 'fraudulent'],
    [NOT_RECEIVED, 'product_not_received'],
  ])('follows a payment by %s a little later', async (card, reason) => {
    const intent = await pay(card)
    expect(await disputesOf(intent)).toEqual([])
    fake.advanceClock(A_WHILE_SECONDS)
    const [dispute, ...more] = await disputesOf(intent)
    expect(more).toEqual([])
    expect(dispute).toMatchObject({
      object: 'dispute',
      amount: 12_000,
      currency: 'eur',
      reason,
      status: 'needs_response',
      payment_intent: intent.id,
      evidence_details: { has_evidence: false, past_due: false, submission_count: 0 },
    })
  })

  it('takes the money and a fee while it lasts', async () => {
    const { intent, dispute } = await disputed()
    expect(dispute.balance_transactions).toMatchObject([
      {
        amount: -12_000,
        fee: 1_500,
        net: -13_500,
        type: 'adjustment',
        reporting_category: 'dispute',
        source: dispute.id,
      },
    ])
    const { id: charge } = intent.latest_charge as Stripe.Charge
    expect(dispute.charge).toBe(charge)
    expect(await stripe.charges.retrieve(charge, {}, { stripeAccount })).toMatchObject({
      disputed: true,
    })
    expect(told(dispute.id)).toEqual(['charge.dispute.created', 'charge.dispute.funds_withdrawn'])
    const refund = stripe.refunds.create({ payment_intent: intent.id }, { stripeAccount })
    await expect(refund).rejects.toMatchObject({ code: 'charge_disputed' })
  })

  it('is won by evidence that wins, and all comes back', async () => {
    const { dispute } = await disputed()
    const sent = await stripe.disputes.update(
      dispute.id,
      { evidence: { uncategorized_text: 'winning_evidence' }, metadata: { order_id: 'order-1' } },
      { stripeAccount },
    )
    expect(sent).toMatchObject({
      status: 'under_review',
      evidence: { uncategorized_text: 'winning_evidence' },
      evidence_details: { has_evidence: true, submission_count: 1 },
      metadata: { order_id: 'order-1' },
    })
    fake.advanceClock(A_WHILE_SECONDS)
    const won = await retrieve(dispute.id)
    expect(won.status).toBe('won')
    expect(won.balance_transactions[1]).toMatchObject({
      amount: 12_000,
      fee: -1_500,
      reporting_category: 'dispute_reversal',
    })
    expect(netOf(won)).toBe(0)
    expect(told(dispute.id).slice(2)).toEqual([
      'charge.dispute.updated',
      'charge.dispute.funds_reinstated',
      'charge.dispute.closed',
    ])
  })

  it('is lost by evidence that loses, and nothing comes back', async () => {
    const { dispute } = await disputed()
    const evidence = { uncategorized_text: 'losing_evidence' }
    await stripe.disputes.update(dispute.id, { evidence }, { stripeAccount })
    fake.advanceClock(A_WHILE_SECONDS)
    const lost = await retrieve(dispute.id)
    expect(lost.status).toBe('lost')
    expect(netOf(lost)).toBe(-13_500)
    expect(told(dispute.id).at(-1)).toBe('charge.dispute.closed')
  })

  it('keeps a draft of the evidence without sending it', async () => {
    const { dispute } = await disputed()
    const evidence = { uncategorized_text: 'winning_evidence' }
    await stripe.disputes.update(dispute.id, { evidence, submit: false }, { stripeAccount })
    fake.advanceClock(A_WHILE_SECONDS)
    expect(await retrieve(dispute.id)).toMatchObject({ status: 'needs_response', evidence })
  })

  it('stays under review after other evidence, until a control decides', async () => {
    const { dispute } = await disputed()
    const evidence = { product_description: 'Eight evenings of wedges' }
    await stripe.disputes.update(dispute.id, { evidence }, { stripeAccount })
    fake.advanceClock(A_WHILE_SECONDS)
    expect((await retrieve(dispute.id)).status).toBe('under_review')
    await control(fake, 'settle-dispute', { dispute: dispute.id, outcome: 'lost' })
    expect((await retrieve(dispute.id)).status).toBe('lost')
    await expect(
      control(fake, 'settle-dispute', { dispute: dispute.id, outcome: 'won' }),
    ).rejects.toThrow('already closed')
  })

  it('is lost when the academy accepts it', async () => {
    const { dispute } = await disputed()
    const closed = await stripe.disputes.close(dispute.id, {}, { stripeAccount })
    expect(closed.status).toBe('lost')
    const late = stripe.disputes.update(dispute.id, { evidence: {} }, { stripeAccount })
    await expect(late).rejects.toThrow(Stripe.errors.StripeInvalidRequestError)
  })

  it('is opened by a control for any payment, of what was not refunded yet', async () => {
    const intent = await pay()
    const partly = { payment_intent: intent.id, amount: 2_000 }
    await stripe.refunds.create(partly, { stripeAccount })
    const reason = 'duplicate'
    const id = await control(fake, 'dispute', { payment: intent.id, reason })
    expect(await retrieve(id as string)).toMatchObject({ amount: 10_000, reason })
    await expect(control(fake, 'dispute', { payment: intent.id })).rejects.toThrow('nothing')
  })

  it('does not come for a payment that was refunded first', async () => {
    const intent = await pay(FRAUDULENT)
    await stripe.refunds.create({ payment_intent: intent.id }, { stripeAccount })
    fake.advanceClock(A_WHILE_SECONDS)
    expect(await disputesOf(intent)).toEqual([])
  })
})
