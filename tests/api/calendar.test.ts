import { beforeEach, describe, expect, it } from 'vitest'
import {
  openAcademy,
  pay,
  signUp,
  takePlace,
  type EnrolmentView,
  type OpenAcademy,
  type SignedUp,
} from '../support/builders'
import { calendarPart, readWithIcalendar, readWithIcalJs } from '../support/calendar'
import { useWorld } from '../support/use-world'
import { WORLD_BEGINS } from '../support/world'

const world = await useWorld()
beforeEach(() => world.clock.moveTo(WORLD_BEGINS))

interface Taken {
  academy: OpenAcademy
  golfer: SignedUp
  enrolment: EnrolmentView
}

/** A run of four Tuesdays at 18:00 in Dublin, or one of its evenings, taken and paid. */
async function take(startsOnLocal: string, at?: number): Promise<Taken> {
  const academy = await openAcademy(world, {
    clinic: {
      title: 'Wedges to a number, from ninety metres to the fringe, in wind and out of it',
      summary: 'Drei Längen, auf die Verlass ist; with a word or two of Gaeilge: fáilte romhat.',
      startsOnLocal,
      rrule: 'FREQ=WEEKLY;BYDAY=TU;COUNT=4',
    },
  })
  const golfer = await signUp(world, { name: 'Síle Ní Mhaoláin' })
  const { clinic } = academy
  const session = at === undefined ? undefined : clinic.sessions[at]
  const wanted = session ? { clinic, sessionId: session.id } : { clinic }
  const held = await takePlace(golfer, academy, wanted)
  const enrolment = await pay(world, golfer, { academy, enrolment: held })
  return { academy, golfer, enrolment }
}

/** The newest calendar part that a golfer has, as two programs read it, which agree. */
function newestCalendar({ golfer }: Taken) {
  const letter = world.mail
    .messagesTo(golfer.account.email)
    .filter(({ attachments }) => attachments.length > 0)
    .at(-1)
  if (!letter) throw new Error('the golfer has a letter with a calendar part')
  const { method, text } = calendarPart(letter)
  for (const line of text.split('\r\n')) {
    expect(Buffer.byteLength(line, 'utf8'), line).toBeLessThanOrEqual(75)
    expect(line, 'lines end in CR LF only').not.toMatch(/[\r\n]/)
  }
  const read = readWithIcalJs(text)
  expect(readWithIcalendar(text)).toEqual(read)
  expect(read.method).toBe(method)
  expect(read.organizers).toEqual([`mailto:${letter.fromEmail}`])
  expect(read.zones).toEqual(['Europe/Dublin'])
  return read
}

const move = async ({ academy }: Taken, at: number, change: { startsAtLocal: string }) => {
  const sessionId = academy.clinic.sessions[at]?.id ?? ''
  const params = { academy: academy.slug, sessionId }
  await academy.owner.person.must('sessions.change', { params, body: change })
  await world.drain()
}

const callOff = async ({ academy }: Taken, at: number) => {
  const sessionId = academy.clinic.sessions[at]?.id ?? ''
  const params = { academy: academy.slug, sessionId }
  await academy.owner.person.must('sessions.call-off', { params, body: { reason: 'Fog' } })
  await world.drain()
}

const giveUp = async ({ academy, golfer, enrolment }: Taken) => {
  const params = { academy: academy.slug, enrolmentId: enrolment.id }
  const { refundMinor } = await golfer.person.must('checkout.quote-giving-up', { params })
  await golfer.person.must('checkout.give-up', { params, body: { refundMinor } })
  await world.drain()
}

const SPRING = [
  '2031-03-18T18:00:00.000Z',
  '2031-03-25T18:00:00.000Z',
  '2031-04-01T17:00:00.000Z',
  '2031-04-08T17:00:00.000Z',
]
const AUTUMN = [
  '2031-10-14T17:00:00.000Z',
  '2031-10-21T17:00:00.000Z',
  '2031-10-28T18:00:00.000Z',
  '2031-11-04T18:00:00.000Z',
]

