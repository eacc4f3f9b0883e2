import { beforeAll, describe, expect, it } from 'vitest'
import { openAcademy, type OpenAcademy, type SignedUp } from '../support/builders'
import { useWorld } from '../support/use-world'
import {
  GOLFERS,
  PLACES,
  gatherGolfers,
  hotClinic,
  readSeats,
  rushFor,
  wrongSeats,
  type Rush,
} from './hot-clinic/rush'

const ROUNDS = Array.from({ length: 10 }, (_, round) => round)

/** Enough connections for requests to meet each other in the database. */
const world = await useWorld({ poolSize: 8 })
let academy: OpenAcademy
let golfers: SignedUp[]

beforeAll(async () => {
  academy = await openAcademy(world)
  golfers = await gatherGolfers(world, GOLFERS)
}, 120_000)

async function payAll({ held }: Rush): Promise<void> {
  for (const { golfer, enrolment } of held) {
    const params = { academy: academy.slug, enrolmentId: enrolment.id }
    const { url } = await golfer.person.must('checkout.start', { params })
    expect(world.payments.pay(new URL(url).pathname.split('/').at(-1) ?? '')).toBeNull()
  }
  await world.drain()
}

describe('two hundred golfers after twelve places at the same moment', () => {
  it.each(ROUNDS)(
    'round %i: twelve get one, the others hear at once',
    async (round) => {
      const clinic = await hotClinic(academy, { round })
      const rush = await rushFor(academy, clinic, golfers)

      expect(rush.held).toHaveLength(PLACES)
      expect(new Set(rush.refused.map(({ code }) => code))).toEqual(new Set(['session-full']))
      expect(rush.refused[0]?.detail).toContain('waitlist')
      expect(await readSeats(world, clinic)).toEqual(
        Array(4).fill({
          capacity: PLACES,
          held: PLACES,
          confirmed: 0,
          placesHeld: PLACES,
          placesConfirmed: 0,
        }),
      )

      await payAll(rush)
      for (const { golfer, enrolment } of rush.held) {
        const params = { academy: academy.slug, enrolmentId: enrolment.id }
        const paid = await golfer.person.must('enrolments.read', { params })
        expect(paid).toMatchObject({ state: 'confirmed', payment: 'paid' })
      }
      const seats = await readSeats(world, clinic)
      expect(wrongSeats(seats)).toBeNull()
      expect(seats.map(({ confirmed }) => confirmed)).toEqual(Array(4).fill(PLACES))
    },
    120_000,
  )
})

it('puts who came too late on the waitlist, each at a place of their own', async () => {
  const regulars = golfers.slice(0, 30)
  const roomy = await hotClinic(academy, { round: 10, capacity: 30 })
  await rushFor(academy, roomy, regulars)
  const clinic = await hotClinic(academy, { round: 11 })
  const { refused } = await rushFor(academy, clinic, regulars)
  const params = { academy: academy.slug }
  await Promise.all(
    refused.map(async ({ golfer }) => {
      const { golfers: mine } = await golfer.person.must('golfers.mine', { params })
      const body = { clinicId: clinic.id, golferId: mine[0]!.id }
      await golfer.person.must('waitlist.join', { params, body })
    }),
  )

  const { waitlist } = await academy.owner.person.must('enrolments.of-clinic', {
    params: { ...params, clinicId: clinic.id },
  })
  expect(refused).toHaveLength(30 - PLACES)
  expect(waitlist.map(({ position }) => position)).toEqual(refused.map((_, index) => index + 1))
}, 120_000)
