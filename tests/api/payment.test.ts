import { describe, expect, it } from 'vitest'
import { readBooks } from '../support/books'
import { clinicFields } from '../support/builders'
import { tellAgain } from '../support/outbox'
import { useWorld } from '../support/use-world'
import { checkoutOf, holdRun, justAfter, readEnrolment, startPaying } from './payment/paying'

const world = await useWorld()

const PRICE = 24_000

/** The books after one run was sold: 240.00 came in with 9 % tax in it, less both fees. */
const SOLD_ONCE = {
  kinds: { fees: 1, 'sale-by-card': 1 },
  balances: {
    'provider-clearing': 23_375,
    'provider-fees': 385,
    'platform-fees': 240,
    'deferred-clinics': -22_018,
    'tax-owed': -1_982,
  },
}

describe('a payment', () => {
  it('confirms the place when the tab was closed: the webhook alone is enough', async () => {
    const hold = await holdRun(world)
    expect(world.payments.pay(await startPaying(hold))).toBeNull()
    expect(await readEnrolment(hold)).toMatchObject({ state: 'held', payment: 'open' })

    await world.drain()

    expect(await readEnrolment(hold)).toMatchObject({ state: 'confirmed', payment: 'paid' })
    expect(await readBooks(world, hold.academy.slug)).toEqual(SOLD_ONCE)
  })

  it('counts once, however often and in whatever order it is told', async () => {
    const hold = await holdRun(world)
    const checkout = await startPaying(hold)
    world.payments.hold()
    world.payments.pay(checkout)
    world.payments.duplicateNext(10)
    world.payments.releaseReversed()
    await world.drain()
    // The same deliveries once more, days later.
    await world.drain()

    expect(await readEnrolment(hold)).toMatchObject({ state: 'confirmed', payment: 'paid' })
    expect(await readBooks(world, hold.academy.slug)).toEqual(SOLD_ONCE)
    const mails = world.mail.messagesTo(hold.golfer.account.email)
    expect(mails.filter(({ attachments }) => attachments.length > 0)).toHaveLength(1)
  })

  it('is begun once, however often and at once it is pressed', async () => {
    const hold = await holdRun(world)
    const press = () => hold.golfer.person.must('checkout.start', { params: hold.params })
    const pages = await Promise.all([press(), press(), press()])
    const urls = new Set([...pages, await press()].map(({ url }) => url))
    expect(urls.size).toBe(1)

    const [url = ''] = urls
    const open = Object.values(world.payments.state.checkouts).filter(
      ({ status, cancelUrl }) => status === 'open' && cancelUrl?.includes(hold.held.id),
    )
    expect(open.map(({ id }) => id)).toEqual([checkoutOf(url)])
    world.payments.pay(checkoutOf(url))
    await world.drain()
    expect(await readBooks(world, hold.academy.slug)).toEqual(SOLD_ONCE)
  })

  it('takes the price that was agreed, whatever the clinic costs by now', async () => {
    const hold = await holdRun(world)
    const { academy } = hold
    const params = { academy: academy.slug, clinicId: academy.clinic.id }
    const dearer = { ...clinicFields(academy), runPriceMinor: 30_000 }
    await academy.owner.person.must('clinics.change', { params, body: dearer })

    const checkout = await startPaying(hold)
    expect(world.payments.state.checkouts[checkout]?.amount).toBe(PRICE)
    world.payments.pay(checkout)
    await world.drain()
    expect(await readEnrolment(hold)).toMatchObject({ state: 'confirmed', totalMinor: PRICE })
    expect(await readBooks(world, academy.slug)).toEqual(SOLD_ONCE)
  })
})

describe('a declined card', () => {
  it('leaves the place held, for as long as it was, and another card pays it', async () => {
    const hold = await holdRun(world)
    const checkout = await startPaying(hold)
    expect(world.payments.pay(checkout, '4000000000009995')).toMatch(/card/)
    await world.drain()

    const told = await readEnrolment(hold)
    expect(told).toMatchObject({ state: 'held', payment: 'declined' })
    expect(told.heldUntil).toBe(hold.held.heldUntil)
    expect(await readBooks(world, hold.academy.slug)).toEqual({ balances: {}, kinds: {} })

    world.payments.pay(checkout)
    await world.drain()
    expect(await readEnrolment(hold)).toMatchObject({ state: 'confirmed', payment: 'paid' })
  })

  it('says nothing any more when it is heard of after the payment', async () => {
    const hold = await holdRun(world)
    const checkout = await startPaying(hold)
    world.payments.hold()
    world.payments.pay(checkout, '4000000000000002')
    world.payments.pay(checkout)
    world.payments.releaseReversed()
    await world.drain()

    expect(await readEnrolment(hold)).toMatchObject({ state: 'confirmed', payment: 'paid' })
  })
})

describe('a hold lapses', () => {
  it.each([
    { when: 'a millisecond before its end', ms: -2, state: 'held' },
    { when: 'at its end', ms: -1, state: 'held' },
    { when: 'a millisecond after its end', ms: 0, state: 'cancelled' },
  ])('$when it is $state', async ({ ms, state }) => {
    const hold = await holdRun(world)
    const checkout = await startPaying(hold)
    world.clock.moveTo(new Date(justAfter(hold).getTime() + ms))
    await world.sweep()
    // Told too early, the listener looks at the clock itself.
    await tellAgain(world, hold.academy, 'hold.lapsed', { enrolmentId: hold.held.id })

    expect((await readEnrolment(hold)).state).toBe(state)
    const isOpen = world.payments.state.checkouts[checkout]?.status === 'open'
    expect(isOpen).toBe(state === 'held')
    const refusal = world.payments.pay(checkout)
    expect(refusal === null).toBe(state === 'held')
    await world.drain()
  })

  it('and is confirmed instead when it was paid in its last moment', async () => {
    const hold = await holdRun(world)
    const checkout = await startPaying(hold)
    world.payments.mute(true)
    world.payments.pay(checkout)
    world.payments.mute(false)
    world.clock.moveTo(justAfter(hold))
    await world.sweep()

    expect(await readEnrolment(hold)).toMatchObject({ state: 'confirmed', payment: 'paid' })
    expect(await readBooks(world, hold.academy.slug)).toEqual(SOLD_ONCE)
  })

  it('and keeps its place while the provider does not answer', async () => {
    const hold = await holdRun(world)
    const checkout = await startPaying(hold)
    world.payments.failNext({ status: 500, count: 1 })
    world.clock.moveTo(justAfter(hold))
    await world.sweep()
    expect((await readEnrolment(hold)).state).toBe('held')
    expect(world.takeErrors()).toHaveLength(1)

    world.clock.moveBy(10_000)
    await world.sweep()
    expect((await readEnrolment(hold)).state).toBe('cancelled')
    expect(world.payments.state.checkouts[checkout]?.status).toBe('expired')
  })
})
