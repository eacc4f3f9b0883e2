import type { PaymentsFake } from '@marram/fakes'
import type Stripe from 'stripe'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import {
  checkoutParams,
  connectAccount,
  movableClock,
  payFor,
  startPayments,
} from '../support/payments'

const clock = movableClock('2027-04-06T10:00:00Z')

let fake: PaymentsFake
let stripe: Stripe
let stripeAccount: string

beforeEach(async () => {
  ;({ fake, stripe } = await startPayments({ now: clock.now }))
  stripeAccount = await connectAccount(stripe, fake)
})
afterEach(() => fake.close())

const fakeSeconds = () => clock.seconds() + fake.state.clockOffsetSeconds
const pay = () => payFor({ fake, stripe, stripeAccount }, checkoutParams(fakeSeconds()))

describe('a list', () => {
  const ids = (page: { data: { id: string }[] }) => page.data.map(({ id }) => id)
  const payTimes = async (times: number) => {
    const made: string[] = []
    for (let time = 0; time < times; time += 1) {
      made.unshift((await pay()).id)
      fake.advanceClock(time % 2)
    }
    return made
  }
  const list = (query: Stripe.PaymentIntentListParams) =>
    stripe.paymentIntents.list(query, { stripeAccount })

  it('comes newest first in pages, onwards and back', async () => {
    const made = await payTimes(7)
    const first = await list({ limit: 3 })
    expect(first).toMatchObject({ object: 'list', url: '/v1/payment_intents', has_more: true })
    expect(ids(first)).toEqual(made.slice(0, 3))
    const second = await list({ limit: 3, starting_after: made[2]! })
    expect({ ids: ids(second), more: second.has_more }).toEqual({
      ids: made.slice(3, 6),
      more: true,
    })
    const last = await list({ limit: 3, starting_after: made[5]! })
    expect({ ids: ids(last), more: last.has_more }).toEqual({ ids: made.slice(6), more: false })
    const back = await list({ limit: 3, ending_before: made[5]! })
    expect({ ids: ids(back), more: back.has_more }).toEqual({ ids: made.slice(2, 5), more: true })
    const start = await list({ limit: 3, ending_before: made[2]! })
    expect({ ids: ids(start), more: start.has_more }).toEqual({
      ids: made.slice(0, 2),
      more: false,
    })
    const exact = await list({ limit: 7 })
    expect(exact.has_more).toBe(false)
    expect(ids(await list({}))).toEqual(made)
  })

  it('is walked to its end by the SDK, each record once', async () => {
    const made = await payTimes(12)
    const walked: string[] = []
    for await (const { id } of list({ limit: 5 })) walked.push(id)
    expect(walked).toEqual(made)
  })

  it('is narrowed by when its records were made', async () => {
    await pay()
    fake.advanceClock(10)
    const since = fakeSeconds()
    const { id } = await pay()
    fake.advanceClock(10)
    await pay()
    expect(ids(await list({ created: { gte: since, lt: since + 10 } }))).toEqual([id])
    expect(ids(await list({ created: { gt: since - 1, lte: since } }))).toEqual([id])
    expect(ids(await list({ created: since }))).toEqual([id])
  })

  it('opens what its records name', async () => {
    const { id, latest_charge } = await pay()
    const expand = ['data.source.payment_intent']
    const moved = await stripe.balanceTransactions.list({ expand }, { stripeAccount })
    expect(moved.data[0]?.source).toMatchObject({
      id: (latest_charge as Stripe.Charge).id,
      payment_intent: { id },
    })
  })

  it('is refused with a cursor, a limit or a parameter that makes no sense', async () => {
    await expect(list({ starting_after: 'pi_nothing' })).rejects.toMatchObject({
      code: 'resource_missing',
    })
    await expect(list({ limit: 101 })).rejects.toMatchObject({ param: 'limit' })
    await expect(list({ limit: 0 })).rejects.toMatchObject({ param: 'limit' })
    const both = list({ starting_after: 'pi_a', ending_before: 'pi_b' })
    await expect(both).rejects.toMatchObject({ statusCode: 400 })
    await expect(list({ customer: 'cus_1' })).rejects.toMatchObject({ code: 'parameter_unknown' })
  })
})
