import { describe, expect, it } from 'vitest'
import { asSuperuser, readBooks } from '../support/books'
import { openAcademy } from '../support/builders'
import { useWorld } from '../support/use-world'
import { holdRun, startPaying, type Hold } from './payment/paying'

const world = await useWorld()

const HOUR_MS = 60 * 60_000
/** The provider's test cards: refunds pend; the holder complains to the bank. */
const PENDS = '4000000000007726'
const CHARGED_BACK = '4000000000000259'

/** A single session for 35.00 that was paid by this card, two days before it begins. */
async function paidBy(card: string): Promise<Hold> {
  const academy = await openAcademy(world, { clinic: { rrule: 'FREQ=WEEKLY;COUNT=1' } })
  const [session] = academy.clinic.sessions
  world.clock.moveTo(new Date(Date.parse(session!.startsAt) - 30 * HOUR_MS))
  const hold = await holdRun(world, { academy })
  world.payments.pay(await startPaying(hold), card)
  await world.drain()
  return hold
}

/** Gives up for what the policy gives back at this notice: the half. */
async function giveUp({ golfer, params }: Hold): Promise<number> {
  const { refundMinor } = await golfer.person.must('checkout.quote-giving-up', { params })
  await golfer.person.must('checkout.give-up', { params, body: { refundMinor } })
  await world.drain()
  return refundMinor
}

const refundsOf = ({ held }: Hold) =>
  asSuperuser(world, async (db) => {
    const { rows } = await db.raw<{ rows: { state: string; amountMinor: number }[] }>(
      `SELECT f.state, f.amount_minor FROM refunds f
       JOIN orders o ON o.academy_id = f.academy_id AND o.id = f.order_id
       WHERE o.enrolment_id = ?`,
      [held.id],
    )
    return rows
  })

describe('a refund', () => {
  it('that pends is asked after, and never begun again', async () => {
    const hold = await paidBy(PENDS)
    // Nothing that the provider tells us arrives.
    world.payments.hold()
    const amountMinor = await giveUp(hold)
    expect(amountMinor).toBe(12_000)
    expect(await refundsOf(hold)).toEqual([{ state: 'asked', amountMinor }])

    // By now the provider has forgotten that it was ever asked.
    world.clock.moveBy(26 * HOUR_MS)
    await world.sweep()
    expect(await refundsOf(hold)).toEqual([{ state: 'done', amountMinor }])
    const { checkoutId } = await orderOf(hold)
    const { payment = null } = world.payments.state.checkouts[checkoutId] ?? {}
    const made = Object.values(world.payments.state.refunds).filter((r) => r.payment === payment)
    expect(made).toHaveLength(1)
    world.payments.releaseReversed()
    await world.drain()
  })

  it('of what was charged back fails once, and is owed', async () => {
    const hold = await paidBy(CHARGED_BACK)
    world.clock.moveBy(2_000)
    world.payments.advanceClock(0)
    await world.drain()
    const amountMinor = await giveUp(hold)
    expect(await refundsOf(hold)).toEqual([{ state: 'failed', amountMinor }])
    world.clock.moveBy(26 * HOUR_MS)
    await world.sweep()
    const { balances } = await readBooks(world, hold.academy.slug)
    expect(balances['refunds-due']).toBe(-amountMinor)
  })
})

function orderOf({ held }: Hold) {
  return asSuperuser(world, async (db) => {
    const { rows } = await db.raw<{ rows: { checkoutId: string }[] }>(
      'SELECT checkout_id FROM orders WHERE enrolment_id = ?',
      [held.id],
    )
    return rows[0]!
  })
}
