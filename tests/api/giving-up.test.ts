import { beforeEach, describe, expect, it } from 'vitest'
import {
  joinStaff,
  openAcademy,
  pay,
  signUp,
  takePlace,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../support/builders'
import { useWorld } from '../support/use-world'
import { WORLD_BEGINS } from '../support/world'

const world = await useWorld()
beforeEach(() => world.clock.moveTo(WORLD_BEGINS))

const HOUR_MS = 3_600_000
const DROP_IN_MINOR = 3_500

interface Taken {
  academy: OpenAcademy
  golfer: SignedUp
  enrolment: EnrolmentView
}

/** A place in the first of eight evenings, or in all of them, paid by card or promised. */
async function take(how: { isRun?: boolean; isAtDesk?: boolean } = {}): Promise<Taken> {
  const academy = await openAcademy(world, { clinic: { startsOnLocal: '2031-03-11' } })
  const golfer = await signUp(world)
  const { clinic } = academy
  const sessionId = clinic.sessions[0]?.id ?? ''
  const held = await takePlace(golfer, academy, how.isRun ? { clinic } : { clinic, sessionId })
  const params = { academy: academy.slug, enrolmentId: held.id }
  const enrolment = how.isAtDesk
    ? await golfer.person.must('checkout.at-desk', { params })
    : await pay(world, golfer, { academy, enrolment: held })
  return { academy, golfer, enrolment }
}

const paramsOf = ({ academy, enrolment }: Taken) => ({
  academy: academy.slug,
  enrolmentId: enrolment.id,
})

const quote = (taken: Taken) =>
  taken.golfer.person.call('checkout.quote-giving-up', { params: paramsOf(taken) })

async function giveUp(taken: Taken, refundMinor: number) {
  const params = paramsOf(taken)
  const reply = await taken.golfer.person.call('checkout.give-up', {
    params,
    body: { refundMinor },
  })
  await world.drain()
  return reply
}

const takeCash = (taken: Taken, amountMinor: number) =>
  taken.academy.owner.person.call('checkout.take-cash', {
    params: paramsOf(taken),
    body: { amountMinor },
  })

const moneyCard = ({ academy }: Taken) =>
  academy.owner.person.must('ledger.card', { params: { academy: academy.slug, year: '2031' } })

function moveToNotice({ enrolment }: Taken, noticeMs: number): void {
  const startsAt = Date.parse(enrolment.places[0]?.startsAt ?? '')
  world.clock.moveTo(new Date(startsAt - noticeMs))
}

describe('the policy', () => {
  it.each([
    { notice: 'more than two days', ms: 48 * HOUR_MS + 1, backMinor: DROP_IN_MINOR },
    { notice: 'two days', ms: 48 * HOUR_MS, backMinor: DROP_IN_MINOR },
    { notice: 'a millisecond less', ms: 48 * HOUR_MS - 1, backMinor: DROP_IN_MINOR / 2 },
    { notice: 'a day', ms: 24 * HOUR_MS, backMinor: DROP_IN_MINOR / 2 },
    { notice: 'a millisecond less than that', ms: 24 * HOUR_MS - 1, backMinor: 0 },
    { notice: 'a millisecond', ms: 1, backMinor: 0 },
  ])('gives back $backMinor with a notice of $notice, as it was shown', async (given) => {
    const taken = await take()
    moveToNotice(taken, given.ms)
    const { answer } = await quote(taken)
    expect(answer).toMatchObject({ paidMinor: DROP_IN_MINOR, refundMinor: given.backMinor })
    const { answer: ended } = await giveUp(taken, answer.refundMinor)

    expect(ended).toMatchObject({ state: 'cancelled', endedBecause: 'given-up' })
    const card = await moneyCard(taken)
    expect(card.refundedMinor).toBe(given.backMinor)
    const [payment] = Object.values(world.payments.state.payments).slice(-1)
    expect(payment?.refunded).toBe(given.backMinor)
    const kept = (card.lateCancellations[2] ?? 0) + (card.taxOwed[2] ?? 0)
    expect(kept).toBe(DROP_IN_MINOR - given.backMinor)
    expect(card.toEarnMinor).toBe(0)
  })

  it('gives nothing up once the session has begun', async () => {
    const taken = await take()
    moveToNotice(taken, 0)
    expect((await quote(taken)).problem?.code).toBe('already-decided')
    expect((await giveUp(taken, 0)).problem?.code).toBe('already-decided')
  })

  it('goes by each session of a run on its own', async () => {
    const taken = await take({ isRun: true })
    moveToNotice(taken, 30 * HOUR_MS)
    const { answer } = await quote(taken)
    // Half of the first evening, and the other seven whole.
    expect(answer).toMatchObject({ places: 8, refundMinor: 1_500 + 7 * 3_000 })
    await giveUp(taken, answer.refundMinor)
    expect((await moneyCard(taken)).refundedMinor).toBe(22_500)
  })
})

it('refuses an amount that is not the one of this moment, and says which is', async () => {
  const taken = await take()
  moveToNotice(taken, 48 * HOUR_MS)
  const { refundMinor } = (await quote(taken)).answer
  world.clock.moveBy(1)
  const reply = await giveUp(taken, refundMinor)
  expect(reply.problem).toMatchObject({ code: 'changed-meanwhile' })
  expect(reply.problem?.detail).toContain('€17.50')
  expect((await moneyCard(taken)).refundedMinor).toBe(0)
  expect((await giveUp(taken, 1_750)).status).toBe(200)
})

it('is done once', async () => {
  const taken = await take()
  const replies = await Promise.all([giveUp(taken, DROP_IN_MINOR), giveUp(taken, DROP_IN_MINOR)])
  expect(replies.map(({ status }) => status).sort()).toEqual([200, 409])
  expect(await moneyCard(taken)).toMatchObject({ refundedMinor: DROP_IN_MINOR, refunds: 1 })
})

it('is done by the desk for a golfer, and by no other golfer', async () => {
  const taken = await take()
  const params = paramsOf(taken)
  const body = { refundMinor: DROP_IN_MINOR }
  const stranger = await signUp(world)
  await takePlace(stranger, taken.academy, { clinic: taken.academy.clinic })
  const theirs = await stranger.person.call('checkout.give-up', { params, body })
  expect(theirs.problem?.code).toBe('not-found')
  const asStaff = await stranger.person.call('checkout.give-up-for', { params, body })
  expect(asStaff.problem?.code).toBe('not-allowed')

  const desk = await joinStaff(world, taken.academy, { role: 'desk' })
  const shown = await desk.person.must('checkout.quote-giving-up-for', { params })
  expect(shown.refundMinor).toBe(DROP_IN_MINOR)
  const ended = await desk.person.must('checkout.give-up-for', { params, body })
  expect(ended.state).toBe('cancelled')
})

describe('at the desk', () => {
  it('gives cash back as cash', async () => {
    const taken = await take({ isAtDesk: true })
    await takeCash(taken, DROP_IN_MINOR)
    const { answer } = await quote(taken)
    expect(answer).toMatchObject({ refundMinor: DROP_IN_MINOR, comesBackAs: 'cash' })
    await giveUp(taken, DROP_IN_MINOR)
    const card = await moneyCard(taken)
    expect(card).toMatchObject({ refundedMinor: DROP_IN_MINOR, providerBalanceMinor: 0 })
  })

  it('gives back no more than was paid, and asks for no more', async () => {
    const taken = await take({ isAtDesk: true })
    await takeCash(taken, 1_000)
    const { answer } = await quote(taken)
    expect(answer).toMatchObject({ paidMinor: 1_000, refundMinor: 1_000, comesBackAs: 'cash' })
    await giveUp(taken, 1_000)
    expect(await moneyCard(taken)).toMatchObject({ refundedMinor: 1_000, owedAtDeskMinor: 0 })
    expect((await takeCash(taken, 1)).problem?.code).toBe('invalid-fields')
  })

  it('still asks for what the policy keeps', async () => {
    const taken = await take({ isAtDesk: true })
    moveToNotice(taken, 30 * HOUR_MS)
    const { answer } = await quote(taken)
    expect(answer).toMatchObject({ paidMinor: 0, refundMinor: 0, comesBackAs: 'nothing' })
    await giveUp(taken, 0)
    expect(await moneyCard(taken)).toMatchObject({ owedAtDeskMinor: 1_750, refundedMinor: 0 })
    expect((await takeCash(taken, 1_751)).problem?.code).toBe('invalid-fields')
    expect((await takeCash(taken, 1_750)).status).toBe(200)
  })
})
