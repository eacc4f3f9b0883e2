import type { PaymentsFake } from '@marram/fakes'
import Stripe from 'stripe'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { control } from '../support/control'
import { checkoutParams, connectAccount, movableClock, startPayments } from '../support/payments'

const clock = movableClock('2027-04-06T10:00:00Z')

let fake: PaymentsFake
let stripe: Stripe
let stripeAccount: string

beforeAll(async () => {
  ;({ fake, stripe } = await startPayments({ now: clock.now }))
  stripeAccount = await connectAccount(stripe, fake)
})
afterAll(() => fake.close())

const create = (idempotencyKey: string, wishes?: Parameters<typeof checkoutParams>[1]) =>
  stripe.checkout.sessions.create(checkoutParams(clock.seconds(), wishes), {
    stripeAccount,
    idempotencyKey,
  })
const made = (orderId: string) =>
  Object.values(fake.state.checkouts).filter(({ clientReference }) => clientReference === orderId)

describe('a change under an idempotency key', () => {
  it('is made once, and answered twice alike', async () => {
    const first = await create('key-1', { orderId: 'once' })
    const second = await create('key-1', { orderId: 'once' })
    expect(second).toEqual(first)
    expect(first.lastResponse.headers['idempotent-replayed']).toBeUndefined()
    expect(second.lastResponse.headers['idempotent-replayed']).toBe('true')
    expect(made('once')).toHaveLength(1)
  })

  it('is made anew under another key, and for another account under the same', async () => {
    const first = await create('key-2', { orderId: 'twice' })
    const second = await create('key-3', { orderId: 'twice' })
    const other = await connectAccount(stripe, fake)
    const third = await stripe.checkout.sessions.create(
      checkoutParams(clock.seconds(), { orderId: 'twice' }),
      { stripeAccount: other, idempotencyKey: 'key-2' },
    )
    expect(new Set([first.id, second.id, third.id]).size).toBe(3)
  })

  it('is refused with other parameters, or at another address', async () => {
    const { id } = await create('key-4')
    const changed = create('key-4', { amount: 12_001 })
    await expect(changed).rejects.toThrow(Stripe.errors.StripeIdempotencyError)
    await expect(changed).rejects.toMatchObject({ statusCode: 400 })
    const elsewhere = stripe.checkout.sessions.expire(
      id,
      {},
      { stripeAccount, idempotencyKey: 'key-4' },
    )
    await expect(elsewhere).rejects.toThrow(Stripe.errors.StripeIdempotencyError)
  })

  it('may be asked again, corrected, when it was refused before it was made', async () => {
    const least = { amount: 1, applicationFee: 0 }
    await expect(create('key-5', least)).rejects.toMatchObject({ code: 'amount_too_small' })
    await expect(create('key-5', { amount: 5_000 })).resolves.toMatchObject({ amount_total: 5_000 })
  })

  it('is refused with 409 while the first is at work', async () => {
    await control(fake, 'hold-requests')
    const both = [create('key-6', { orderId: 'race' }), create('key-6', { orderId: 'race' })]
    // Whichever comes second is refused at once; the other waits to be released.
    const refusal: unknown = await Promise.any(
      both.map((one) =>
        one.then(
          () => Promise.reject(new Error('answered')),
          (error: unknown) => error,
        ),
      ),
    )
    expect(refusal).toMatchObject({ statusCode: 409, code: 'idempotency_key_in_use' })
    expect(made('race')).toHaveLength(0)
    await control(fake, 'release-requests')
    const outcomes = await Promise.allSettled(both)
    expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected'])
    expect(made('race')).toHaveLength(1)
  })

  it('was made though its answer was lost, and asking again brings the answer', async () => {
    // The SDK asks again by itself, once, when a connection breaks.
    await control(fake, 'lose-answers', { count: 2 })
    const lost = create('key-7', { orderId: 'lost' })
    await expect(lost).rejects.toThrow(Stripe.errors.StripeConnectionError)
    const { id } = await create('key-7', { orderId: 'lost' })
    expect(made('lost').map((checkout) => checkout.id)).toEqual([id])
  })

  it('is forgotten after a day', async () => {
    const first = await create('key-8', { orderId: 'day' })
    const params = checkoutParams(clock.seconds(), { orderId: 'day' })
    const options = { stripeAccount, idempotencyKey: 'key-8' }
    clock.moveBy(24 * 3_600 - 1)
    expect((await stripe.checkout.sessions.create(params, options)).id).toBe(first.id)
    clock.moveBy(1)
    const fresh = checkoutParams(clock.seconds(), { orderId: 'day' })
    expect((await stripe.checkout.sessions.create(fresh, options)).id).not.toBe(first.id)
  })
})
