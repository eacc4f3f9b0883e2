import { beforeEach, describe, expect, it } from 'vitest'
import { readBooks } from '../support/books'
import { openAcademy, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'
import { WORLD_BEGINS } from '../support/world'
import {
  holdRun,
  justAfter,
  openStrayPage,
  readEnrolment,
  startPaying,
  type Hold,
} from './payment/paying'

const world = await useWorld()

/** The provider's test card whose refunds fail. */
const REFUND_FAILS = '4000000000005126'

/** A hold of the clinic's only place that lapsed while a payment page of its order stayed open. */
async function lapsedWithPage(
  given: { minutesAhead?: number } = {},
): Promise<{ hold: Hold; page: string }> {
  const academy = await openAcademy(world, { clinic: { capacity: 1 } })
  const [first] = academy.clinic.sessions
  const { minutesAhead } = given
  if (minutesAhead) {
    world.clock.moveTo(new Date(Date.parse(first!.startsAt) - minutesAhead * 60_000))
  }
  const hold = await holdRun(world, { academy })
  await startPaying(hold)
  const page = await openStrayPage(world, hold)
  world.clock.moveTo(justAfter(hold))
  await world.sweep()
  expect(await readEnrolment(hold)).toMatchObject({ state: 'cancelled', endedBecause: 'lapsed' })
  return { hold, page }
}

beforeEach(() => world.clock.moveTo(WORLD_BEGINS))

const refundsAtProvider = (page: string) => {
  const { payment = null } = world.payments.state.checkouts[page] ?? {}
  return Object.values(world.payments.state.refunds).filter((refund) => refund.payment === payment)
}

describe('a payment that comes when the hold has lapsed', () => {
  it('takes the place again while it is free', async () => {
    const { hold, page } = await lapsedWithPage()
    world.payments.pay(page)
    await world.drain()

    const again = await readEnrolment(hold)
    expect(again).toMatchObject({ state: 'confirmed', payment: 'paid', endedBecause: null })
    expect(again.places.every(({ state }) => state === 'confirmed')).toBe(true)
    expect(refundsAtProvider(page)).toEqual([])
    const { kinds, balances } = await readBooks(world, hold.academy.slug)
    expect(kinds).toEqual({ fees: 1, 'sale-by-card': 1 })
    expect(balances).toMatchObject({ 'deferred-clinics': -22_018, 'tax-owed': -1_982 })
  })

  it('goes back by itself when somebody else has the place', async () => {
    const { hold, page } = await lapsedWithPage()
    const other = await signUp(world)
    const theirs = await takePlace(other, hold.academy, { clinic: hold.academy.clinic })
    world.payments.pay(page)
    await world.drain()

    expect((await readEnrolment(hold)).state).toBe('cancelled')
    expect(theirs.state).toBe('held')
    expect(refundsAtProvider(page)).toMatchObject([{ amount: 24_000, status: 'succeeded' }])
    const { kinds, balances } = await readBooks(world, hold.academy.slug)
    expect(kinds).toEqual({ fees: 1, 'unplaced-payment': 1, 'unplaced-refund': 1 })
    // Nothing is owed to anybody; what is gone are the fees, which the academy bears.
    expect(balances).toEqual({
      'provider-clearing': -625,
      'provider-fees': 385,
      'platform-fees': 240,
    })
  })

  it('goes back once, however often it is told', async () => {
    const { hold, page } = await lapsedWithPage()
    await takePlace(await signUp(world), hold.academy, { clinic: hold.academy.clinic })
    world.payments.hold()
    world.payments.pay(page)
    world.payments.duplicateNext(10)
    world.payments.releaseReversed()
    await world.drain()
    world.clock.moveBy(60 * 60_000)
    await world.sweep()

    expect(refundsAtProvider(page)).toHaveLength(1)
    expect((await readBooks(world, hold.academy.slug)).kinds).toMatchObject({
      'unplaced-payment': 1,
      'unplaced-refund': 1,
    })
  })

  it('goes back by itself when the first session has begun', async () => {
    const { hold, page } = await lapsedWithPage({ minutesAhead: 30 })
    world.clock.moveTo(new Date(hold.academy.clinic.sessions[0]!.startsAt))
    world.payments.pay(page)
    await world.drain()

    expect((await readEnrolment(hold)).state).toBe('cancelled')
    expect(refundsAtProvider(page)).toMatchObject([{ amount: 24_000, status: 'succeeded' }])
  })

  it('is owed back once when the provider cannot give it back, and its answer was lost', async () => {
    const { hold, page } = await lapsedWithPage()
    await takePlace(await signUp(world), hold.academy, { clinic: hold.academy.clinic })
    world.payments.loseNextAnswers(2)
    world.payments.pay(page, REFUND_FAILS)
    await world.drain()
    expect(world.takeErrors()).toHaveLength(1)
    // It fails a little later, and that is the first we hear of it.
    world.clock.moveBy(2_000)
    world.payments.advanceClock(0)
    await world.drain()

    expect(refundsAtProvider(page)).toMatchObject([{ status: 'failed' }])
    const { balances } = await readBooks(world, hold.academy.slug)
    expect(balances['refunds-due']).toBe(-24_000)
    expect(balances['provider-clearing']).toBe(24_000 - 625)
  })

  it('goes back once when the answer to it was lost', async () => {
    const { hold, page } = await lapsedWithPage()
    await takePlace(await signUp(world), hold.academy, { clinic: hold.academy.clinic })
    // The refund is made both times it is asked for; neither answer arrives.
    world.payments.loseNextAnswers(2)
    world.payments.pay(page)
    await world.drain()
    expect(world.takeErrors()).toHaveLength(1)

    world.clock.moveBy(11 * 60_000)
    await world.sweep()
    expect(refundsAtProvider(page)).toHaveLength(1)
    const { balances } = await readBooks(world, hold.academy.slug)
    expect(balances).not.toHaveProperty('refunds-due')
  })
})

it('pays once when two pages of one order are paid', async () => {
  const hold = await holdRun(world)
  const first = await startPaying(hold)
  const second = await openStrayPage(world, hold)
  world.payments.pay(first)
  world.payments.pay(second)
  await world.drain()

  expect(await readEnrolment(hold)).toMatchObject({ state: 'confirmed', payment: 'paid' })
  const refunds = [...refundsAtProvider(first), ...refundsAtProvider(second)]
  expect(refunds).toMatchObject([{ amount: 24_000, status: 'succeeded' }])
  const { balances } = await readBooks(world, hold.academy.slug)
  expect(balances).toMatchObject({ 'deferred-clinics': -22_018, 'tax-owed': -1_982 })
  expect(balances).not.toHaveProperty('refunds-due')
})
