import { beforeAll, expect, it } from 'vitest'
import type { Sent } from '@marram/contract'
import { openAcademy, pay, signUp, takePlace, type OpenAcademy } from '../support/builders'
import { useWorld } from '../support/use-world'

const world = await useWorld()

let academy: OpenAcademy
let email: string

beforeAll(async () => {
  academy = await openAcademy(world)
  const golfer = await signUp(world)
  email = golfer.account.email
  const held = await takePlace(golfer, academy, { clinic: academy.clinic })
  await pay(world, golfer, { academy, enrolment: held })
})

const params = () => ({ academy: academy.slug })
const lettersOfChanges = () =>
  world.mail.messagesTo(email).filter(({ subject }) => subject.includes('has changed'))

/** The letters that a change of the first session causes. */
async function lettersAfter(body: Sent<'sessions.change', 'body'>) {
  const before = lettersOfChanges().length
  const sessionId = academy.clinic.sessions[0]!.id
  const whole = { ...params(), sessionId }
  await academy.owner.person.must('sessions.change', { params: whole, body })
  await world.drain()
  return lettersOfChanges().slice(before)
}

it('says nothing to golfers when nothing of theirs is another', async () => {
  const same = { startsOnLocal: '2031-04-01', startsAtLocal: '18:00', durationMinutes: 60 }
  const areas = [{ areaId: academy.area.id, fromUnit: 1, toUnit: 6 }]
  expect(await lettersAfter({})).toEqual([])
  expect(await lettersAfter({ capacity: 14 })).toEqual([])
  expect(await lettersAfter({ ...same, coachIds: [academy.coach.id], areas })).toEqual([])
})

it('writes one letter that says how the session stands now', async () => {
  const { owner, venue } = academy
  const later = await lettersAfter({ startsAtLocal: '19:00' })
  expect(later.map(({ text }) => text)).toEqual([expect.stringContaining('19:00')])
  expect(await lettersAfter({ durationMinutes: 75 })).toHaveLength(1)

  const area = await owner.person.must('areas.add', {
    params: { ...params(), venueId: venue.id },
    body: { name: 'Dune Green', kind: 'putting', units: 1, hasLamps: true, isCovered: true },
  })
  const moved = await lettersAfter({ areas: [{ areaId: area.id, fromUnit: 1, toUnit: 1 }] })
  expect(moved.map(({ text }) => text)).toEqual([expect.stringContaining('Dune Green')])

  const body = { name: 'Ines Marlow' }
  const coach = await owner.person.must('coaches.add', { params: params(), body })
  const taken = await lettersAfter({ coachIds: [coach.id] })
  expect(taken.map(({ text }) => text)).toEqual([expect.stringContaining('Ines Marlow')])
})