describe('the entry of a run', () => {
  it.each([
    { season: 'spring', startsOnLocal: '2031-03-18', starts: SPRING },
    { season: 'autumn', startsOnLocal: '2031-10-14', starts: AUTUMN },
  ])('is at 18:00 on both sides of the clock change in $season', async (given) => {
    const taken = await take(given.startsOnLocal)
    const { starts, method, sequences, statuses, uids } = newestCalendar(taken)
    expect(starts).toEqual(given.starts)
    expect(starts).toEqual(taken.enrolment.places.map(({ startsAt }) => startsAt))
    expect({ method, sequences, statuses }).toEqual({
      method: 'REQUEST',
      sequences: [0],
      statuses: ['CONFIRMED'],
    })
    expect(uids).toEqual([expect.stringContaining(taken.enrolment.id)])
  })

  it('stays one entry from the confirmation to the end, and each word of it is newer', async () => {
    const taken = await take('2031-03-18')
    const seen = [newestCalendar(taken)]
    await move(taken, 2, { startsAtLocal: '19:30' })
    seen.push(newestCalendar(taken))
    await callOff(taken, 1)
    seen.push(newestCalendar(taken))
    await giveUp(taken)
    seen.push(newestCalendar(taken))

    expect(new Set(seen.flatMap(({ uids }) => uids)).size).toBe(1)
    expect(seen.map(({ sequences }) => sequences)).toEqual([[0], [1], [2], [3]])
    expect(seen.map(({ method }) => method)).toEqual(['REQUEST', 'REQUEST', 'REQUEST', 'CANCEL'])
    expect(seen.at(-1)?.statuses).toEqual(['CANCELLED'])
  })

  it('overrides the session that was moved, and that one only', async () => {
    const taken = await take('2031-03-18')
    await move(taken, 2, { startsAtLocal: '19:30' })
    const { starts, overrides } = newestCalendar(taken)
    const [first, second, third = '', fourth] = SPRING
    const moved = '2031-04-01T18:30:00.000Z'
    expect(overrides).toEqual([[third, moved]])
    expect(starts).toEqual([first, second, moved, fourth])

    await move(taken, 2, { startsAtLocal: '18:00' })
    expect(newestCalendar(taken)).toMatchObject({ starts: SPRING, overrides: [], sequences: [2] })
  })

  it.each([0, 1, 3])('leaves out the session that was called off, number %i', async (at) => {
    const taken = await take('2031-03-18')
    await callOff(taken, at)
    const { starts, method } = newestCalendar(taken)
    expect(method).toBe('REQUEST')
    expect(starts).toEqual(SPRING.filter((_, index) => index !== at))
  })

  it('begins with the first session still to come for somebody who joins late', async () => {
    world.clock.moveTo(new Date('2031-03-03T09:00:00Z'))
    const academy = await openAcademy(world, {
      clinic: { startsOnLocal: '2031-03-18', rrule: 'FREQ=WEEKLY;BYDAY=TU;COUNT=4' },
    })
    world.clock.moveTo(new Date('2031-03-26T12:00:00Z'))
    const golfer = await signUp(world)
    const held = await takePlace(golfer, academy, { clinic: academy.clinic })
    const enrolment = await pay(world, golfer, { academy, enrolment: held })
    expect(newestCalendar({ academy, golfer, enrolment }).starts).toEqual(SPRING.slice(2))
  })
})

describe('the entry of one session', () => {
  it('follows it when it moves, and is cancelled when it is called off', async () => {
    const taken = await take('2031-03-18', 2)
    const before = newestCalendar(taken)
    expect(before).toMatchObject({ method: 'REQUEST', starts: [SPRING[2]], sequences: [0] })
    await move(taken, 2, { startsAtLocal: '17:15' })
    const moved = newestCalendar(taken)
    const at = '2031-04-01T16:15:00.000Z'
    expect(moved).toMatchObject({ method: 'REQUEST', starts: [at], sequences: [1], overrides: [] })
    await callOff(taken, 2)
    const after = newestCalendar(taken)
    expect(after).toMatchObject({ method: 'CANCEL', starts: [at], statuses: ['CANCELLED'] })
    expect(after.sequences[0]).toBeGreaterThan(1)
    expect(new Set([before, moved, after].flatMap(({ uids }) => uids)).size).toBe(1)
  })

  it('is cancelled when the place is given up', async () => {
    const taken = await take('2031-03-18', 2)
    await giveUp(taken)
    expect(newestCalendar(taken)).toMatchObject({ method: 'CANCEL', sequences: [1] })
  })
})
