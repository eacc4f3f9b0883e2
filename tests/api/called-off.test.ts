import { describe, expect, it } from 'vitest'
import { readBooks } from '../support/books'
import {
  openAcademy,
  pay,
  signUp,
  takePlace,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../support/builders'
import { tellAgain } from '../support/outbox'
import { useWorld } from '../support/use-world'

const world = await useWorld()

const DAY_MS = 24 * 60 * 60_000
/** The second of eight shares of 240.00, of which 27.53 are net and 2.47 tax. */
const OWED = 3_000

interface Evening {
  academy: OpenAcademy
  golfer: SignedUp
  enrolment: EnrolmentView
  sessionId: string
  params: { academy: string; enrolmentId: string }
}

/** A run that is paid by card; its second evening has not been called off yet. */
async function soldRun(): Promise<Evening> {
  const academy = await openAcademy(world)
  const golfer = await signUp(world)
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  const enrolment = await pay(world, golfer, { academy, enrolment: held })
  const sessionId = academy.clinic.sessions[1]!.id
  const params = { academy: academy.slug, enrolmentId: enrolment.id }
  return { academy, golfer, enrolment, sessionId, params }
}

const callOff = ({ academy, sessionId }: Pick<Evening, 'academy' | 'sessionId'>) =>
  academy.owner.person.must('sessions.call-off', {
    params: { academy: academy.slug, sessionId },
    body: { reason: 'Lightning' },
  })

async function calledOff(): Promise<Evening & { placeId: string; chooseBy: Date }> {
  const evening = await soldRun()
  await callOff(evening)
  await world.drain()
  const place = await placeOf(evening)
  return { ...evening, placeId: place.id, chooseBy: new Date(place.owed!.chooseBy) }
}

async function placeOf({ golfer, params, sessionId }: Evening) {
  const { places } = await golfer.person.must('enrolments.read', { params })
  return places.find((place) => place.sessionId === sessionId)!
}

const choose = (
  { golfer, academy, placeId }: Evening & { placeId: string },
  choice: 'credit' | 'money',
) =>
  golfer.person.call('checkout.choose', {
    params: { academy: academy.slug, placeId },
    body: { choice },
  })

const refundsOf = ({ params }: Evening) =>
  Object.values(world.payments.state.refunds).filter(({ payment }) => {
    const { checkout = '' } = world.payments.state.payments[payment] ?? {}
    return world.payments.state.checkouts[checkout]?.cancelUrl?.includes(params.enrolmentId)
  })

describe('a session that is called off', () => {
  it('ends its places, gives the seats back, and leaves the rest of the run alone', async () => {
    const evening = await calledOff()
    const { golfer, academy, params, chooseBy } = evening
    const after = await golfer.person.must('enrolments.read', { params })
    expect(after.state).toBe('confirmed')
    expect(after.places.map(({ state }) => state)).toEqual([
      'confirmed',
      'cancelled',
      ...Array<string>(6).fill('confirmed'),
    ])
    expect(await placeOf(evening)).toMatchObject({
      isCalledOff: true,
      owed: { amountMinor: OWED, choice: null, isSettled: false },
    })
    expect(chooseBy.getTime()).toBe(world.clock.now().getTime() + 7 * DAY_MS)
    const { clinic } = await golfer.person.must('page.clinic', {
      params: { academy: academy.slug, clinic: academy.clinic.slug },
    })
    expect(clinic.sessions[1]).toMatchObject({ state: 'called-off', taken: 0 })
  })

  it('moves no money before the golfer has chosen', async () => {
    const { academy } = await calledOff()
    const { kinds, balances } = await readBooks(world, academy.slug)
    expect(kinds).toEqual({ fees: 1, 'sale-by-card': 1 })
    expect(balances).toMatchObject({ 'deferred-clinics': -22_018, 'tax-owed': -1_982 })
  })

  it('is told to each golfer once, with their calendar, however often it is pressed', async () => {
    const evening = await calledOff()
    const { golfer, academy } = evening
    await callOff(evening)
    await world.drain()
    const mails = world.mail.messagesTo(golfer.account.email)
    const told = mails.filter(({ text }) => text.includes('Lightning'))
    expect(told).toHaveLength(1)
    expect(told[0]?.attachments).toHaveLength(1)
    expect((await readBooks(world, academy.slug)).kinds).toEqual({ fees: 1, 'sale-by-card': 1 })
  })

  it('is owed too when it was only held, and is paid for afterwards', async () => {
    const academy = await openAcademy(world)
    const golfer = await signUp(world)
    const held = await takePlace(golfer, academy, { clinic: academy.clinic })
    const sessionId = academy.clinic.sessions[1]!.id
    await callOff({ academy, sessionId })
    await world.drain()
    const enrolment = await pay(world, golfer, { academy, enrolment: held })

    const place = enrolment.places.find((one) => one.sessionId === sessionId)
    expect(place).toMatchObject({ state: 'cancelled', owed: { amountMinor: OWED } })
  })

  it('is simply no longer owed by who was to pay at the desk', async () => {
    const academy = await openAcademy(world, { clinic: { payMode: 'desk' } })
    const golfer = await signUp(world)
    const held = await takePlace(golfer, academy, { clinic: academy.clinic })
    const params = { academy: academy.slug, enrolmentId: held.id }
    await golfer.person.must('checkout.at-desk', { params })
    const sessionId = academy.clinic.sessions[1]!.id
    await callOff({ academy, sessionId })
    await world.drain()

    const { balances } = await readBooks(world, academy.slug)
    expect(balances['receivable']).toBe(24_000 - OWED)
    expect(await placeOf({ academy, golfer, enrolment: held, sessionId, params })).toMatchObject({
      owed: { choice: 'money', isSettled: true },
    })
  })
})

describe('what is owed', () => {
  it('goes back as money: by the provider, out of deferred and tax', async () => {
    const evening = await calledOff()
    expect((await choose(evening, 'money')).status).toBe(200)
    await world.drain()

    expect(refundsOf(evening)).toMatchObject([{ amount: OWED, status: 'succeeded' }])
    const { kinds, balances } = await readBooks(world, evening.academy.slug)
    expect(kinds).toEqual({ 'called-off-money': 1, fees: 1, 'sale-by-card': 1 })
    expect(balances).toMatchObject({
      'provider-clearing': 23_375 - OWED,
      'deferred-clinics': -22_018 + 2_753,
      'tax-owed': -1_982 + 247,
    })
  })

  it('stays as credit: owed to the golfer instead, without a refund', async () => {
    const evening = await calledOff()
    await choose(evening, 'credit')
    await world.drain()

    expect(refundsOf(evening)).toEqual([])
    const params = { academy: evening.academy.slug }
    const { creditMinor } = await evening.golfer.person.must('enrolments.mine', { params })
    expect(creditMinor).toBe(OWED)
    const { balances } = await readBooks(world, evening.academy.slug)
    expect(balances).toMatchObject({ 'credits-owed': -OWED, 'provider-clearing': 23_375 })
  })

  it('is chosen once: the same again changes nothing, the other is refused', async () => {
    const evening = await calledOff()
    await Promise.all([choose(evening, 'money'), choose(evening, 'money')])
    expect((await choose(evening, 'money')).status).toBe(200)
    expect((await choose(evening, 'credit')).problem?.code).toBe('already-decided')
    await world.drain()
    expect(refundsOf(evening)).toHaveLength(1)
    const { balances } = await readBooks(world, evening.academy.slug)
    expect(balances).not.toHaveProperty('credits-owed')
  })

  it('is nobody else’s to choose', async () => {
    const evening = await calledOff()
    const stranger = await signUp(world)
    expect((await choose({ ...evening, golfer: stranger }, 'money')).status).toBe(404)
    expect((await placeOf(evening)).owed?.choice).toBeNull()
  })

  it.each([
    { when: 'a millisecond before seven days are over', ms: -1, choice: null },
    { when: 'when seven days are over', ms: 0, choice: null },
    { when: 'a millisecond later', ms: 1, choice: 'credit' },
  ])('$when the default has been taken: $choice', async ({ ms, choice }) => {
    const evening = await calledOff()
    world.clock.moveTo(new Date(evening.chooseBy.getTime() + ms))
    await world.sweep()
    // Told too early, the listener looks at the clock itself.
    await tellAgain(world, evening.academy, 'choice.due', { placeId: evening.placeId })

    expect((await placeOf(evening)).owed).toMatchObject({ choice, isSettled: choice !== null })
  })

  it('goes by the academy’s own default, once', async () => {
    const evening = await calledOff()
    await evening.academy.owner.person.must('academies.change', {
      params: { academy: evening.academy.slug },
      body: { owedDefault: 'money' },
    })
    world.clock.moveTo(new Date(evening.chooseBy.getTime() + 1))
    await world.sweep()
    await world.sweep()

    expect(refundsOf(evening)).toMatchObject([{ amount: OWED, status: 'succeeded' }])
    expect((await choose(evening, 'credit')).problem?.code).toBe('already-decided')
  })
})
