import { expect, it } from 'vitest'
import { openAcademy, publishClinic, signUp, takePlace } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

it('settles a payment once that it asked about before it was told of it', async () => {
  const academy = await openAcademy(world)
  await world.drain()
  const golfer = await signUp(world)
  const enrolment = await takePlace(golfer, academy, { clinic: academy.clinic })
  const params = { academy: academy.slug, enrolmentId: enrolment.id }
  const { url } = await golfer.person.must('checkout.start', { params })
  world.payments.hold()
  world.payments.pay(new URL(url).pathname.split('/').at(-1) ?? '')

  // A second press finds the page paid on, and settles it.
  const again = await golfer.person.call('checkout.start', { params })
  expect(again.problem?.code).toBe('already-decided')
  world.payments.release()
  await world.drain()

  const { state, payment } = await golfer.person.must('enrolments.read', { params })
  expect({ state, payment }).toEqual({ state: 'confirmed', payment: 'paid' })
  const card = await academy.owner.person.must('ledger.card', {
    params: { academy: academy.slug, year: '2031' },
  })
  expect(card).toMatchObject({ takenMinor: 24_000, payments: 1, refundedMinor: 0 })
})

it('opens a new page for an offer whose page has ended', async () => {
  const academy = await openAcademy(world, { clinic: { capacity: 1 } })
  const { clinic } = academy
  const [first, second] = [await signUp(world), await signUp(world)]
  const had = await takePlace(first, academy, { clinic })
  const params = { academy: academy.slug }
  const other = await takePlace(second, academy, {
    clinic: await publishOther(academy),
  })
  const body = { clinicId: clinic.id, golferId: other.golfer.id }
  await second.person.must('waitlist.join', { params, body })
  const release = { params: { ...params, enrolmentId: had.id } }
  await first.person.must('enrolments.release', release)
  await world.drain()
  const { enrolments } = await second.person.must('enrolments.mine', { params })
  const offered = enrolments.find(({ isOffer }) => isOffer)
  const offer = { params: { ...params, enrolmentId: offered?.id ?? '' } }

  const { url: before } = await second.person.must('checkout.start', offer)
  expect((await second.person.must('checkout.start', offer)).url).toBe(before)
  world.clock.moveBy(45 * 60_000)
  await world.sweep()
  const { url: after } = await second.person.must('checkout.start', offer)
  expect(after).not.toBe(before)
  expect(world.payments.pay(new URL(after).pathname.split('/').at(-1) ?? '')).toBeNull()
  await world.drain()
  expect((await second.person.must('enrolments.read', offer)).state).toBe('confirmed')
})

const publishOther = (academy: Parameters<typeof publishClinic>[0]) =>
  publishClinic(academy, { startsOnLocal: '2031-04-02', rrule: 'FREQ=WEEKLY;BYDAY=WE;COUNT=2' })
