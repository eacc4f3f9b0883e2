import { beforeEach, expect, it } from 'vitest'
import {
  joinStaff,
  openAcademy,
  pay,
  publishClinic,
  signUp,
  takePlace,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../support/builders'
import { tellAgain } from '../support/outbox'
import { useWorld } from '../support/use-world'
import { WORLD_BEGINS } from '../support/world'

const world = await useWorld()
beforeEach(() => world.clock.moveTo(WORLD_BEGINS))

const SHARE_MINOR = 3_000
const SEVEN_DAYS_MS = 7 * 86_400_000

interface Evening {
  academy: OpenAcademy
  golfer: SignedUp
  enrolment: EnrolmentView
  sessionId: string
}

/** A golfer has paid for a run of eight, and the third evening is called off for lightning. */
async function callOffEvening(sold: 'run' | 'session' = 'run'): Promise<Evening> {
  const academy = await openAcademy(world, { clinic: { startsOnLocal: '2031-03-11' } })
  const golfer = await signUp(world)
  const { clinic } = academy
  const sessionId = clinic.sessions[2]?.id ?? ''
  const wanted = sold === 'run' ? { clinic } : { clinic, sessionId }
  const held = await takePlace(golfer, academy, wanted)
  const enrolment = await pay(world, golfer, { academy, enrolment: held })
  await callOff(academy, sessionId)
  return { academy, golfer, enrolment, sessionId }
}

async function callOff(academy: OpenAcademy, sessionId: string): Promise<void> {
  const params = { academy: academy.slug, sessionId }
  const body = { reason: 'Lightning' }
  await academy.owner.person.must('sessions.call-off', { params, body })
  await world.drain()
}

const read = ({ academy, golfer, enrolment }: Evening): Promise<EnrolmentView> =>
  golfer.person.must('enrolments.read', {
    params: { academy: academy.slug, enrolmentId: enrolment.id },
  })

async function owedPlace(evening: Evening) {
  const { places } = await read(evening)
  const place = places.find(({ sessionId }) => sessionId === evening.sessionId)
  if (!place?.owed) throw new Error('a called-off session is owed')
  return { ...place, owed: place.owed }
}

async function choose(evening: Evening, choice: 'credit' | 'money') {
  const { academy, golfer } = evening
  const params = { academy: academy.slug, placeId: (await owedPlace(evening)).id }
  const reply = await golfer.person.call('checkout.choose', { params, body: { choice } })
  await world.drain()
  return reply
}

const moneyCard = ({ academy }: Evening) =>
  academy.owner.person.must('ledger.card', { params: { academy: academy.slug, year: '2031' } })

const creditOf = async ({ academy, golfer }: Evening) =>
  (await golfer.person.must('enrolments.mine', { params: { academy: academy.slug } })).creditMinor

const calledOffMails = ({ golfer }: Evening) =>
  world.mail.messagesTo(golfer.account.email).filter(({ subject }) => /called off/.test(subject))

it('owes the share of that one evening, and leaves the rest of the run alone', async () => {
  const evening = await callOffEvening()
  const { state, places } = await read(evening)
  expect(state).toBe('confirmed')
  expect(places.map((place) => place.state)).toEqual(
    [1, 2, 3, 4, 5, 6, 7, 8].map((number) => (number === 3 ? 'cancelled' : 'confirmed')),
  )
  const { owed } = await owedPlace(evening)
  const chooseBy = new Date(world.clock.now().getTime() + SEVEN_DAYS_MS).toISOString()
  expect(owed).toEqual({ amountMinor: SHARE_MINOR, choice: null, chooseBy, isSettled: false })
  // Until it is chosen nothing moves, and the academy still owes it.
  expect(await moneyCard(evening)).toMatchObject({ refundedMinor: 0, creditsOwedMinor: 0 })
})

it('gives the money back to the card, once, when the golfer wants that', async () => {
  const evening = await callOffEvening()
  expect((await choose(evening, 'money')).status).toBe(200)
  expect((await choose(evening, 'money')).status).toBe(200)

  const card = await moneyCard(evening)
  expect(card).toMatchObject({ refundedMinor: SHARE_MINOR, refunds: 1, creditsOwedMinor: 0 })
  const [payment] = Object.values(world.payments.state.payments).slice(-1)
  expect(payment?.refunded).toBe(SHARE_MINOR)
  expect((await owedPlace(evening)).owed).toMatchObject({ choice: 'money', isSettled: true })
})

it('keeps it as credit, once, and not both', async () => {
  const evening = await callOffEvening()
  expect((await choose(evening, 'credit')).status).toBe(200)
  expect((await choose(evening, 'credit')).status).toBe(200)
  expect((await choose(evening, 'money')).problem?.code).toBe('already-decided')

  expect(await creditOf(evening)).toBe(SHARE_MINOR)
  const card = await moneyCard(evening)
  expect(card).toMatchObject({ creditsOwedMinor: SHARE_MINOR, refundedMinor: 0 })
})

it.each([
  { moment: 'a millisecond before the seven days are over', offsetMs: -1, isOver: false },
  { moment: 'at the last moment', offsetMs: 0, isOver: false },
  { moment: 'a millisecond later', offsetMs: 1, isOver: true },
])('takes the academy’s own choice only afterwards: $moment', async ({ offsetMs, isOver }) => {
  const evening = await callOffEvening()
  const { id: placeId, owed } = await owedPlace(evening)
  world.clock.moveTo(new Date(Date.parse(owed.chooseBy) + offsetMs))
  await world.sweep()
  // Told of it, too early or once more, the listener looks at the time itself.
  await tellAgain(world, evening.academy, 'choice.due', { placeId })
  const choice = isOver ? 'credit' : null
  expect((await owedPlace(evening)).owed).toMatchObject({ choice, isSettled: isOver })

  const reply = await choose(evening, 'money')
  expect(reply.problem?.code).toBe(isOver ? 'already-decided' : undefined)
  expect(await creditOf(evening)).toBe(isOver ? SHARE_MINOR : 0)
})

it('refuses a choice that comes too late, even before the default was carried out', async () => {
  const evening = await callOffEvening()
  const { owed } = await owedPlace(evening)
  world.clock.moveTo(new Date(Date.parse(owed.chooseBy) + 1))
  expect((await choose(evening, 'money')).problem?.code).toBe('already-decided')
  await world.sweep()
  expect(await creditOf(evening)).toBe(SHARE_MINOR)
})

it('gives money back by itself where that is the academy’s choice', async () => {
  const evening = await callOffEvening()
  const params = { academy: evening.academy.slug }
  const body = { owedDefault: 'money' } as const
  await evening.academy.owner.person.must('academies.change', { params, body })
  world.clock.moveBy(SEVEN_DAYS_MS + 1)
  await world.sweep()
  expect(await moneyCard(evening)).toMatchObject({ refundedMinor: SHARE_MINOR, refunds: 1 })
})

it('writes one mail to each golfer, however often it is told', async () => {
  const evening = await callOffEvening()
  const { sessionId } = evening
  await callOff(evening.academy, sessionId)
  await tellAgain(world, evening.academy, 'session.called-off', { sessionId })
  await tellAgain(world, evening.academy, 'session.owed', { sessionId })

  expect(calledOffMails(evening)).toHaveLength(1)
  expect(calledOffMails(evening)[0]?.text).toContain('€30.00 is yours')
  const { id: placeId } = await choose(evening, 'money').then(() => owedPlace(evening))
  await tellAgain(world, evening.academy, 'choice.due', { placeId })
  await tellAgain(world, evening.academy, 'session.called-off', { sessionId })
  expect(calledOffMails(evening)).toHaveLength(1)
  expect(await moneyCard(evening)).toMatchObject({ refundedMinor: SHARE_MINOR, refunds: 1 })
})

it('ends a place that was for this evening only', async () => {
  const evening = await callOffEvening('session')
  expect(await read(evening)).toMatchObject({ state: 'cancelled', endedBecause: 'called-off' })
  const type = calledOffMails(evening)[0]?.attachments[0]?.type
  expect(type).toContain('method=CANCEL')
  expect((await owedPlace(evening)).owed.amountMinor).toBe(3_500)
})

it('asks for no more money where nothing was paid yet', async () => {
  const academy = await openAcademy(world)
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  const params = { academy: academy.slug, enrolmentId: held.id }
  const enrolment = await golfer.person.must('checkout.at-desk', { params })
  const sessionId = academy.clinic.sessions[0]?.id ?? ''
  await callOff(academy, sessionId)
  const evening = { academy, golfer, enrolment, sessionId }
  expect(await moneyCard(evening)).toMatchObject({ owedAtDeskMinor: 21_000, refundedMinor: 0 })
  const takeCash = (amountMinor: number) =>
    academy.owner.person.call('checkout.take-cash', { params, body: { amountMinor } })
  expect((await takeCash(21_001)).problem?.code).toBe('invalid-fields')
  expect((await takeCash(21_000)).answer.payment).toBe('paid')
})

it('has no register', async () => {
  const { academy, sessionId, enrolment } = await callOffEvening()
  const params = { academy: academy.slug, sessionId }
  world.clock.moveTo(new Date(academy.clinic.sessions[2]?.startsAt ?? ''))
  const { person } = academy.owner
  const closed = await person.call('register.close', { params, body: { revision: 0 } })
  expect(closed.problem?.code).toBe('already-decided')
  const placeId = enrolment.places[2]?.id ?? ''
  const body = { mark: 'present' } as const
  const marked = await person.call('register.mark', { params: { ...params, placeId }, body })
  expect(marked.problem?.code).toBe('already-decided')
})

it('frees its coach and its bays for something else', async () => {
  const academy = await openAcademy(world)
  const again = () =>
    publishClinic(academy, { startsOnLocal: '2031-04-15', rrule: 'FREQ=WEEKLY;COUNT=1' })
  await expect(again()).rejects.toThrow('clash')
  await callOff(academy, academy.clinic.sessions[2]?.id ?? '')
  expect((await again()).sessions).toHaveLength(1)
})

it('is not for a coach of other sessions, nor for a golfer', async () => {
  const { academy, golfer } = await callOffEvening()
  const other = await joinStaff(world, academy, { role: 'coach' })
  const params = { academy: academy.slug, sessionId: academy.clinic.sessions[4]?.id ?? '' }
  for (const { person } of [other, golfer]) {
    const reply = await person.call('sessions.call-off', { params, body: { reason: 'Fog' } })
    expect(reply.problem?.code).toBe('not-allowed')
  }
})
